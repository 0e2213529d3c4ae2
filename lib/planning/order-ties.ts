import { neededMicro, priceMinorFor, serves } from './order-pricing';
import type { CoverCondition } from './order-program';
import type { Offer, OrderNeed, OrderSupplier } from './order-types';

/** Combinations tried for one need before the solver's own answer is left to stand. */
const MOST_TRIED = 200_000;

export interface TieSetting {
  readonly need: OrderNeed;
  /** What packs must hold together to cover every use. */
  readonly conditions: readonly CoverCondition[];
  readonly pinnedPacks: ReadonlyMap<string, number>;
}

const costOf = (offer: Offer, packs: number): number =>
  packs === 0 ? 0 : packs * priceMinorFor(offer, packs);

/** Fewer before more, offer by offer: only to tell apart what is equal in all that matters. */
function isBefore(a: readonly number[], b: readonly number[]): boolean {
  const i = a.findIndex((count, index) => count !== b[index]);
  return i >= 0 && (a[i] as number) > (b[i] as number);
}

/** Every way to spend exactly `spendMinor` on these offers; null if there are too many to try. */
function waysToSpend(
  offers: readonly Offer[],
  spendMinor: number,
  least: readonly number[],
): number[][] | null {
  const ways: number[][] = [];
  let tried = 0;
  const search = (counts: readonly number[], left: number): boolean => {
    tried += 1;
    if (tried > MOST_TRIED) return false;
    const offer = offers[counts.length];
    if (offer === undefined) {
      if (left === 0) ways.push([...counts]);
      return true;
    }
    const cheapest = Math.min(...offer.prices.map(({ priceMinor }) => priceMinor));
    if (cheapest === 0) return false;
    const most = Math.min(offer.maxPacks ?? Number.POSITIVE_INFINITY, Math.floor(left / cheapest));
    for (let count = least[counts.length] ?? 0; count <= most; count += 1) {
      const cost = costOf(offer, count);
      if (cost <= left && !search([...counts, count], left - cost)) return false;
    }
    return true;
  };
  return search([], spendMinor) ? ways : null;
}

/**
 * Among orders of the same cost, with the same money spent on each need and the same suppliers, takes the one with the
 * least surplus, then the fewest packs, then the first by offer id. Minimum orders stay met.
 * @param packsOf - the packs of an order of least cost
 * @returns packs of an order of the same cost
 */
export function settleTies(
  packsOf: ReadonlyMap<string, number>,
  settings: readonly TieSetting[],
  offers: readonly Offer[],
  suppliers: readonly OrderSupplier[],
): Map<string, number> {
  const settled = new Map(packsOf);
  const packs = (offer: Offer) => settled.get(offer.id) ?? 0;
  const isUsed = (supplierId: string) =>
    offers.some((offer) => offer.supplierId === supplierId && packs(offer) > 0);
  const sendsHazard = (supplierId: string) =>
    offers.some((offer) => offer.supplierId === supplierId && offer.hazardous && packs(offer) > 0);
  const goodsOf = (supplierId: string) =>
    offers.reduce(
      (sum, offer) => sum + (offer.supplierId === supplierId ? costOf(offer, packs(offer)) : 0),
      0,
    );
  for (const { need, conditions, pinnedPacks } of settings) {
    const own = offers.filter(
      (offer) =>
        serves(offer, need) &&
        isUsed(offer.supplierId) &&
        (!offer.hazardous || sendsHazard(offer.supplierId)),
    );
    const before = own.map(packs);
    const spent = own.reduce((sum, offer) => sum + costOf(offer, packs(offer)), 0);
    const ways = waysToSpend(
      own,
      spent,
      own.map((offer) => pinnedPacks.get(offer.id) ?? 0),
    );
    const amountOf = (counts: readonly number[], ids: ReadonlySet<string> | null) =>
      own.reduce(
        (sum, offer, i) => sum + (ids === null || ids.has(offer.id) ? (counts[i] ?? 0) * offer.packMicro : 0),
        0,
      );
    const meetsMinimums = (counts: readonly number[]) =>
      suppliers.every(({ id, minimumOrderMinor }) => {
        if (minimumOrderMinor === 0 || !isUsed(id)) return true;
        const change = own.reduce(
          (sum, offer, i) =>
            sum +
            (offer.supplierId === id ? costOf(offer, counts[i] ?? 0) - costOf(offer, before[i] ?? 0) : 0),
          0,
        );
        return goodsOf(id) + change >= minimumOrderMinor;
      });
    const covers = (counts: readonly number[]) =>
      conditions.every(({ offerIds, amountMicro }) => amountOf(counts, offerIds) >= amountMicro);
    const surplusOf = (counts: readonly number[]) => Math.max(0, amountOf(counts, null) - neededMicro(need));
    const totalOf = (counts: readonly number[]) => counts.reduce((sum, count) => sum + count, 0);
    let best = before;
    for (const counts of ways ?? []) {
      const difference = surplusOf(counts) - surplusOf(best) || totalOf(counts) - totalOf(best);
      const isBetter = difference < 0 || (difference === 0 && isBefore(counts, best));
      if (isBetter && covers(counts) && meetsMinimums(counts)) best = counts;
    }
    own.forEach((offer, i) => settled.set(offer.id, best[i] ?? 0));
  }
  return settled;
}
