import fc from 'fast-check';
import type { ProgramAnswer } from '@/lib/planning/integer-program';
import { costWithoutOffer, planOrder } from '@/lib/planning/order-plan';
import type { Offer, OrderNeed, OrderOptions, OrderSupplier } from '@/lib/planning/order-types';
import figures from './figures/packs.json';

const options: OrderOptions = {
  orderOn: '2026-12-01',
  budgetMinor: null,
  pinned: [],
  forbidden: [],
  timeLimitSeconds: 10,
};

function buildSupplier(given: Partial<OrderSupplier> = {}): OrderSupplier {
  return {
    id: 'north',
    name: 'Northmoor Supplies',
    leadDays: 3,
    carriageMinor: 0,
    hazardSurchargeMinor: 0,
    minimumOrderMinor: 0,
    ...given,
  };
}
function buildOffer(given: Partial<Offer> = {}): Offer {
  return {
    id: 'o',
    supplierId: 'north',
    substanceId: 's',
    unit: 'g',
    packMicro: 25_000_000,
    prices: [{ fromPacks: 1, priceMinor: 1800 }],
    maxPacks: null,
    shelfLifeDays: null,
    hazardous: false,
    ...given,
  };
}
function buildNeed(amountMicro: number, given: Partial<OrderNeed> = {}): OrderNeed {
  return { substanceId: 's', unit: 'g', uses: [{ onDay: '2026-12-20', amountMicro }], ...given };
}
async function plan(...args: Parameters<typeof planOrder>) {
  const outcome = await planOrder(...args);
  if (outcome.status === 'no-plan') throw new Error(outcome.message);
  return outcome.plan;
}

describe('published pack problems', () => {
  const simple = figures.rows.flatMap((row) =>
    row.packs === undefined || row.preferred === undefined
      ? []
      : [{ ...row, packs: row.packs, preferred: row.preferred }],
  );
  test('all six are there', () => expect(simple).toHaveLength(6));

  test.each(simple)('$id: $why', async (row) => {
    const offers = row.packs.map((pack) =>
      buildOffer({
        id: pack.name,
        packMicro: pack.size * 1_000_000,
        prices: [{ fromPacks: 1, priceMinor: Math.round(pack.price * 100) }],
        maxPacks: pack.max_count,
      }),
    );
    const order = await plan([buildNeed(row.need_at_least * 1_000_000)], offers, [buildSupplier()], options);
    expect(order.totalMinor).toBe(Math.round(row.optimal_cost * 100));
    expect(Object.fromEntries(order.lines.map((line) => [line.offerId, line.packs]))).toEqual(
      row.preferred.counts,
    );
    expect(order.covers[0]?.surplusMicro).toBe(row.preferred.surplus * 1_000_000);
    expect(order.naive?.totalMinor).toBe(Math.round((row.greedy_cost_for_contrast ?? Number.NaN) * 100));
    expect(order.gap).toBe(0);
  });

  test('pack-7: carriage decides between suppliers', async () => {
    const row = figures.rows.find((candidate) => candidate.id === 'pack-7');
    const houses = Object.entries(row?.suppliers ?? {});
    const suppliers = houses.map(([id, house]) => buildSupplier({ id, carriageMinor: house.shipping * 100 }));
    const offers = houses.flatMap(([supplierId, house]) =>
      Object.entries(house.packs).map(([pack, price]) =>
        buildOffer({
          id: `${supplierId} ${pack}`,
          supplierId,
          packMicro: Number.parseInt(pack, 10) * 1_000_000,
          prices: [{ fromPacks: 1, priceMinor: Number(price) * 100 }],
        }),
      ),
    );
    expect(offers).toHaveLength(4);
    const order = await plan([buildNeed(400_000_000)], offers, suppliers, options);
    expect(order.totalMinor).toBe((row?.optimal_cost ?? 0) * 100);
    expect(order.lines.map((line) => [line.offerId, line.packs])).toEqual([['B 500 g', 1]]);
    const [line] = order.lines;
    const second = await costWithoutOffer(
      order,
      line?.offerId ?? '',
      [buildNeed(400_000_000)],
      offers,
      suppliers,
      options,
    );
    expect(order.totalMinor + (second ?? 0)).toBe((row?.second_best_cost ?? 0) * 100);
  });
});

interface Case {
  readonly needs: OrderNeed[];
  readonly offers: Offer[];
  readonly suppliers: OrderSupplier[];
}
const anyCase = fc
  .record({
    amounts: fc.array(fc.integer({ min: 1, max: 12 }), { minLength: 1, maxLength: 2 }),
    carriage: fc.array(fc.integer({ min: 0, max: 8 }), { minLength: 2, maxLength: 2 }),
    surcharge: fc.integer({ min: 0, max: 6 }),
    minimum: fc.array(fc.constantFrom(0, 0, 10, 25), { minLength: 2, maxLength: 2 }),
    offers: fc.array(
      fc.record({
        supplier: fc.integer({ min: 0, max: 1 }),
        substance: fc.integer({ min: 0, max: 1 }),
        pack: fc.integer({ min: 1, max: 7 }),
        price: fc.integer({ min: 1, max: 12 }),
        breakAt: fc.option(fc.integer({ min: 2, max: 4 })),
        hazardous: fc.boolean(),
        max: fc.option(fc.integer({ min: 0, max: 4 })),
      }),
      { minLength: 2, maxLength: 4 },
    ),
  })
  .map((given): Case => ({
    needs: given.amounts.map((amount, i) => ({
      substanceId: `s${i}`,
      unit: 'g',
      uses: [{ onDay: '2026-12-20', amountMicro: amount * 1_000_000 }],
    })),
    suppliers: [0, 1].map((i) =>
      buildSupplier({
        id: `h${i}`,
        carriageMinor: given.carriage[i] ?? 0,
        hazardSurchargeMinor: given.surcharge,
        minimumOrderMinor: given.minimum[i] ?? 0,
      }),
    ),
    offers: given.offers.map((offer, i) =>
      buildOffer({
        id: `o${i}`,
        supplierId: `h${offer.supplier}`,
        substanceId: `s${offer.substance}`,
        packMicro: offer.pack * 1_000_000,
        prices: [
          { fromPacks: 1, priceMinor: offer.price },
          ...(offer.breakAt === null
            ? []
            : [{ fromPacks: offer.breakAt, priceMinor: Math.max(1, offer.price - 2) }]),
        ],
        maxPacks: offer.max,
        hazardous: offer.hazardous,
      }),
    ),
  }));

/** Least cost by trying every number of packs of every offer. */
function bruteForce({ needs, offers, suppliers }: Case): number | null {
  const wanted = offers.filter((offer) => needs.some((need) => need.substanceId === offer.substanceId));
  let best: number | null = null;
  const costOf = (packs: readonly number[]): number | null => {
    for (const need of needs) {
      const bought = wanted.reduce(
        (sum, offer, i) =>
          sum + (offer.substanceId === need.substanceId ? offer.packMicro * (packs[i] ?? 0) : 0),
        0,
      );
      if (bought < (need.uses[0]?.amountMicro ?? 0)) return null;
    }
    let total = 0;
    for (const supplier of suppliers) {
      const own = wanted
        .map((offer, i) => ({ offer, count: packs[i] ?? 0 }))
        .filter(({ offer, count }) => offer.supplierId === supplier.id && count > 0);
      if (own.length === 0) continue;
      const goods = own.reduce(
        (sum, { offer, count }) =>
          sum + count * (offer.prices.findLast((tier) => tier.fromPacks <= count)?.priceMinor ?? 0),
        0,
      );
      if (goods < supplier.minimumOrderMinor) return null;
      total +=
        goods +
        supplier.carriageMinor +
        (own.some(({ offer }) => offer.hazardous) ? supplier.hazardSurchargeMinor : 0);
    }
    return total;
  };
  const search = (packs: readonly number[]) => {
    const offer = wanted[packs.length];
    if (offer === undefined) {
      const cost = costOf(packs);
      if (cost !== null && (best === null || cost < best)) best = cost;
      return;
    }
    // More than this of one offer is never needed: it covers any need (12) or any minimum (25) by itself.
    for (let count = 0; count <= Math.min(offer.maxPacks ?? 26, 26); count += 1) search([...packs, count]);
  };
  search([]);
  return best;
}

describe('order plan', () => {
  test('equals brute force on 200 small random cases, and the naive plan is never cheaper', async () => {
    let solved = 0;
    await fc.assert(
      fc.asyncProperty(anyCase, async (given) => {
        const offered = given.needs.filter((need) => {
          const most = given.offers
            .filter((offer) => offer.substanceId === need.substanceId)
            .reduce((sum, offer) => sum + (offer.maxPacks ?? 1e6) * offer.packMicro, 0);
          return most >= (need.uses[0]?.amountMicro ?? 0);
        });
        const outcome = await planOrder(given.needs, given.offers, given.suppliers, options);
        const least = bruteForce({ ...given, needs: offered });
        if (outcome.status === 'no-plan') {
          expect(least).toBeNull();
          return;
        }
        solved += 1;
        expect(outcome.plan.totalMinor).toBe(least);
        expect(outcome.plan.uncovered).toHaveLength(given.needs.length - offered.length);
        for (const cover of outcome.plan.covers)
          expect(cover.boughtMicro).toBeGreaterThanOrEqual(cover.neededMicro);
        if (outcome.plan.naive !== null)
          expect(outcome.plan.naive.totalMinor).toBeGreaterThanOrEqual(outcome.plan.totalMinor);
      }),
      { numRuns: 200 },
    );
    expect(solved).toBeGreaterThan(100);
  }, 120_000);

  test('the order of the input changes nothing', async () => {
    const offers = [5, 10, 25, 50].map((size) =>
      buildOffer({
        id: `p${size}`,
        packMicro: size * 1_000_000,
        prices: [{ fromPacks: 1, priceMinor: size * 10 }],
      }),
    );
    const forward = await plan([buildNeed(65_000_000)], offers, [buildSupplier()], options);
    const backward = await plan([buildNeed(65_000_000)], [...offers].reverse(), [buildSupplier()], options);
    expect(backward).toEqual(forward);
    // Three packs are the fewest that make exactly 65 g of these sizes.
    expect(forward.lines.reduce((sum, line) => sum + line.packs, 0)).toBe(3);
  });

  test('what would expire unused does not count, what comes too late neither', async () => {
    const uses = [
      { onDay: '2026-12-10', amountMicro: 20_000_000 },
      { onDay: '2027-03-01', amountMicro: 20_000_000 },
    ];
    const short = buildOffer({
      id: 'cheap',
      packMicro: 40_000_000,
      prices: [{ fromPacks: 1, priceMinor: 100 }],
      shelfLifeDays: 30,
    });
    const long = buildOffer({
      id: 'keeps',
      packMicro: 20_000_000,
      prices: [{ fromPacks: 1, priceMinor: 400 }],
    });
    const order = await plan([buildNeed(0, { uses })], [short, long], [buildSupplier()], options);
    expect(Object.fromEntries(order.lines.map((line) => [line.offerId, line.packs]))).toEqual({
      cheap: 1,
      keeps: 1,
    });
    const slow = buildSupplier({ id: 'slow', leadDays: 30 });
    const early = await plan(
      [buildNeed(10_000_000, { uses: [{ onDay: '2026-12-10', amountMicro: 10_000_000 }] })],
      [long, buildOffer({ id: 'slow', supplierId: 'slow', prices: [{ fromPacks: 1, priceMinor: 1 }] })],
      [buildSupplier(), slow],
      options,
    );
    expect(early.lines.map((line) => line.offerId)).toEqual(['keeps']);
    const late = await plan(
      [buildNeed(10_000_000, { uses: [{ onDay: '2026-12-02', amountMicro: 10_000_000 }] })],
      [long],
      [buildSupplier()],
      options,
    );
    expect(late.covers[0]?.lateOn).toEqual(['2026-12-02']);
    const none = await plan(
      [buildNeed(10_000_000, { uses: [{ onDay: '2027-06-01', amountMicro: 10_000_000 }] })],
      [short],
      [buildSupplier()],
      options,
    );
    expect(none.uncovered[0]?.message).toContain('expire');
  });

  test('pins, forbidden offers, budget, and what nobody offers', async () => {
    const offers = [
      buildOffer({ id: 'small' }),
      buildOffer({ id: 'large', packMicro: 100_000_000, prices: [{ fromPacks: 1, priceMinor: 4900 }] }),
    ];
    const needs = [buildNeed(90_000_000)];
    const free = await plan(needs, offers, [buildSupplier()], options);
    expect(free.totalMinor).toBe(4900);
    const forbidden = await plan(needs, offers, [buildSupplier()], { ...options, forbidden: ['large'] });
    expect(forbidden.totalMinor).toBe(4 * 1800);
    const pinned = await plan(needs, offers, [buildSupplier()], {
      ...options,
      pinned: [{ offerId: 'small', packs: 1 }],
    });
    expect(pinned.totalMinor).toBe(4900 + 1800);
    const over = await planOrder(needs, offers, [buildSupplier()], { ...options, budgetMinor: 4000 });
    expect(over.status === 'over-budget' && over.overMinor).toBe(900);
    const unknown = await plan(
      [...needs, buildNeed(1, { substanceId: 'x' })],
      offers,
      [buildSupplier()],
      options,
    );
    expect(unknown.uncovered.map((missing) => missing.substanceId)).toEqual(['x']);
    expect(unknown.totalMinor).toBe(4900);
    expect(await planOrder([], offers, [buildSupplier()], options)).toMatchObject({
      status: 'planned',
      plan: { totalMinor: 0, lines: [] },
    });
  });

  test('a solver that gives up is said, not hidden', async () => {
    const answers: ProgramAnswer[] = [{ status: 'unsolved' }, { status: 'infeasible' }];
    for (const answer of answers) {
      const outcome = await planOrder(
        [buildNeed(1)],
        [buildOffer()],
        [buildSupplier()],
        options,
        async () => answer,
      );
      expect(outcome.status).toBe('no-plan');
    }
    const early = await planOrder([buildNeed(1)], [buildOffer()], [buildSupplier()], options, async () => ({
      status: 'stopped-early',
      values: [1],
      gap: 0.25,
    }));
    expect(early.status === 'planned' && early.plan.gap).toBe(0.25);
  });

  test('bad input is refused', async () => {
    const good = [[buildNeed(1)], [buildOffer()], [buildSupplier()], options] as const;
    const refused = [
      planOrder([buildNeed(1.5)], good[1], good[2], options),
      planOrder([buildNeed(0)], good[1], good[2], options),
      planOrder([buildNeed(1), buildNeed(2)], good[1], good[2], options),
      planOrder(good[0], [buildOffer({ packMicro: 0 })], good[2], options),
      planOrder(good[0], [buildOffer({ prices: [] })], good[2], options),
      planOrder(good[0], [buildOffer({ prices: [{ fromPacks: 2, priceMinor: 5 }] })], good[2], options),
      planOrder(good[0], [buildOffer({ supplierId: 'nobody' })], good[2], options),
      planOrder(good[0], good[1], [buildSupplier({ carriageMinor: -1 })], options),
      planOrder(good[0], good[1], good[2], { ...options, orderOn: 'tomorrow' }),
      planOrder(good[0], good[1], good[2], {
        ...options,
        pinned: [{ offerId: 'o', packs: 1 }],
        forbidden: ['o'],
      }),
    ];
    for (const outcome of refused) await expect(outcome).rejects.toThrow(RangeError);
  });
});
