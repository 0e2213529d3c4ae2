import fc from 'fast-check';
import type { StockLot } from '@/lib/planning/lots';
import { chooseLots } from '@/lib/planning/lots';

function buildLot(given: Partial<StockLot> = {}): StockLot {
  return {
    id: 'a',
    code: 'L-1',
    unit: 'g',
    balanceMicro: 1000,
    expiresOn: null,
    receivedOn: '2026-01-01',
    held: false,
    ...given,
  };
}
const options = { onDay: '2026-12-03', unit: 'g' as const };
const anyLot = fc.record({
  id: fc.uuid(),
  code: fc.stringMatching(/^L-\d{4}$/),
  unit: fc.constantFrom('g' as const, 'mL' as const),
  balanceMicro: fc.integer({ min: 0, max: 5_000_000_000 }),
  expiresOn: fc.option(fc.constantFrom('2026-11-30', '2026-12-03', '2027-01-01', '2027-06-30')),
  receivedOn: fc.constantFrom('2026-01-01', '2026-05-05'),
  held: fc.boolean(),
});

describe('lots, first expiring first', () => {
  test('the soonest to expire is used first, one that never expires last', () => {
    const lots = [
      buildLot({ id: 'never' }),
      buildLot({ id: 'late', expiresOn: '2027-05-01' }),
      buildLot({ id: 'soon', expiresOn: '2026-12-24' }),
    ];
    const choice = chooseLots(lots, 2500, options);
    expect(choice.takes.map((take) => [take.lot.id, take.amountMicro])).toEqual([
      ['soon', 1000],
      ['late', 1000],
      ['never', 500],
    ]);
    expect(choice.shortMicro).toBe(0);
  });

  test('a lot may be used on its last day, not after', () => {
    const lots = [buildLot({ expiresOn: '2026-12-03' })];
    expect(chooseLots(lots, 10, options).takes).toHaveLength(1);
    expect(chooseLots(lots, 10, { ...options, onDay: '2026-12-04' }).passedOver[0]?.reason).toBe('expired');
  });

  test('in whole millionths: taken and short add up to the need, none overdrawn, none of the unusable touched', () => {
    fc.assert(
      fc.property(
        fc.array(anyLot, { maxLength: 8 }),
        fc.integer({ min: 1, max: 20_000_000_000 }),
        (lots, need) => {
          const choice = chooseLots(lots, need, options);
          const taken = choice.takes.reduce((sum, take) => sum + take.amountMicro, 0);
          expect(taken + choice.shortMicro).toBe(need);
          for (const { lot, amountMicro } of choice.takes) {
            expect(Number.isInteger(amountMicro) && amountMicro > 0 && amountMicro <= lot.balanceMicro).toBe(
              true,
            );
            expect(
              lot.held || lot.unit !== 'g' || (lot.expiresOn !== null && lot.expiresOn < options.onDay),
            ).toBe(false);
          }
          const usable = lots.filter(
            (lot) =>
              !lot.held && lot.unit === 'g' && (lot.expiresOn === null || lot.expiresOn >= options.onDay),
          );
          expect(choice.shortMicro).toBe(
            Math.max(0, need - usable.reduce((sum, lot) => sum + lot.balanceMicro, 0)),
          );
          for (const { lot, reason } of choice.passedOver)
            if (reason === 'empty') expect(lot.balanceMicro).toBe(0);
        },
      ),
    );
  });

  test('no part is smaller than can be weighed, if it can be helped', () => {
    const lots = [
      buildLot({ id: 'soon', expiresOn: '2026-12-24', balanceMicro: 990 }),
      buildLot({ id: 'late' }),
    ];
    const choice = chooseLots(lots, 1000, { ...options, minimumTakeMicro: 100 });
    expect(choice.takes.map((take) => take.amountMicro)).toEqual([900, 100]);
    const scrap = chooseLots([buildLot({ balanceMicro: 40 }), buildLot({ id: 'b', code: 'L-2' })], 500, {
      ...options,
      minimumTakeMicro: 100,
    });
    expect(scrap.passedOver[0]?.reason).toBe('too-little-left');
  });

  test('lots of unlike worth cover the need in worth', () => {
    const lots = [
      buildLot({ id: 'weak', expiresOn: '2027-01-01' }),
      buildLot({ id: 'full', balanceMicro: 5000 }),
    ];
    const choice = chooseLots(lots, 2000, { ...options, worth: (lot) => (lot.id === 'weak' ? 0.5 : 1) });
    expect(choice.takes.map((take) => take.amountMicro)).toEqual([1000, 1500]);
  });

  test('bad amounts are refused', () => {
    for (const need of [0, -1, 1.5, Number.NaN])
      expect(() => chooseLots([], need, options)).toThrow(RangeError);
    expect(() => chooseLots([buildLot({ balanceMicro: -1 })], 1, options)).toThrow(RangeError);
  });
});
