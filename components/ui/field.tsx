import type { ReactNode } from 'react';
import { classNames } from './class-names';

export const CONTROL =
  'w-full min-h-11 rounded border border-line bg-raised px-3 py-2 text-base text-ink placeholder:text-soft aria-invalid:border-signal aria-invalid:border-2 disabled:opacity-60';

export interface FieldProps {
  readonly id: string;
  readonly label: string;
  readonly hint?: ReactNode;
  readonly error?: string;
  readonly isLabelHidden?: boolean;
  readonly className?: string;
}

/** What ties a control to its label, hint and error. */
export function controlProps({ id, hint, error }: FieldProps) {
  const described = [hint ? `${id}-hint` : null, error ? `${id}-error` : null].filter(Boolean).join(' ');
  return {
    id,
    'aria-invalid': error ? true : undefined,
    'aria-describedby': described || undefined,
  } as const;
}

/** A label above its control, with the hint and the error where the eye is. */
export function Field({
  id,
  label,
  hint,
  error,
  isLabelHidden = false,
  className,
  children,
}: FieldProps & { readonly children: ReactNode }) {
  return (
    <div className={classNames('min-w-0', className)}>
      <label htmlFor={id} className={isLabelHidden ? 'sr-only' : 'mb-1 block text-[0.95rem] font-semibold'}>
        {label}
      </label>
      {children}
      {hint && (
        <p id={`${id}-hint`} className="mt-1 text-sm text-soft">
          {hint}
        </p>
      )}
      {error && (
        <p id={`${id}-error`} role="alert" className="mt-1 text-sm font-semibold text-signal">
          <span aria-hidden>▲ </span>
          {error}
        </p>
      )}
    </div>
  );
}
