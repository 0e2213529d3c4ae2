import type { LedgerUnit } from '../domain/quantities';
import { requirePositive, requireWhole } from './checks';
import { dayNumber } from './days';

/** A bottle on the shelf as the choice needs it. Amounts are integer millionths of the lot's unit. */
export interface StockLot {
  readonly id: string;
  readonly code: string;
  readonly unit: LedgerUnit;
  readonly balanceMicro: number;
  /** ISO day, the last on which it may be used; null: does not expire. */
  readonly expiresOn: string | null;
  /** ISO day. */
  readonly receivedOn: string;
  readonly held: boolean;
}

export type PassedOverReason = 'held' | 'expired' | 'empty' | 'too-little-left' | 'other-unit';

export interface PassedOver<L extends StockLot> {
  readonly lot: L;
  readonly reason: PassedOverReason;
  readonly message: string;
}

export interface LotChoice<L extends StockLot> {
  /** In order of use, soonest expiry first; every amount above 0 and within the lot's balance. */
  readonly takes: readonly { readonly lot: L; readonly amountMicro: number }[];
  readonly passedOver: readonly PassedOver<L>[];
  /** What is missing, in millionths of the unit asked for; 0 if the lots suffice. */
  readonly shortMicro: number;
}

export interface LotChoiceOptions<L extends StockLot> {
  /** ISO day of use. */
  readonly onDay: string;
  readonly unit: LedgerUnit;
  /**
   * What one unit of a lot is worth in units of the need, for lots of unlike assay; 1 if not given, and then all
   * arithmetic is in integers.
   */
  readonly worth?: (lot: L) => number;
  /** Smallest amount worth taking from a lot, e.g. what can still be weighed. */
  readonly minimumTakeMicro?: number;
}

/** Soonest expiry first, then longest on the shelf, then by code. */
export function byExpiry(a: StockLot, b: StockLot): number {
  if (a.expiresOn !== b.expiresOn) {
    if (a.expiresOn === null) return 1;
    return b.expiresOn === null ? -1 : dayNumber(a.expiresOn) - dayNumber(b.expiresOn);
  }
  return dayNumber(a.receivedOn) - dayNumber(b.receivedOn) || a.code.localeCompare(b.code, 'en');
}

function whyNot<L extends StockLot>(
  lot: L,
  options: LotChoiceOptions<L>,
  minimumMicro: number,
): PassedOver<L> | null {
  const because = (reason: PassedOverReason, message: string) => ({ lot, reason, message });
  if (lot.held) return because('held', `${lot.code} is on hold.`);
  if (lot.expiresOn !== null && dayNumber(lot.expiresOn) < dayNumber(options.onDay)) {
    return because('expired', `${lot.code} expired on ${lot.expiresOn}.`);
  }
  if (lot.balanceMicro === 0) return because('empty', `${lot.code} is empty.`);
  if (lot.unit !== options.unit)
    return because('other-unit', `${lot.code} is counted in ${lot.unit}, not ${options.unit}.`);
  if (lot.balanceMicro < minimumMicro) {
    return because(
      'too-little-left',
      `${lot.code} has ${lot.balanceMicro / 1e6} ${lot.unit} left, too little to measure.`,
    );
  }
  return null;
}

/**
 * Lots for an amount, first-expiring-first. Held, expired and empty lots are passed over with the reason; the amount
 * may be split over lots, but no part is made smaller than `minimumTakeMicro` if it can be helped.
 * @param needMicro - integer millionths of `options.unit`, above 0
 * @throws RangeError if an amount is no whole number, the need is 0, or a worth is not positive
 */
export function chooseLots<L extends StockLot>(
  lots: readonly L[],
  needMicro: number,
  options: LotChoiceOptions<L>,
): LotChoice<L> {
  requireWhole(needMicro, 'the amount needed');
  requirePositive(needMicro, 'the amount needed');
  for (const lot of lots) requireWhole(lot.balanceMicro, `the balance of ${lot.code}`);
  // A need below the smallest take is still a need: it is then the smallest take.
  const minimumMicro = Math.min(options.minimumTakeMicro ?? 1, needMicro);
  const worthOf = options.worth ?? (() => 1);
  const takes: { lot: L; amountMicro: number }[] = [];
  const passedOver: PassedOver<L>[] = [];
  let missing = needMicro;
  for (const lot of [...lots].sort(byExpiry)) {
    const refusal = whyNot(lot, options, minimumMicro);
    if (refusal !== null) {
      passedOver.push(refusal);
      continue;
    }
    if (missing <= 0) continue;
    const worth = worthOf(lot);
    requirePositive(worth, `the worth of ${lot.code}`);
    const wanted = Math.ceil(missing / worth - 1e-6);
    let amountMicro = Math.min(wanted, lot.balanceMicro);
    const remainder = wanted - amountMicro;
    if (
      remainder > 0 &&
      remainder < minimumMicro &&
      amountMicro - (minimumMicro - remainder) >= minimumMicro
    ) {
      amountMicro -= minimumMicro - remainder;
    }
    takes.push({ lot, amountMicro });
    missing = amountMicro === wanted ? 0 : missing - amountMicro * worth;
  }
  return { takes, passedOver, shortMicro: Math.max(0, Math.ceil(missing - 1e-6)) };
}
