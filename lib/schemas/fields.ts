import { z } from 'zod';
import { ROLES } from '@/lib/domain/roles';

/** Fields that many inputs share. */

export const idField = z.uuid();
export const slugField = z.string().regex(/^[a-z0-9][a-z0-9-]{0,79}$/);
export const versionField = z.number().int().min(0);
export const nameField = z.string().trim().min(1, 'Say what it is called.').max(120);
export const noteField = z.string().trim().max(2000);
export const emailField = z.string().trim().toLowerCase().pipe(z.email('Not an e-mail address.').max(200));
export const dayField = z.iso.date();
export const momentField = z.iso.datetime({ offset: true });
/** An amount of money in minor units: pence. */
export const moneyField = z.number().int();
export const roleField = z.enum(ROLES);

/** Password to be set: long rather than odd. bcrypt reads 72 bytes at most, so no more are taken. */
export const newPasswordField = z
  .string()
  .min(12, 'At least 12 characters.')
  .refine((value) => new TextEncoder().encode(value).length <= 72, 'At most 72 bytes.');

/** Strength in mol/L. Nothing dissolves to more than 40; the strongest stocks sold are below 30. */
export const molarityField = z
  .number()
  .positive('Must be more than 0.')
  .max(40, 'No solution is stronger than 40 mol/L.');
/** Volume in mL, from a droplet to a carboy. */
export const volumeMlField = z
  .number()
  .min(0.001, 'Must be at least 0.001 mL.')
  .max(100_000, 'At most 100 000 mL.');

/** What was typed as a number: blank is absent, never zero; a comma counts as the decimal sign. */
function typedNumber(value: unknown): unknown {
  if (typeof value !== 'string') return value;
  const text = value.trim().replace(',', '.').replaceAll(/\s/g, '');
  return text === '' ? undefined : Number(text);
}

/** A number typed into a form. */
export function numberField<T extends z.ZodType<unknown, number>>(schema: T) {
  return z.preprocess(typedNumber, schema);
}

/** A number that may be left out or left blank. */
export function optionalNumberField<T extends z.ZodType<unknown, number>>(schema: T) {
  return z.preprocess(typedNumber, schema.optional()).optional();
}

export const idParams = z.strictObject({ id: idField });
export const slugParams = z.strictObject({ id: slugField });
