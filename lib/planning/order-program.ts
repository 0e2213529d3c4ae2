import { dayNumber } from './days';
import type { IntegerProgram, LinearSum, ProgramRow, ProgramVariable } from './integer-program';
import { neededMicro, serves } from './order-pricing';
import type { Offer, OrderNeed, OrderOptions, OrderSupplier, Uncovered } from './order-types';

/** The order as an integer program, and how to read its answer. */
export interface OrderProgram {
  readonly program: IntegerProgram;
  readonly packsOf: (values: readonly number[]) => Map<string, number>;
  readonly uncovered: readonly Uncovered[];
  /** By need, what packs must hold together. */
  readonly conditionsOf: ReadonlyMap<string, readonly CoverCondition[]>;
  readonly lateOn: ReadonlyMap<string, readonly string[]>;
  /** By need, the offers that could serve all its uses alone. */
  readonly soleServers: ReadonlyMap<string, readonly Offer[]>;
}

export const needKey = (need: { readonly substanceId: string; readonly unit: string }): string =>
  `${need.substanceId} ${need.unit}`;

function gcd(a: number, b: number): number {
  return b === 0 ? a : gcd(b, a % b);
}

/** Packs of these offers together must hold at least this much. */
export interface CoverCondition {
  readonly offerIds: ReadonlySet<string>;
  readonly amountMicro: number;
}

/** Which offers can serve each use: arrived, not expired. A use that nothing reaches in time waits for the quickest. */
function demandsOf(need: OrderNeed, offers: readonly Offer[], arrivalOf: (offer: Offer) => number) {
  const late: string[] = [];
  const demands = need.uses.map(({ onDay, amountMicro }): CoverCondition => {
    const day = dayNumber(onDay);
    const keeps = (offer: Offer, until: number) =>
      offer.shelfLifeDays === null || arrivalOf(offer) + offer.shelfLifeDays >= until;
    const inTime = offers.filter((offer) => arrivalOf(offer) <= day && keeps(offer, day));
    if (inTime.length > 0) return { offerIds: new Set(inTime.map(({ id }) => id)), amountMicro };
    const after = offers.filter((offer) => arrivalOf(offer) > day);
    if (after.length === 0) return { offerIds: new Set(), amountMicro };
    late.push(onDay);
    const quickest = Math.min(...after.map(arrivalOf));
    return {
      offerIds: new Set(after.filter((offer) => arrivalOf(offer) === quickest).map(({ id }) => id)),
      amountMicro,
    };
  });
  return { demands, late };
}

/**
 * When packs cover a need: uses with windows are met exactly if, for every union T of their offer sets, the packs of T
 * hold at least all uses that only T can serve (Hall's condition for divisible amounts).
 */
function coverConditions(demands: readonly CoverCondition[]): CoverCondition[] {
  const unions = new Map<string, ReadonlySet<string>>();
  for (const { offerIds } of demands) {
    for (const held of [new Set<string>(), ...unions.values()]) {
      const union = new Set([...held, ...offerIds]);
      unions.set([...union].sort().join(' '), union);
    }
  }
  return [...unions.values()].map((offerIds) => ({
    offerIds,
    amountMicro: demands
      .filter((demand) => [...demand.offerIds].every((id) => offerIds.has(id)))
      .reduce((sum, demand) => sum + demand.amountMicro, 0),
  }));
}

/** A condition as a row, in units of the common measure of the packs, so that all its figures are whole numbers. */
function coverRow(
  { offerIds, amountMicro }: CoverCondition,
  offers: readonly Offer[],
  sumOf: (offer: Offer, weight: number) => LinearSum,
): ProgramRow {
  const measure = offers.reduce((common, offer) => gcd(common, offer.packMicro), 0);
  const own = offers.filter(({ id }) => offerIds.has(id));
  return {
    sum: own.flatMap((offer) => sumOf(offer, offer.packMicro / measure)),
    sense: '>=',
    bound: Math.ceil(amountMicro / measure),
  };
}

/** Whether the suppliers' packs could meet a condition at all. */
function isReachable({ offerIds, amountMicro }: CoverCondition, offers: readonly Offer[]): boolean {
  const most = offers
    .filter(({ id }) => offerIds.has(id))
    .reduce((sum, offer) => sum + (offer.maxPacks ?? Number.POSITIVE_INFINITY) * offer.packMicro, 0);
  return most >= amountMicro;
}

/** Packs beyond which buying more of an offer can't help: all of the need, any price break, any minimum order. */
function mostPacks(
  offer: Offer,
  needs: readonly OrderNeed[],
  supplier: OrderSupplier,
  pinned: number,
): number {
  const amount = needs
    .filter((need) => serves(offer, need))
    .reduce((sum, need) => sum + neededMicro(need), 0);
  const forNeed = Math.ceil(amount / offer.packMicro);
  const lastTier = offer.prices.at(-1)?.fromPacks ?? 1;
  const cheapest = Math.min(...offer.prices.map(({ priceMinor }) => priceMinor));
  const forMinimum = cheapest > 0 ? Math.ceil(supplier.minimumOrderMinor / cheapest) : 0;
  const most = Math.max(forNeed, lastTier, forMinimum, pinned) + 1;
  return offer.maxPacks === null ? most : Math.min(most, offer.maxPacks);
}

/**
 * Builds the program: whole packs per offer and price tier, one yes-or-no per supplier used and per supplier sent
 * hazardous goods.
 * @param offers - only those allowed, sorted so that equal input gives equal output
 */
export function buildOrderProgram(
  needs: readonly OrderNeed[],
  offers: readonly Offer[],
  suppliers: readonly OrderSupplier[],
  options: OrderOptions,
): OrderProgram {
  const variables: ProgramVariable[] = [];
  const rows: ProgramRow[] = [];
  const cost: (readonly [number, number])[] = [];
  const newVariable = (low: number, high: number): number => variables.push({ low, high }) - 1;
  const supplierById = new Map(suppliers.map((supplier) => [supplier.id, supplier]));
  const orderDay = dayNumber(options.orderOn);
  const arrivalOf = (offer: Offer) => orderDay + (supplierById.get(offer.supplierId)?.leadDays ?? 0);

  const used = new Map<string, number>();
  const hazard = new Map<string, number>();
  for (const supplier of suppliers) {
    const own = offers.filter((offer) => offer.supplierId === supplier.id);
    if (own.length > 0 && (supplier.carriageMinor > 0 || supplier.minimumOrderMinor > 0)) {
      used.set(supplier.id, newVariable(0, 1));
      cost.push([supplier.carriageMinor, used.get(supplier.id) ?? 0]);
    }
    if (own.some((offer) => offer.hazardous) && supplier.hazardSurchargeMinor > 0) {
      hazard.set(supplier.id, newVariable(0, 1));
      cost.push([supplier.hazardSurchargeMinor, hazard.get(supplier.id) ?? 0]);
    }
  }

  const tiersOf = new Map<string, { variable: number; priceMinor: number }[]>();
  for (const offer of offers) {
    const supplier = supplierById.get(offer.supplierId);
    if (supplier === undefined)
      throw new RangeError(`offer ${offer.id} names a supplier that is not given: ${offer.supplierId}`);
    const pinned = options.pinned.find(({ offerId }) => offerId === offer.id)?.packs ?? 0;
    const most = mostPacks(offer, needs, supplier, pinned);
    const tiers = offer.prices
      .filter(({ fromPacks }) => fromPacks <= most)
      .map(({ fromPacks, priceMinor }, i, all) => {
        const upTo = (all[i + 1]?.fromPacks ?? most + 1) - 1;
        const variable = newVariable(0, upTo);
        cost.push([priceMinor, variable]);
        if (all.length > 1) {
          const chosen = newVariable(0, 1);
          rows.push({
            sum: [
              [1, variable],
              [-upTo, chosen],
            ],
            sense: '<=',
            bound: 0,
          });
          rows.push({
            sum: [
              [1, variable],
              [-fromPacks, chosen],
            ],
            sense: '>=',
            bound: 0,
          });
          return { variable, priceMinor, chosen };
        }
        return { variable, priceMinor, chosen: null };
      });
    const choices = tiers.flatMap(({ chosen }): (readonly [number, number])[] =>
      chosen === null ? [] : [[1, chosen]],
    );
    if (choices.length > 0) rows.push({ sum: choices, sense: '<=', bound: 1 });
    const sum = tiers.map(({ variable }) => [1, variable] as const);
    for (const gate of [used.get(supplier.id), offer.hazardous ? hazard.get(supplier.id) : undefined]) {
      if (gate !== undefined) rows.push({ sum: [...sum, [-most, gate]], sense: '<=', bound: 0 });
    }
    if (pinned > 0) rows.push({ sum, sense: '>=', bound: pinned });
    tiersOf.set(offer.id, tiers);
  }
  for (const supplier of suppliers) {
    const gate = used.get(supplier.id);
    if (gate === undefined || supplier.minimumOrderMinor === 0) continue;
    const goods = offers
      .filter((offer) => offer.supplierId === supplier.id)
      .flatMap((offer) =>
        (tiersOf.get(offer.id) ?? []).map(({ variable, priceMinor }) => [priceMinor, variable] as const),
      );
    rows.push({ sum: [...goods, [-supplier.minimumOrderMinor, gate]], sense: '>=', bound: 0 });
  }

  const sumOf = (offer: Offer, weight: number): LinearSum =>
    (tiersOf.get(offer.id) ?? []).map(({ variable }) => [weight, variable] as const);
  const uncovered: Uncovered[] = [];
  const lateOn = new Map<string, readonly string[]>();
  const soleServers = new Map<string, readonly Offer[]>();
  const conditionsOf = new Map<string, readonly CoverCondition[]>();
  for (const need of needs) {
    const own = offers.filter((offer) => serves(offer, need));
    const { demands, late } = demandsOf(need, own, arrivalOf);
    lateOn.set(needKey(need), late);
    soleServers.set(
      needKey(need),
      own.filter(({ id }) => demands.every(({ offerIds }) => offerIds.has(id))),
    );
    const { substanceId, unit } = need;
    const refuse = (message: string) => uncovered.push({ substanceId, unit, message });
    if (own.length === 0) refuse(`Nobody offers ${substanceId} in ${unit}.`);
    else if (demands.some(({ offerIds }) => offerIds.size === 0))
      refuse(`Every offer of ${substanceId} would expire before it is used.`);
    else {
      const conditions = coverConditions(demands);
      if (!conditions.every((condition) => isReachable(condition, own))) {
        refuse(`The suppliers do not have enough ${substanceId}.`);
      } else {
        conditionsOf.set(needKey(need), conditions);
        rows.push(...conditions.map((condition) => coverRow(condition, own, sumOf)));
      }
    }
  }
  const packsOf = (values: readonly number[]) =>
    new Map(
      offers.map((offer) => [
        offer.id,
        (tiersOf.get(offer.id) ?? []).reduce((sum, { variable }) => sum + (values[variable] ?? 0), 0),
      ]),
    );
  return {
    program: { variables, objective: cost, rows },
    packsOf,
    uncovered,
    conditionsOf,
    lateOn,
    soleServers,
  };
}
