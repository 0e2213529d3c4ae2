import { findSubstance } from '../chemistry/substances';
import type { LedgerUnit } from '../domain/quantities';

/**
 * An amount of a substance in another unit of the ledger, by its density; rounded up, so that nobody buys too little.
 * @param amountMicro - integer millionths of `from`
 * @returns integer millionths of `to`; the same number where no density is known
 */
export function countedIn(
  substanceId: string,
  amountMicro: number,
  from: LedgerUnit,
  to: LedgerUnit,
): number {
  const densityGPerMl = findSubstance(substanceId)?.densityGPerMl;
  if (from === to || !densityGPerMl) return amountMicro;
  return Math.ceil(to === 'mL' ? amountMicro / densityGPerMl : amountMicro * densityGPerMl);
}
