import fc from 'fast-check';
import type { PlannedUse, SubstancePolicy, Supply } from '@/lib/planning/shortages';
import { findShortages } from '@/lib/planning/shortages';

const today = '2026-12-01';
const use = (onDay: string, amountMicro: number): PlannedUse => ({
  substanceId: 's',
  unit: 'g',
  amountMicro,
  onDay,
  reason: onDay,
});
const supply = (amountMicro: number, availableOn: string, expiresOn: string | null): Supply => ({
  substanceId: 's',
  unit: 'g',
  amountMicro,
  availableOn,
  expiresOn,
  kind: 'stock',
});
const policy = (safetyStockMicro: number, leadDays: number): SubstancePolicy => ({
  substanceId: 's',
  unit: 'g',
  safetyStockMicro,
  leadDays,
});

describe('shortages', () => {
  test('what planned use leaves short, with the day by which to order', () => {
    const plan = findShortages(
      [use('2026-12-10', 60), use('2026-12-20', 60)],
      [supply(100, today, null)],
      [policy(0, 5)],
      today,
    );
    expect(plan.shortages).toHaveLength(1);
    expect(plan.shortages[0]).toMatchObject({
      kind: 'planned-use',
      shortMicro: 20,
      neededOn: '2026-12-20',
      orderBy: '2026-12-15',
      isLate: false,
    });
  });

  test('an order on its way counts from its day, an expired lot not at all, a late order-by is said', () => {
    const onOrder: Supply = { ...supply(50, '2026-12-12', null), kind: 'on-order' };
    const plan = findShortages(
      [use('2026-12-10', 30), use('2026-12-14', 30)],
      [supply(100, today, '2026-12-05'), onOrder],
      [policy(0, 20)],
      today,
    );
    expect(plan.shortages[0]).toMatchObject({
      shortMicro: 30,
      neededOn: '2026-12-10',
      orderBy: '2026-11-20',
      isLate: true,
    });
    expect(plan.shortages[0]?.uses).toEqual([{ onDay: '2026-12-10', amountMicro: 30, reason: '2026-12-10' }]);
    const days = plan.timelines[0]?.days ?? [];
    expect(days.find((day) => day.onDay === '2026-12-10')).toMatchObject({
      expiredMicro: 100,
      shortMicro: 30,
      balanceMicro: 0,
    });
    expect(days.find((day) => day.onDay === '2026-12-12')).toMatchObject({
      arrivedMicro: 50,
      balanceMicro: 50,
    });
  });

  test('a balance below the reserve is a shortage of its own', () => {
    const plan = findShortages([use('2026-12-10', 60)], [supply(100, today, null)], [policy(50, 3)], today);
    expect(plan.shortages).toEqual([
      {
        substanceId: 's',
        unit: 'g',
        kind: 'safety-stock',
        shortMicro: 10,
        neededOn: '2026-12-10',
        orderBy: '2026-12-07',
        isLate: false,
        uses: [{ onDay: '2026-12-10', amountMicro: 10, reason: 'reserve' }],
      },
    ]);
    expect(findShortages([], [], [policy(5, 1)], today).shortages).toHaveLength(1);
  });

  test('soonest-expiring first meets as much as the best order of use could', () => {
    const dayOf = (n: number) => `2026-12-${String(n).padStart(2, '0')}`;
    const parcels = fc.array(
      fc.tuple(
        fc.integer({ min: 1, max: 4 }),
        fc.integer({ min: 2, max: 9 }),
        fc.integer({ min: 0, max: 6 }),
      ),
      { maxLength: 4 },
    );
    const wants = fc.array(fc.tuple(fc.integer({ min: 2, max: 14 }), fc.integer({ min: 1, max: 4 })), {
      minLength: 1,
      maxLength: 4,
    });
    /** Most that can be met, by trying every parcel for every single unit. */
    const most = (left: number[], from: number[], to: number[], units: number[]): number => {
      const [day, ...rest] = units;
      if (day === undefined) return 0;
      let best = most(left, from, to, rest);
      left.forEach((amount, i) => {
        if (amount > 0 && (from[i] ?? 99) <= day && day <= (to[i] ?? 0)) {
          best = Math.max(best, 1 + most(left.with(i, amount - 1), from, to, rest));
        }
      });
      return best;
    };
    fc.assert(
      fc.property(parcels, wants, (given, wanted) => {
        const units = wanted
          .flatMap(([day, amount]) => Array.from({ length: amount }, () => day))
          .sort((a, b) => a - b);
        fc.pre(units.length <= 7);
        const from = given.map(([, available]) => available);
        const to = given.map(([, available, life]) => available + life);
        const supplies = given.map(([amount], i) => supply(amount, dayOf(from[i] ?? 1), dayOf(to[i] ?? 1)));
        const plan = findShortages(
          wanted.map(([day, amount]) => use(dayOf(day), amount)),
          supplies,
          [],
          today,
        );
        const short = plan.shortages.reduce((sum, shortage) => sum + shortage.shortMicro, 0);
        expect(units.length - short).toBe(
          most(
            given.map(([amount]) => amount),
            from,
            to,
            units,
          ),
        );
      }),
      { numRuns: 100 },
    );
  });

  test('bad amounts and days are refused', () => {
    expect(() => findShortages([use('2026-11-30', 1)], [], [], today)).toThrow(RangeError);
    expect(() => findShortages([use('2026-12-32', 1)], [], [], today)).toThrow(RangeError);
    expect(() => findShortages([use('2026-12-05', 1.5)], [], [], today)).toThrow(RangeError);
    expect(() => findShortages([use('2026-12-05', 0)], [], [], today)).toThrow(RangeError);
    expect(() => findShortages([], [supply(-1, today, null)], [], today)).toThrow(RangeError);
  });
});
