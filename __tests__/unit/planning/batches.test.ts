import fc from 'fast-check';
import type { BatchNeed } from '@/lib/planning/batches';
import { makeWindow, planBatches, stabWindows } from '@/lib/planning/batches';
import { packIntoVessels } from '@/lib/planning/vessel-packing';

const everyDay = { isWorkingDay: () => true, fromDay: -1000, vesselsMl: [100, 250, 500, 1000, 2000] };
const noWeekend = { ...everyDay, isWorkingDay: (day: number) => (((day + 3) % 7) + 7) % 7 < 5 };

function buildNeed(given: Partial<BatchNeed> = {}): BatchNeed {
  return {
    id: 'n',
    solutionId: 's',
    volumeMl: 100,
    neededOnDay: 100,
    shelfLifeDays: 7,
    leadDays: 1,
    ...given,
  };
}
const anyNeed = fc.record({
  solutionId: fc.constantFrom('a', 'b'),
  volumeMl: fc.integer({ min: 1, max: 3000 }),
  neededOnDay: fc.integer({ min: 10, max: 24 }),
  shelfLifeDays: fc.integer({ min: 0, max: 8 }),
  leadDays: fc.integer({ min: 0, max: 3 }),
});
const anyNeeds = fc
  .array(anyNeed, { minLength: 1, maxLength: 7 })
  .map((needs) => needs.map((need, i) => ({ ...need, id: `n${i}` })));

/** Fewest days that hit every window, by trying every set of days. */
function bruteForce(windows: readonly { earliestDay: number; latestDay: number }[]): number {
  const days = [
    ...new Set(
      windows.flatMap((window) =>
        Array.from({ length: window.latestDay - window.earliestDay + 1 }, (_, i) => window.earliestDay + i),
      ),
    ),
  ];
  let best = windows.length;
  const search = (start: number, chosen: readonly number[]) => {
    if (chosen.length >= best) return;
    if (
      windows.every((window) => chosen.some((day) => day >= window.earliestDay && day <= window.latestDay))
    ) {
      best = chosen.length;
      return;
    }
    for (let i = start; i < days.length; i += 1) search(i + 1, [...chosen, days[i] as number]);
  };
  search(0, []);
  return best;
}

describe('fewest batches', () => {
  test.each([
    ['every day', everyDay],
    ['weekdays', noWeekend],
  ] as const)(
    '%s: every need covered once, inside its window, with no more days than brute force finds',
    (_, options) => {
      fc.assert(
        fc.property(anyNeeds, (needs) => {
          const plan = planBatches(needs, options);
          const windows = new Map(needs.map((need) => [need.id, makeWindow(need, options)]));
          const planned = plan.batches.flatMap((batch) => batch.needIds);
          const impossible = plan.impossible.map(({ needId }) => needId);
          expect([...planned, ...impossible].sort()).toEqual(needs.map((need) => need.id).sort());
          for (const batch of plan.batches) {
            expect(options.isWorkingDay(batch.makeOnDay)).toBe(true);
            for (const id of batch.needIds) {
              const need = needs.find((candidate) => candidate.id === id);
              const window = windows.get(id);
              expect(need?.solutionId).toBe(batch.solutionId);
              expect(
                window !== null &&
                  window !== undefined &&
                  batch.makeOnDay >= window.earliestDay &&
                  batch.makeOnDay <= window.latestDay,
              ).toBe(true);
              expect(batch.makeOnDay).toBeLessThanOrEqual((need?.neededOnDay ?? 0) - (need?.leadDays ?? 0));
              expect(batch.makeOnDay).toBeGreaterThanOrEqual(
                (need?.neededOnDay ?? 0) - (need?.shelfLifeDays ?? 0),
              );
            }
            expect(batch.packing.madeMl).toBeGreaterThanOrEqual(batch.volumeMl - 1e-9);
          }
          for (const solutionId of ['a', 'b']) {
            const own = needs
              .filter((need) => need.solutionId === solutionId)
              .map((need) => windows.get(need.id))
              .filter((window) => window !== null && window !== undefined);
            expect(plan.batches.filter((batch) => batch.solutionId === solutionId)).toHaveLength(
              bruteForce(own),
            );
          }
          expect(plan.saved).toBe(planned.length - plan.batches.length);
        }),
        { numRuns: 300 },
      );
    },
  );

  test('a batch may be moved anywhere in its window', () => {
    const needs = [buildNeed({ id: 'x' }), buildNeed({ id: 'y', neededOnDay: 103 })];
    const [batch] = planBatches(needs, everyDay).batches;
    expect(batch?.window).toEqual({ earliestDay: 96, latestDay: 99 });
    expect(batch?.makeOnDay).toBe(99);
  });

  test('what can not be made in time says why', () => {
    const plan = planBatches(
      [buildNeed({ id: 'late', neededOnDay: 5 }), buildNeed({ id: 'short', shelfLifeDays: 0, leadDays: 2 })],
      { ...everyDay, fromDay: 10 },
    );
    expect(plan.batches).toEqual([]);
    expect(plan.impossible.map(({ needId }) => needId)).toEqual(['late', 'short']);
    expect(plan.impossible[1]?.message).toContain('keeps only 0');
  });

  test('no windows, no days', () => {
    expect(stabWindows([])).toEqual([]);
  });

  test('impossible figures are refused', () => {
    for (const bad of [
      { volumeMl: 0 },
      { volumeMl: Number.NaN },
      { shelfLifeDays: -1 },
      { leadDays: 0.5 },
      { neededOnDay: 1.5 },
    ]) {
      expect(() => planBatches([buildNeed(bad)], everyDay)).toThrow(RangeError);
    }
    expect(() => planBatches([buildNeed()], { ...everyDay, vesselsMl: [] })).toThrow(RangeError);
  });
});

describe('packing into vessels', () => {
  test('fewest fillings, least surplus, against every combination', () => {
    fc.assert(
      fc.property(
        fc.uniqueArray(fc.constantFrom(50, 100, 200, 250, 500, 600), { minLength: 1, maxLength: 4 }),
        fc.integer({ min: 1, max: 1500 }),
        (sizes, volumeMl) => {
          const packing = packIntoVessels(volumeMl, sizes);
          fc.pre(packing.fills.length <= 4);
          let sums = [0];
          let fewest = 0;
          while (!sums.some((sum) => sum >= volumeMl)) {
            sums = [...new Set(sums.flatMap((sum) => sizes.map((size) => sum + size)))];
            fewest += 1;
          }
          expect(packing.fills).toHaveLength(fewest);
          expect(packing.madeMl).toBe(Math.min(...sums.filter((sum) => sum >= volumeMl)));
          expect(packing.fills.reduce((sum, fill) => sum + fill.vesselMl, 0)).toBe(packing.madeMl);
        },
      ),
    );
  });

  test('many fillings still hold the volume', () => {
    const packing = packIntoVessels(50_300, [1000, 2000]);
    expect(packing.fills).toHaveLength(26);
    expect(packing.surplusMl).toBeCloseTo(700, 9);
    expect(() => packIntoVessels(10, [0])).toThrow(RangeError);
  });
});
