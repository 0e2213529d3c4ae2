import { requirePositive, requireWhole } from './checks';
import { dayNumber } from './days';
import { solveWithHighs } from './highs-solver';
import type { ProgramAnswer, SolveProgram } from './integer-program';
import { naiveOrder, neededMicro, priceOrder, serves } from './order-pricing';
import { buildOrderProgram, needKey } from './order-program';
import { settleTies } from './order-ties';
import type {
  NeedCover,
  Offer,
  OrderNeed,
  OrderOptions,
  OrderOutcome,
  OrderPlan,
  OrderSupplier,
} from './order-types';

export const DEFAULT_TIME_LIMIT_SECONDS = 5;

function checkInput(
  needs: readonly OrderNeed[],
  offers: readonly Offer[],
  suppliers: readonly OrderSupplier[],
  options: OrderOptions,
): void {
  dayNumber(options.orderOn);
  requirePositive(options.timeLimitSeconds, 'the time limit');
  if (options.budgetMinor !== null) requireWhole(options.budgetMinor, 'the budget');
  if (new Set(needs.map(needKey)).size !== needs.length)
    throw new RangeError('a substance is needed twice in one unit: add the needs up');
  if (new Set(offers.map(({ id }) => id)).size !== offers.length)
    throw new RangeError('two offers have the same id');
  for (const need of needs) {
    for (const { onDay, amountMicro } of need.uses) {
      dayNumber(onDay);
      requireWhole(amountMicro, `the amount of ${need.substanceId}`);
    }
    requirePositive(neededMicro(need), `the amount of ${need.substanceId}`);
  }
  for (const offer of offers) {
    requireWhole(offer.packMicro, `the pack of offer ${offer.id}`);
    requirePositive(offer.packMicro, `the pack of offer ${offer.id}`);
    if (offer.maxPacks !== null) requireWhole(offer.maxPacks, `the packs of offer ${offer.id}`);
    if (offer.shelfLifeDays !== null)
      requireWhole(offer.shelfLifeDays, `the shelf life of offer ${offer.id}`);
    offer.prices.forEach(({ fromPacks, priceMinor }, i) => {
      requireWhole(priceMinor, `a price of offer ${offer.id}`);
      const before = offer.prices[i - 1]?.fromPacks;
      if (before === undefined ? fromPacks !== 1 : !(Number.isSafeInteger(fromPacks) && fromPacks > before)) {
        throw new RangeError(`the prices of offer ${offer.id} must start at 1 pack and rise`);
      }
    });
    if (offer.prices.length === 0) throw new RangeError(`offer ${offer.id} has no price`);
  }
  for (const { id, ...fees } of suppliers) {
    for (const fee of [fees.carriageMinor, fees.hazardSurchargeMinor, fees.minimumOrderMinor, fees.leadDays])
      requireWhole(fee, `a figure of supplier ${id}`);
  }
  for (const { offerId, packs } of options.pinned) {
    requireWhole(packs, `the pinned packs of ${offerId}`);
    if (!offers.some(({ id }) => id === offerId)) throw new RangeError(`no offer ${offerId} to pin`);
    if (options.forbidden.includes(offerId))
      throw new RangeError(`offer ${offerId} is both pinned and forbidden`);
  }
}

const amountText = (micro: number, unit: string): string => `${Number((micro / 1e6).toPrecision(6))} ${unit}`;

function reasonFor(
  offer: Offer,
  packs: number,
  needs: readonly OrderNeed[],
  packsOf: ReadonlyMap<string, number>,
  offers: readonly Offer[],
): string {
  const need = needs.find((candidate) => serves(offer, candidate));
  const pack = amountText(offer.packMicro, offer.unit);
  if (need === undefined) return `${packs} × ${pack}, bought as pinned or to reach the minimum order`;
  const bought = offers
    .filter((other) => serves(other, need))
    .reduce((sum, other) => sum + (packsOf.get(other.id) ?? 0) * other.packMicro, 0);
  const over = bought - neededMicro(need);
  const fellows = offers.filter(
    (other) =>
      other.supplierId === offer.supplierId && other.id !== offer.id && (packsOf.get(other.id) ?? 0) > 0,
  ).length;
  const shared =
    fellows > 0 ? `; shares carriage with ${fellows} other ${fellows === 1 ? 'line' : 'lines'}` : '';
  const surplus = over > 0 ? `, ${amountText(over, need.unit)} over` : ', nothing over';
  return `${packs} × ${pack} of the cheapest cover of ${amountText(neededMicro(need), need.unit)}${surplus}${shared}`;
}

function coverOf(
  need: OrderNeed,
  offers: readonly Offer[],
  packsOf: ReadonlyMap<string, number>,
  lateOn: readonly string[],
): NeedCover {
  const needed = neededMicro(need);
  const boughtMicro = offers
    .filter((offer) => serves(offer, need))
    .reduce((sum, offer) => sum + (packsOf.get(offer.id) ?? 0) * offer.packMicro, 0);
  return {
    substanceId: need.substanceId,
    unit: need.unit,
    neededMicro: needed,
    boughtMicro,
    surplusMicro: Math.max(0, boughtMicro - needed),
    lateOn,
  };
}

/**
 * The order of least cost that covers what is needed: whole packs, price breaks, carriage, hazard surcharges, minimum
 * orders, arrival and shelf life, as an integer program solved to a proven gap. Ties are settled by least surplus, then fewest
 * packs (`settleTies`), so the same question has the same answer in whatever order it is put.
 *
 * Needs that nobody can cover are listed and left out, so that the rest is still planned. A budget that does not
 * reach gives the least plan with what is missing.
 * @param solve - HiGHS unless another is given
 * @throws RangeError if an amount or price is no whole number, a day does not exist, ids repeat, or an offer names an
 *   unknown supplier
 */
export async function planOrder(
  needs: readonly OrderNeed[],
  offers: readonly Offer[],
  suppliers: readonly OrderSupplier[],
  options: OrderOptions,
  solve: SolveProgram = solveWithHighs,
): Promise<OrderOutcome> {
  checkInput(needs, offers, suppliers, options);
  const byId = (a: { readonly id: string }, b: { readonly id: string }) => (a.id < b.id ? -1 : 1);
  const houses = [...suppliers].sort(byId);
  const allowed = offers.filter(({ id }) => !options.forbidden.includes(id)).sort(byId);
  const wanted = [...needs].sort((a, b) => (needKey(a) < needKey(b) ? -1 : 1));
  // Nothing is bought merely to fill up an order, nor of what can't be covered: only for a need that is, or pinned.
  const isPinned = (offer: Offer) => options.pinned.some(({ offerId }) => offerId === offer.id);
  const relevantTo = (some: readonly OrderNeed[]) =>
    allowed.filter((offer) => isPinned(offer) || some.some((need) => serves(offer, need)));
  const { uncovered } = buildOrderProgram(wanted, relevantTo(wanted), houses, options);
  const coverable = wanted.filter((need) => !uncovered.some((missing) => needKey(missing) === needKey(need)));
  const relevant = relevantTo(coverable);
  const built = buildOrderProgram(coverable, relevant, houses, options);

  const nothing: ProgramAnswer = { status: 'optimal', values: [], gap: 0 };
  const answer =
    built.program.variables.length === 0 ? nothing : await solve(built.program, options.timeLimitSeconds);
  if (answer.status === 'infeasible' || answer.status === 'unsolved') {
    const message =
      answer.status === 'infeasible'
        ? 'No order meets the minimum orders, pins and packs in stock together.'
        : 'The solver found no order in the time given.';
    return { status: 'no-plan', message, uncovered };
  }
  const settings = coverable.map((need) => ({
    need,
    conditions: built.conditionsOf.get(needKey(need)) ?? [],
    pinnedPacks: new Map(options.pinned.map(({ offerId, packs }) => [offerId, packs])),
  }));
  const packsOf = settleTies(built.packsOf(answer.values), settings, relevant, houses);
  const priced = priceOrder(packsOf, relevant, houses, (offer, packs) =>
    reasonFor(offer, packs, coverable, packsOf, relevant),
  );
  const naive = naiveOrder(coverable, (need) => built.soleServers.get(needKey(need)) ?? [], houses);
  const plan: OrderPlan = {
    ...priced,
    covers: coverable.map((need) => coverOf(need, relevant, packsOf, built.lateOn.get(needKey(need)) ?? [])),
    uncovered,
    gap: answer.gap,
    naive,
    savedMinor: naive === null ? null : naive.totalMinor - priced.totalMinor,
  };
  if (options.budgetMinor !== null && plan.totalMinor > options.budgetMinor) {
    return { status: 'over-budget', plan, overMinor: plan.totalMinor - options.budgetMinor };
  }
  return { status: 'planned', plan };
}

/**
 * What it would cost more to do without an offer the plan uses.
 * @returns the extra cost in minor units; null if there is no plan without it
 */
export async function costWithoutOffer(
  plan: OrderPlan,
  offerId: string,
  needs: readonly OrderNeed[],
  offers: readonly Offer[],
  suppliers: readonly OrderSupplier[],
  options: OrderOptions,
  solve: SolveProgram = solveWithHighs,
): Promise<number | null> {
  const pinned = options.pinned.filter((pin) => pin.offerId !== offerId);
  const outcome = await planOrder(
    needs,
    offers,
    suppliers,
    { ...options, pinned, forbidden: [...options.forbidden, offerId] },
    solve,
  );
  if (outcome.status === 'no-plan' || outcome.plan.uncovered.length > plan.uncovered.length) return null;
  return outcome.plan.totalMinor - plan.totalMinor;
}
