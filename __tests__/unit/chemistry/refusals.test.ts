import { pourMix } from '@/lib/chemistry/mixing';
import { speciate } from '@/lib/chemistry/speciation';
import { solveEquilibrium } from '@/lib/chemistry/solver/solve';
import type { Reaction, SpeciationInput } from '@/lib/chemistry/types';
import { complex, litre, molarity, solved, WATER } from './kit';

const dicyano = complex('Ag(CN)2-', { 'Ag+': 1, 'CN-': 2 }, 1e20);

describe('speciate refuses', () => {
  const cases: readonly (readonly [what: string, change: Partial<SpeciationInput>])[] = [
    ['a volume of zero', { volumeL: 0 }],
    ['a negative volume', { volumeL: -1 }],
    ['a volume that is no number', { volumeL: NaN }],
    ['an endless volume', { volumeL: Infinity }],
    ['a negative amount', { amounts: { 'Na+': -0.1 } }],
    ['an amount that is no number', { amounts: { 'Na+': NaN } }],
    ['an endless amount of H+', { amounts: { 'H+': -Infinity } }],
    ['a component the catalogue does not know', { amounts: { 'Qq+': 0.1 } }],
    ['a species that is no component of the catalogue', { amounts: { 'OH-': 0.1 } }],
    ['water as an amount of the catalogue', { amounts: { H2O: 55 } }],
    ['a pH that is no number', { pH: NaN }],
    ['a temperature beyond the tables', { temperatureC: 100 }],
    ['a temperature that is no number', { temperatureC: NaN }],
    ['a constant that is no number', { reactions: [{ ...dicyano, logK: NaN }] }],
    ['a constant beyond all numbers', { reactions: [{ ...dicyano, logK: 301 }] }],
    ['a coefficient that is no number', { reactions: [{ ...dicyano, stoich: { 'Ag+': NaN } }] }],
    ['a species formed twice', { reactions: [dicyano, dicyano] }],
    ['a species that is a component too', { reactions: [dicyano, complex('Ag+', { 'CN-': 1 }, 10)] }],
    ['a headspace of no volume', { headspace: { kind: 'sealed', volumeL: 0 } }],
    ['a gas held at no pressure', { headspace: { kind: 'open', partialPressuresBar: { CO2: 0 } } }],
    ['a gas that nothing forms', { headspace: { kind: 'open', partialPressuresBar: { Kr: 0.1 } } }],
  ];

  it.each(cases)('%s', (_, change) => {
    expect(() => speciate(litre(change))).toThrow(RangeError);
  });
});

describe('speciate never gives a wrong number', () => {
  it('says so where no amounts can make up the totals', () => {
    const outcome = speciate(litre({ amounts: { 'H+': -0.1, 'Na+': 0.1 }, reactions: [] }));
    expect(outcome).toMatchObject({ converged: false, reason: 'infeasible' });
    expect(outcome.converged ? [] : outcome.residuals).toContainEqual({
      component: 'H+',
      total: -0.1,
      relativeResidual: 1,
    });
  });

  it('keeps its digits up to the largest constant it takes', () => {
    const reactions = ['a', 'b'].map((id): Reaction => ({
      species: `L2${id}`,
      phase: 'aq',
      stoich: { L: 1, [id]: 2 },
      logK: 300,
    }));
    const state = solved(litre({ amounts: { L: 0.1, a: 0.05, b: 0.05 }, reactions }));
    const free = Math.sqrt(0.025 / 0.05) * 1e-150;
    expect(molarity(state, 'a') / free).toBeCloseTo(1, 10);
    expect(molarity(state, 'b') / free).toBeCloseTo(1, 10);
  });

  it('the solver refuses totals that are no numbers', () => {
    const problem = {
      componentCount: 1,
      soluteCount: 1,
      phaseCount: 0,
      stoich: Float64Array.of(1),
      lnK: Float64Array.of(0),
      totals: Float64Array.of(NaN),
      isReservoir: [],
      activity: null,
    };
    expect(() => solveEquilibrium(problem)).toThrow(RangeError);
  });
});

describe('pourMix refuses', () => {
  const water = { label: 'water', solutes: [], volumeMl: 10 };
  it.each([
    ['nothing to pour', []],
    ['a volume of zero', [{ ...water, volumeMl: 0 }]],
    ['a volume that is no number', [{ ...water, volumeMl: NaN }]],
    [
      'a substance that is not in the catalogue',
      [{ ...water, solutes: [{ substance: '1-1-1', molarity: 1 }] }],
    ],
  ])('%s', (_, portions) => {
    expect(() => pourMix({ portions, activity: 'davies', temperatureC: 25 })).toThrow(RangeError);
  });
});

describe('what a list of reactions means', () => {
  it('leaves water alone where nothing names H+', () => {
    const state = solved(litre({ amounts: { 'Ag+': 0.01, 'CN-': 0.03, 'Na+': 0.02 }, reactions: [dicyano] }));
    expect(state.pH).toBeNull();
    expect(state.species.map(({ id }) => id).sort()).toEqual(['Ag(CN)2-', 'Ag+', 'CN-', 'Na+']);
    expect(molarity(state, 'Na+')).toBeCloseTo(0.02, 15);
  });

  it('takes water in a reaction as having activity 1', () => {
    const withWater: Reaction = { ...WATER, stoich: { H2O: 1, 'H+': -1 } };
    const amounts = { 'H+': -0.01, 'Na+': 0.01 };
    expect(solved(litre({ amounts, reactions: [withWater] })).pH).toBeCloseTo(12, 10);
    expect(solved(litre({ amounts: { ...amounts, H2O: 55 }, reactions: [withWater] })).pH).toBeCloseTo(
      12,
      10,
    );
  });

  it('holds the pH, whatever acid that takes', () => {
    const state = solved(
      litre({
        amounts: { 'CN-': 0.1 },
        reactions: [complex('HCN', { 'H+': 1, 'CN-': 1 }, 10 ** 9.21), WATER],
        pH: 9.21,
      }),
    );
    expect(state.pH).toBeCloseTo(9.21, 12);
    expect(molarity(state, 'HCN') / molarity(state, 'CN-')).toBeCloseTo(1, 9);
  });

  it('leaves suppressed species out', () => {
    const state = solved(
      litre({ amounts: { 'Ag+': 0.01, 'CN-': 0.03 }, reactions: [dicyano], suppress: ['Ag(CN)2-'] }),
    );
    expect(molarity(state, 'Ag+')).toBeCloseTo(0.01, 14);
  });

  it('knows a component of amount zero to be absent', () => {
    const state = solved(litre({ amounts: { 'Ag+': 0, 'CN-': 0.1 }, reactions: [dicyano] }));
    expect(state.species.map(({ id }) => id)).toEqual(['CN-']);
  });
});

describe('gases', () => {
  const gas: Reaction = { species: 'X(g)', phase: 'g', stoich: { X: 1 }, logK: 0.5 };

  it('with no headspace only report the pressure they would have', () => {
    const state = solved(litre({ amounts: { X: 0.02 }, reactions: [gas] }));
    expect(state.gases).toEqual([
      { id: 'X(g)', partialPressureBar: expect.closeTo(0.02 * 10 ** 0.5, 12) as number, moles: 0 },
    ]);
  });

  it('share a sealed vessel by the gas law', () => {
    const state = solved(
      litre({ amounts: { X: 0.02 }, reactions: [gas], headspace: { kind: 'sealed', volumeL: 2 } }),
    );
    const [{ partialPressureBar = NaN, moles = NaN } = {}] = state.gases;
    expect(moles).toBeCloseTo((partialPressureBar * 1e5 * 0.002) / (8.314462618 * 298.15), 12);
    expect(moles + molarity(state, 'X')).toBeCloseTo(0.02, 14);
    expect(partialPressureBar / molarity(state, 'X')).toBeCloseTo(10 ** 0.5, 10);
  });

  it('in an open vessel hold their pressure and give what that takes', () => {
    const state = solved(
      litre({
        amounts: { X: 0.02 },
        reactions: [gas],
        headspace: { kind: 'open', partialPressuresBar: { X: 0.3 } },
      }),
    );
    expect(molarity(state, 'X')).toBeCloseTo(0.3 / 10 ** 0.5, 12);
    expect(state.gases[0]?.partialPressureBar).toBeCloseTo(0.3, 12);
  });

  it('carbon dioxide of the air brings pure water to pH 5.6', () => {
    const state = solved(
      litre({ activity: 'davies', headspace: { kind: 'open', partialPressuresBar: { CO2: 4.2e-4 } } }),
    );
    expect(state.pH).toBeGreaterThan(5.55);
    expect(state.pH).toBeLessThan(5.65);
  });
});

describe('temperature', () => {
  it('moves the neutral point with the table of pKw (Lange, Table 8.5)', () => {
    expect((solved(litre({ temperatureC: 40 })).pH ?? NaN) * 2).toBeCloseTo(13.542, 2);
    expect((solved(litre({ temperatureC: 10 })).pH ?? NaN) * 2).toBeCloseTo(14.528, 2);
  });

  it('says which constants were moved', () => {
    const { notes } = solved(litre({ amounts: { NH3: 0.1 }, temperatureC: 35 }));
    expect(notes.find(({ code }) => code === 'constants-moved')?.message).toContain('NH4+');
  });
});
