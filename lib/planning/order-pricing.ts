import type {
  Offer,
  OrderNeed,
  OrderSupplier,
  PlannedLine,
  PlannedSupplier,
  PricedOrder,
} from './order-types';

/** Price of one pack when `packs` are bought together. */
export function priceMinorFor(offer: Offer, packs: number): number {
  const tier = offer.prices.findLast(({ fromPacks }) => fromPacks <= Math.max(packs, 1));
  if (tier === undefined) throw new RangeError(`offer ${offer.id} has no price for ${packs} packs`);
  return tier.priceMinor;
}

export function neededMicro(need: OrderNeed): number {
  return need.uses.reduce((sum, use) => sum + use.amountMicro, 0);
}

export function serves(offer: Offer, need: OrderNeed): boolean {
  return offer.substanceId === need.substanceId && offer.unit === need.unit;
}

/**
 * The lines and fees of an order for given packs: goods, carriage and hazard surcharge per supplier. Exact: all in
 * integer minor units.
 */
export function priceOrder(
  packsOf: ReadonlyMap<string, number>,
  offers: readonly Offer[],
  suppliers: readonly OrderSupplier[],
  reasonOf: (offer: Offer, packs: number) => string,
): PricedOrder {
  const bought = offers.filter((offer) => (packsOf.get(offer.id) ?? 0) > 0);
  const lines = bought.map((offer): PlannedLine => {
    const packs = packsOf.get(offer.id) ?? 0;
    const priceMinor = priceMinorFor(offer, packs);
    const { supplierId, substanceId, unit, packMicro } = offer;
    return {
      offerId: offer.id,
      supplierId,
      substanceId,
      unit,
      packs,
      packMicro,
      priceMinor,
      lineTotalMinor: packs * priceMinor,
      reason: reasonOf(offer, packs),
    };
  });
  const totals = suppliers.flatMap((supplier): PlannedSupplier[] => {
    const own = lines.filter((line) => line.supplierId === supplier.id);
    if (own.length === 0) return [];
    const goodsMinor = own.reduce((sum, line) => sum + line.lineTotalMinor, 0);
    const isHazardous = bought.some((offer) => offer.supplierId === supplier.id && offer.hazardous);
    const hazardSurchargeMinor = isHazardous ? supplier.hazardSurchargeMinor : 0;
    const totalMinor = goodsMinor + supplier.carriageMinor + hazardSurchargeMinor;
    return [
      {
        supplierId: supplier.id,
        goodsMinor,
        carriageMinor: supplier.carriageMinor,
        hazardSurchargeMinor,
        totalMinor,
      },
    ];
  });
  return {
    lines,
    suppliers: totals,
    totalMinor: totals.reduce((sum, supplier) => sum + supplier.totalMinor, 0),
  };
}

/**
 * What buying without a plan would come to: each need by itself, as many whole packs as fit at the best unit price,
 * then the next best, and the rest with the smallest pack; orders below a supplier's minimum are topped up.
 * @param offersFor - the offers that could serve a need alone
 * @returns null where there are none or the packs in stock do not reach
 */
export function naiveOrder(
  needs: readonly OrderNeed[],
  offersFor: (need: OrderNeed) => readonly Offer[],
  suppliers: readonly OrderSupplier[],
): PricedOrder | null {
  const offers = needs.flatMap(offersFor);
  const packsOf = new Map<string, number>();
  const add = (offer: Offer, packs: number) => packsOf.set(offer.id, (packsOf.get(offer.id) ?? 0) + packs);
  const leftOf = (offer: Offer) =>
    (offer.maxPacks ?? Number.POSITIVE_INFINITY) - (packsOf.get(offer.id) ?? 0);
  for (const need of needs) {
    const own = offersFor(need);
    let missing = neededMicro(need);
    for (const offer of [...own].sort(
      (a, b) => priceMinorFor(a, 1) * b.packMicro - priceMinorFor(b, 1) * a.packMicro,
    )) {
      const packs = Math.min(Math.floor(missing / offer.packMicro), leftOf(offer));
      if (packs > 0) add(offer, packs);
      missing -= Math.max(packs, 0) * offer.packMicro;
    }
    for (const offer of [...own].sort((a, b) => a.packMicro - b.packMicro)) {
      while (missing > 0 && leftOf(offer) > 0) {
        add(offer, 1);
        missing -= offer.packMicro;
      }
    }
    if (missing > 0) return null;
  }
  for (const supplier of suppliers) {
    const own = offers.filter(
      (offer) => offer.supplierId === supplier.id && (packsOf.get(offer.id) ?? 0) > 0,
    );
    const goods = () =>
      own.reduce(
        (sum, offer) => sum + (packsOf.get(offer.id) ?? 0) * priceMinorFor(offer, packsOf.get(offer.id) ?? 0),
        0,
      );
    while (own.length > 0 && goods() < supplier.minimumOrderMinor) {
      const [cheapest] = own
        .filter((offer) => leftOf(offer) > 0 && priceMinorFor(offer, 1) > 0)
        .sort((a, b) => priceMinorFor(a, 1) - priceMinorFor(b, 1));
      if (cheapest === undefined) return null;
      add(cheapest, 1);
    }
  }
  return priceOrder(packsOf, offers, suppliers, () => 'best unit price, bought by itself');
}
