import { lnGamma } from '@/lib/chemistry/activity';
import { speciate } from '@/lib/chemistry/speciation';
import { findSpecies } from '@/lib/chemistry/species-catalogue';
import type { ActivityModel, EquilibriumState, Reaction, SpeciationInput } from '@/lib/chemistry/types';
import coefficients from './published/mean-activity-coefficients.json';
import standards from './published/ph-standards.json';

type Modelled = Exclude<ActivityModel, 'ideal'>;
const MODELS: readonly Modelled[] = ['davies', 'extended-debye-huckel'];

function solved(input: SpeciationInput): EquilibriumState {
  const outcome = speciate(input);
  if (!outcome.converged) throw new Error(outcome.message);
  return outcome;
}

function standard(row: (typeof standards.rows)[number], activity: ActivityModel): EquilibriumState {
  return solved({
    volumeL: 1,
    amounts: row.amounts as unknown as Record<string, number>,
    reactions: row.reactions as unknown as Reaction[],
    pH: null,
    suppress: [],
    activity,
    temperatureC: 25,
    headspace: { kind: 'none' },
  });
}

describe('pH standards', () => {
  const cases = standards.rows.flatMap((row) =>
    MODELS.map((model) => ({ name: row.composition, model, row })),
  );

  it.each(cases)('$name: $model meets the standard within what the model leaves open', ({ row, model }) => {
    const { pH } = standard(row, model);
    expect(Math.abs((pH ?? NaN) - row.standardPh)).toBeLessThanOrEqual(row.allowed[model]);
  });

  /** The independent one leaves neutral species at γ = 1; ours moves them by 0.1 I in log γ, and the pH by no more. */
  it.each(standards.rows)('$composition: ideal and Davies agree with an independent evaluation', (row) => {
    expect(Math.abs((standard(row, 'ideal').pH ?? NaN) - row.modelled.ideal)).toBeLessThanOrEqual(5e-4);
    const davies = standard(row, 'davies');
    expect(Math.abs((davies.pH ?? NaN) - row.modelled.davies)).toBeLessThanOrEqual(
      5e-4 + 0.1 * davies.ionicStrength,
    );
  });

  it('says what leaving activities out costs: more than 0.15 of a pH unit in most standards', () => {
    const misses = standards.rows.map((row) => Math.abs((standard(row, 'ideal').pH ?? NaN) - row.standardPh));
    expect(misses.filter((miss) => miss > 0.15).length).toBeGreaterThan(standards.rows.length / 2);
  });
});

describe('mean activity coefficients', () => {
  /** Kielland gives sodium 4 to 4.5 Å: the catalogue has the upper end, the independent evaluation the lower. */
  const INDEPENDENT_SIZES_PM: Readonly<Record<string, number>> = { 'Na+': 400 };

  /** ln γ± of a salt is the mean over its ions. */
  function meanGamma(
    ions: readonly string[],
    molality: number,
    model: Modelled,
    sizesPm: Readonly<Record<string, number>> = {},
  ): number {
    const charges = ions.map((id) => findSpecies(id)?.charge ?? NaN);
    const strength = charges.reduce((sum, z) => sum + (molality * z * z) / 2, 0);
    const logs = ions.map((id, index) =>
      lnGamma(model, charges[index] ?? NaN, sizesPm[id] ?? findSpecies(id)?.ionSizePm ?? null, strength, 25),
    );
    return Math.exp(logs.reduce((sum, ln) => sum + ln, 0) / ions.length);
  }

  it.each(coefficients.rows)(
    '$salt at $molality mol/kg: both equations agree with an independent evaluation',
    (row) => {
      expect(Math.abs(meanGamma(row.ions, row.molality, 'davies') - row.davies)).toBeLessThanOrEqual(1e-4);
      const extended = meanGamma(row.ions, row.molality, 'extended-debye-huckel', INDEPENDENT_SIZES_PM);
      expect(Math.abs(extended - row['extended-debye-huckel'])).toBeLessThanOrEqual(5e-4);
    },
  );

  it.each(coefficients.rows.filter(({ molality }) => molality <= 0.01))(
    '$salt at $molality mol/kg: both are within 0.007 of the published coefficient',
    (row) => {
      for (const model of MODELS)
        expect(Math.abs(meanGamma(row.ions, row.molality, model) - row.gamma)).toBeLessThanOrEqual(0.007);
    },
  );

  it.each(coefficients.rows.filter(({ molality }) => molality > 0.01))(
    '$salt at $molality mol/kg: both are within 10 % of the published coefficient',
    (row) => {
      for (const model of MODELS)
        expect(Math.abs(meanGamma(row.ions, row.molality, model) / row.gamma - 1)).toBeLessThanOrEqual(0.1);
    },
  );
});

describe('a saturated solution at a held pH', () => {
  it('takes the coefficients of its own ionic strength though every activity is fixed', () => {
    const reactions: Reaction[] = [
      { species: 'OH-', phase: 'aq', stoich: { 'H+': -1 }, logK: -14 },
      { species: 'Mg(OH)2(s)', phase: 's', stoich: { 'Mg+2': 1, 'H+': -2 }, logK: -17 },
    ];
    const state = solved({
      volumeL: 1,
      amounts: { 'Mg+2': 1 },
      reactions,
      pH: 9.5,
      suppress: [],
      activity: 'davies',
      temperatureC: 25,
      headspace: { kind: 'none' },
    });
    const strength = state.species.reduce(
      (sum, { id, molarity }) => sum + (molarity * (findSpecies(id)?.charge ?? NaN) ** 2) / 2,
      0,
    );
    const magnesium = state.species.find(({ id }) => id === 'Mg+2');
    expect(magnesium?.activity).toBeCloseTo(10 ** (17 - 19), 10);
    expect(state.ionicStrength).toBeCloseTo(strength, 12);
    expect(Math.log(magnesium?.gamma ?? NaN)).toBeCloseTo(lnGamma('davies', 2, null, strength, 25), 9);
  });
});

describe('activity models', () => {
  it('leave the ideal answer alone and tend to it at infinite dilution', () => {
    expect(lnGamma('ideal', 2, 600, 0.3, 25)).toBe(0);
    for (const model of MODELS) expect(Math.abs(lnGamma(model, 1, 400, 1e-10, 25))).toBeLessThan(2e-5);
  });

  it('raise neutral species by log γ = 0.1 I', () => {
    for (const model of MODELS) expect(lnGamma(model, 0, null, 0.4, 25)).toBeCloseTo(0.04 * Math.LN10, 12);
  });

  it('are followed by the reported species: activity is molarity times γ, and pH is of the activity', () => {
    for (const row of standards.rows) {
      const state = standard(row, 'davies');
      const hydrogen = state.species.find(({ id }) => id === 'H+');
      expect(-Math.log10(hydrogen?.activity ?? NaN)).toBeCloseTo(state.pH ?? NaN, 10);
      expect(hydrogen?.activity).toBeCloseTo((hydrogen?.molarity ?? NaN) * (hydrogen?.gamma ?? NaN), 15);
    }
  });
});
