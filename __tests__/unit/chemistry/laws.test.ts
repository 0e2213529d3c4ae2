import fc from 'fast-check';
import type { EquilibriumState, Reaction, SpeciationInput } from '@/lib/chemistry/types';
import { findSpecies } from '@/lib/chemistry/species-catalogue';
import { pourMix } from '@/lib/chemistry/mixing';
import type { Mix, Portion } from '@/lib/chemistry/types';
import { benchMixture, strainedSystem, SystemSource } from '@/scripts/bench/random-systems';
import { complex, litre, molarity, solved } from './kit';

const SEED = 20_261_201;
const strained = fc.integer({ min: 0, max: 2 ** 31 }).map((seed) => strainedSystem(new SystemSource(seed)));
const bench = fc.integer({ min: 0, max: 2 ** 31 }).map((seed) => benchMixture(new SystemSource(seed)));
const run = { seed: SEED, numRuns: 60 };

function listOf(input: SpeciationInput): readonly Reaction[] {
  if (input.reactions === 'catalogue') throw new TypeError('A list was expected');
  return input.reactions;
}

/** Every concentration of the first is that of the second, to a relative tolerance. */
function expectSame(first: EquilibriumState, second: EquilibriumState, relative: number, factor = 1): void {
  const ofSecond = new Map(second.species.map(({ id, molarity: c }) => [id, c]));
  const apart = first.species.filter(({ id, molarity: c }) => {
    const other = (ofSecond.get(id) ?? NaN) * factor;
    return !(Math.abs(c - other) <= relative * Math.abs(other) + 1e-300);
  });
  expect(apart).toEqual([]);
}

describe('laws of equilibrium', () => {
  it('scaling every amount and the volume alike changes no concentration', () => {
    fc.assert(
      fc.property(strained, fc.constantFrom(2 ** -10, 0.25, 8, 1024), (input, times) => {
        const amounts = Object.fromEntries(
          Object.entries(input.amounts).map(([id, mol]) => [id, mol * times]),
        );
        expectSame(solved({ ...input, amounts, volumeL: input.volumeL * times }), solved(input), 1e-7);
      }),
      run,
    );
  });

  it('the order of components and reactions changes nothing', () => {
    fc.assert(
      fc.property(strained, (input) => {
        const amounts = Object.fromEntries(Object.entries(input.amounts).reverse());
        expectSame(
          solved({ ...input, amounts, reactions: [...listOf(input)].reverse() }),
          solved(input),
          1e-8,
        );
      }),
      run,
    );
  });

  it('a species with K of 1e-100 changes nothing', () => {
    fc.assert(
      fc.property(strained, (input) => {
        const [first = 'Ma+1', second = 'Lp'] = Object.keys(input.amounts);
        const faint: Reaction = {
          species: 'faint',
          phase: 'aq',
          stoich: { [first]: 1, [second]: 1 },
          logK: -100,
        };
        expectSame(solved(input), solved({ ...input, reactions: [...listOf(input), faint] }), 1e-9);
      }),
      run,
    );
  });

  it('more ligand never lowers the complexed share of the metal', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0.2, max: 9, noNaN: true }), { minLength: 1, maxLength: 6 }),
        fc.double({ min: 1e-6, max: 1, noNaN: true }),
        fc.double({ min: 1e-6, max: 4, noNaN: true }),
        fc.double({ min: 1.001, max: 5, noNaN: true }),
        (stepwise, metal, ligand, times) => {
          let logK = 0;
          const reactions = stepwise.map((step, index): Reaction => {
            logK += step;
            return { species: `ML${index + 1}`, phase: 'aq', stoich: { M: 1, L: index + 1 }, logK };
          });
          const free = (amount: number) =>
            molarity(solved(litre({ amounts: { M: metal, L: amount }, reactions })), 'M');
          expect(free(ligand * times)).toBeLessThanOrEqual(free(ligand) * (1 + 1e-12));
        },
      ),
      run,
    );
  });

  it('every balance closes to the last digits, and no solid is left supersaturated', () => {
    fc.assert(
      fc.property(fc.oneof(strained, bench), (input) => {
        const state = solved(input);
        for (const { relativeResidual } of state.balances) expect(relativeResidual).toBeLessThan(1e-12);
        for (const { moles, saturationIndex } of state.solids) {
          expect(moles).toBeGreaterThanOrEqual(0);
          expect(saturationIndex).toBeLessThanOrEqual(1e-8);
          if (moles > 0) expect(Math.abs(saturationIndex)).toBeLessThanOrEqual(1e-8);
        }
      }),
      run,
    );
  });

  it('mass action holds for every species of a catalogue mixture', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-4, max: 0.2, noNaN: true }),
        fc.double({ min: 1e-4, max: 1, noNaN: true }),
        (copper, ammonia) => {
          const state = solved(
            litre({ amounts: { 'Cu+2': copper, 'SO4-2': copper, NH3: ammonia }, activity: 'davies' }),
          );
          const activity = (id: string) =>
            state.species.find((species) => species.id === id)?.activity ?? NaN;
          expect(Math.log10(activity('NH4+') / (activity('NH3') * activity('H+')))).toBeCloseTo(9.244, 6);
          expect(Math.log10(activity('OH-') * activity('H+'))).toBeCloseTo(-13.997, 9);
        },
      ),
      run,
    );
  });

  it('charge is conserved in mixtures of neutral substances', () => {
    fc.assert(
      fc.property(bench, (input) => {
        const state = solved(input);
        const largest = Math.max(
          ...state.species.map(({ id, molarity: c }) => Math.abs(findSpecies(id)?.charge ?? NaN) * c),
        );
        const fromSolids = state.solids.reduce(
          (sum, { id, moles }) => sum + moles * (findSpecies(id)?.charge ?? NaN),
          0,
        );
        expect(Math.abs(state.chargeImbalance + fromSolids)).toBeLessThan(1e-11 * Math.max(largest, 1));
      }),
      run,
    );
  });
});

describe('laws of mixing', () => {
  const copper = { substance: '7758-99-8', molarity: 0.05 };
  const ammonia = { substance: '1336-21-6', molarity: 1 };
  const pour = (portions: readonly Portion[]) =>
    pourMix({ portions, activity: 'davies', temperatureC: 25 }) as Mix;

  it('splitting a portion in two changes nothing', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 90, noNaN: true }),
        fc.double({ min: 0.01, max: 0.99, noNaN: true }),
        (volumeMl, share) => {
          const whole = pour([
            { label: 'copper', solutes: [copper], volumeMl: 50 },
            { label: 'ammonia', solutes: [ammonia], volumeMl },
          ]);
          const split = pour([
            { label: 'copper', solutes: [copper], volumeMl: 50 },
            { label: 'ammonia', solutes: [ammonia], volumeMl: volumeMl * share },
            { label: 'the rest', solutes: [ammonia], volumeMl: volumeMl * (1 - share) },
          ]);
          expectSame(split.equilibrium, whole.equilibrium, 1e-7);
        },
      ),
      run,
    );
  });

  it('scaling all volumes changes no concentration', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 100, noNaN: true }), (times) => {
        const portions = [
          { label: 'copper', solutes: [copper], volumeMl: 50 },
          { label: 'ammonia', solutes: [ammonia], volumeMl: 20 },
        ];
        const scaled = pour(portions.map((portion) => ({ ...portion, volumeMl: portion.volumeMl * times })));
        expectSame(scaled.equilibrium, pour(portions).equilibrium, 1e-7);
      }),
      run,
    );
  });

  it('the end does not depend on the order of pouring, but the path does', () => {
    const there = pour([
      { label: 'copper', solutes: [copper], volumeMl: 50 },
      { label: 'ammonia', solutes: [ammonia], volumeMl: 20 },
    ]);
    const back = pour([
      { label: 'ammonia', solutes: [ammonia], volumeMl: 20 },
      { label: 'copper', solutes: [copper], volumeMl: 50 },
    ]);
    expectSame(there.equilibrium, back.equilibrium, 1e-9);
    expect(there.steps[0]?.equilibrium.pH).not.toBeCloseTo(back.steps[0]?.equilibrium.pH ?? NaN, 1);
  });

  it('adds water as dilution alone', () => {
    const [first, last] = pour([
      { label: 'salt', solutes: [{ substance: '7647-14-5', molarity: 0.1 }], volumeMl: 50 },
      { label: 'water', solutes: [], volumeMl: 50 },
    ]).steps;
    expect(
      molarity(last?.equilibrium ?? solved(litre()), 'Na+') /
        molarity(first?.equilibrium ?? solved(litre()), 'Na+'),
    ).toBeCloseTo(0.5, 12);
  });
});

describe('a metal that is used up', () => {
  it.each([1, 2, 3, 4, 5, 6])(
    'with exactly %d ligands each and K = 1e60 leaves the root of its closed form',
    (count) => {
      const metal = 2 ** -6;
      const state = solved(
        litre({
          amounts: { M: metal, L: count * metal },
          reactions: [complex('MLn', { M: 1, L: count }, 1e60)],
        }),
      );
      const free = (metal / (count ** count * 1e60)) ** (1 / (count + 1));
      expect(Math.abs(molarity(state, 'M') / free - 1)).toBeLessThan(1e-8);
    },
  );
});
