import { useId } from 'react';
import { Select } from './inputs';

interface ChoiceFilterProps {
  readonly label: string;
  /** The field of the list's state that it reads and changes. */
  readonly field: string;
  readonly choices: readonly (readonly [value: string, words: string])[];
  /** What stands first and filters nothing; without it one of the choices always holds. */
  readonly anyWords?: string;
  readonly state: Readonly<Record<string, string>>;
  readonly change: (next: Readonly<Record<string, string>>) => void;
}

/** Narrows a list to one of a few values. */
export function ChoiceFilter({ label, field, choices, anyWords, state, change }: ChoiceFilterProps) {
  return (
    <Select
      id={useId()}
      label={label}
      value={state[field] ?? ''}
      onChange={(event) => change({ [field]: event.target.value })}
      className="w-48"
    >
      {anyWords !== undefined && <option value="">{anyWords}</option>}
      {choices.map(([value, words]) => (
        <option key={value} value={value}>
          {words}
        </option>
      ))}
    </Select>
  );
}

/** Mine or everybody's. */
export const WHOSE = [
  ['mine', 'mine'],
  ['all', 'everybody’s'],
] as const;
