/** Units of the stock ledger. Ledger amounts are integers: millionths of the unit. */
export const LEDGER_UNITS = ['g', 'mL'] as const;
export type LedgerUnit = (typeof LEDGER_UNITS)[number];

/** How close a prepared strength must come: bench 5 %, ordinary 1 %, analytical 0.2 %. */
export const TOLERANCE_CLASSES = ['bench', 'ordinary', 'analytical'] as const;
export type ToleranceClass = (typeof TOLERANCE_CLASSES)[number];
export const TOLERANCE_FRACTION: Readonly<Record<ToleranceClass, number>> = {
  bench: 0.05,
  ordinary: 0.01,
  analytical: 0.002,
};

const MICRO = 1_000_000;

/**
 * Integer millionths of a ledger unit from an amount in that unit.
 * @throws RangeError if the amount is not finite or too large for exact integers
 */
export function toMicro(amount: number): number {
  const micro = Math.round(amount * MICRO);
  if (!Number.isSafeInteger(micro)) throw new RangeError(`${amount} can't be kept as exact millionths`);
  return micro;
}

/** An amount in the ledger unit from integer millionths. */
export function fromMicro(micro: number): number {
  return micro / MICRO;
}
