import type { ComponentPropsWithRef } from 'react';
import { classNames } from './class-names';
import { CONTROL, controlProps, Field } from './field';
import type { FieldProps } from './field';

type Control<E extends 'input' | 'select' | 'textarea'> = FieldProps &
  Omit<ComponentPropsWithRef<E>, 'id' | 'className'>;

function split<P extends FieldProps>({ id, label, hint, error, isLabelHidden, className, ...rest }: P) {
  return { field: { id, label, hint, error, isLabelHidden, className }, rest };
}

export function TextInput(props: Control<'input'>) {
  const { field, rest } = split(props);
  return (
    <Field {...field}>
      <input type="text" {...rest} {...controlProps(field)} className={CONTROL} />
    </Field>
  );
}

/** A number typed as text, so that a comma or a half-typed figure is not lost; its unit stands behind it. */
export function NumberInput({ unit, ...props }: Control<'input'> & { readonly unit?: string }) {
  const { field, rest } = split(props);
  const control = controlProps(field);
  const described = [unit ? `${field.id}-unit` : null, control['aria-describedby']].filter(Boolean).join(' ');
  return (
    <Field {...field}>
      <span className="flex items-stretch">
        <input
          type="text"
          inputMode="decimal"
          autoComplete="off"
          {...rest}
          {...control}
          aria-describedby={described || undefined}
          className={classNames(CONTROL, 'text-right font-mono', unit && 'rounded-r-none border-r-0')}
        />
        {unit && (
          <span
            id={`${field.id}-unit`}
            className="flex items-center rounded-r border border-line bg-sunken px-2.5 text-sm text-soft"
          >
            {unit}
          </span>
        )}
      </span>
    </Field>
  );
}

export function Select({ children, ...props }: Control<'select'>) {
  const { field, rest } = split(props);
  return (
    <Field {...field}>
      <select {...rest} {...controlProps(field)} className={CONTROL}>
        {children}
      </select>
    </Field>
  );
}

export function TextArea(props: Control<'textarea'>) {
  const { field, rest } = split(props);
  return (
    <Field {...field}>
      <textarea rows={3} {...rest} {...controlProps(field)} className={CONTROL} />
    </Field>
  );
}

export function Checkbox({
  label,
  id,
  hint,
  ...rest
}: { readonly id: string; readonly label: string; readonly hint?: string } & Omit<
  ComponentPropsWithRef<'input'>,
  'id' | 'type' | 'className'
>) {
  return (
    <div className="flex items-start gap-3 py-1.5">
      <input
        {...rest}
        id={id}
        type="checkbox"
        aria-describedby={hint ? `${id}-hint` : undefined}
        className="mt-0.5 size-6 shrink-0 accent-verdigris"
      />
      <label htmlFor={id} className="text-base">
        {label}
        {hint && (
          <span id={`${id}-hint`} className="block text-sm text-soft">
            {hint}
          </span>
        )}
      </label>
    </div>
  );
}
