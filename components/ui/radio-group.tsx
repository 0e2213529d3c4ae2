import type { ReactNode } from 'react';
import { classNames } from './class-names';

interface RadioGroupProps<V extends string> {
  readonly name: string;
  readonly legend: string;
  readonly choices: readonly { readonly value: V; readonly label: string; readonly hint?: ReactNode }[];
  readonly value: V | null;
  readonly onChange: (value: V) => void;
  readonly hint?: string;
  readonly error?: string;
}

/** A few choices of which one holds, all in view. */
export function RadioGroup<V extends string>({
  name,
  legend,
  choices,
  value,
  onChange,
  hint,
  error,
}: RadioGroupProps<V>) {
  const described = [hint ? `${name}-hint` : null, error ? `${name}-error` : null].filter(Boolean).join(' ');
  return (
    <fieldset aria-describedby={described || undefined}>
      <legend className="mb-1 text-[0.95rem] font-semibold">{legend}</legend>
      {hint && (
        <p id={`${name}-hint`} className="text-sm text-soft">
          {hint}
        </p>
      )}
      {choices.map((choice) => (
        <label
          key={choice.value}
          className={classNames(
            'flex min-h-11 items-start gap-3 border-l-4 px-3 py-2.5',
            choice.value === value ? 'border-verdigris bg-verdigris-wash' : 'border-transparent',
          )}
        >
          <input
            type="radio"
            name={name}
            value={choice.value}
            checked={choice.value === value}
            onChange={() => onChange(choice.value)}
            className="mt-0.5 size-5 shrink-0 accent-verdigris"
          />
          <span>
            {choice.label}
            {choice.hint && <span className="block text-sm text-soft">{choice.hint}</span>}
          </span>
        </label>
      ))}
      {error && (
        <p id={`${name}-error`} role="alert" className="mt-1 text-sm font-semibold text-signal">
          <span aria-hidden>▲ </span>
          {error}
        </p>
      )}
    </fieldset>
  );
}
