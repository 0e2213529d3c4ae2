import type { FieldPath, FieldValues, UseFormSetError } from 'react-hook-form';
import { ApiProblem } from './api';

/** `#/portions/0/volumeMl` as the name react-hook-form gives the field. */
export function fieldNameOf(pointer: string): string {
  return pointer
    .replace(/^#\//, '')
    .split('/')
    .map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'))
    .join('.');
}

/**
 * Puts each complaint of a problem on its field.
 * @returns what belongs to no field, for the form's alert; null where every complaint found its place
 */
export function showProblem<T extends FieldValues>(
  problem: unknown,
  setError: UseFormSetError<T>,
  fields: readonly string[],
): string | null {
  if (!(problem instanceof ApiProblem)) return problem instanceof Error ? problem.message : String(problem);
  const homeless: string[] = [];
  for (const { pointer, detail } of problem.errors) {
    const name = fieldNameOf(pointer);
    if (fields.some((field) => name === field || name.startsWith(`${field}.`)))
      setError(name as FieldPath<T>, { message: detail }, { shouldFocus: true });
    else homeless.push(detail);
  }
  if (problem.errors.length === 0) return problem.message;
  return homeless.length > 0 ? homeless.join(' ') : null;
}
