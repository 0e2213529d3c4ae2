import { requirePositive } from './checks';
import type { BalanceOwned } from './equipment';

/**
 * Smallest sample, in repeatabilities, that may be weighed: 2 s / m ≤ 0.10 % gives m ≥ 2000 s.
 * @see USP general chapter <41>, Balances
 */
export const MINIMUM_WEIGHT_FACTOR = 2000;
/** A repeatability better than 0.41 of the readability is taken as that. @see USP general chapter <41> */
export const SMALLEST_REPEATABILITY_IN_DIVISIONS = 0.41;

/** Standard deviation of repeated weighings, g, never better than 0.41 of a division; one division if not known. */
export function repeatabilityG(balance: BalanceOwned): number {
  requirePositive(balance.readabilityG, `the readability of ${balance.name}`);
  return Math.max(
    balance.repeatabilityG ?? balance.readabilityG,
    SMALLEST_REPEATABILITY_IN_DIVISIONS * balance.readabilityG,
  );
}

/** Smallest sample, g, that a balance may weigh. */
export function minimumWeightG(balance: BalanceOwned, factor = MINIMUM_WEIGHT_FACTOR): number {
  return factor * repeatabilityG(balance);
}

/** Decimals that a balance of this readability shows. */
export function shownDecimals(readabilityG: number): number {
  requirePositive(readabilityG, 'the readability');
  return Math.max(0, Math.ceil(-Math.log10(readabilityG) - 1e-9));
}

/** A mass as the balance shows it, rounded to its readability. */
export function shownMassG(balance: BalanceOwned, massG: number): number {
  const steps = Math.round(massG / balance.readabilityG);
  return Number((steps * balance.readabilityG).toFixed(shownDecimals(balance.readabilityG)));
}

/** A mass in the digits of the balance, with its unit: `4.994 g`. */
export function massText(balance: BalanceOwned, massG: number): string {
  return `${shownMassG(balance, massG).toFixed(shownDecimals(balance.readabilityG))} g`;
}

/**
 * The balance to use for a mass: the coarsest whose minimum weight and capacity admit it, so that the fine balance
 * stays free for what needs it.
 * @returns null if the mass is below every minimum weight or above every capacity
 */
export function chooseBalance(
  balances: readonly BalanceOwned[],
  massG: number,
  factor = MINIMUM_WEIGHT_FACTOR,
): BalanceOwned | null {
  requirePositive(massG, 'the mass');
  const usable = balances.filter(
    (balance) => minimumWeightG(balance, factor) <= massG && massG <= balance.capacityG,
  );
  usable.sort(
    (a, b) =>
      b.readabilityG - a.readabilityG || a.name.localeCompare(b.name, 'en') || a.id.localeCompare(b.id, 'en'),
  );
  return usable[0] ?? null;
}

/** The balance that can weigh the least, for planning a stock when a mass is too small; null if the room has none. */
export function finestBalance(
  balances: readonly BalanceOwned[],
  factor = MINIMUM_WEIGHT_FACTOR,
): BalanceOwned | null {
  const sorted = [...balances].sort(
    (a, b) => minimumWeightG(a, factor) - minimumWeightG(b, factor) || a.id.localeCompare(b.id, 'en'),
  );
  return sorted[0] ?? null;
}
