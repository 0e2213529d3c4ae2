import fc from 'fast-check';
import type { BudgetInput } from '@/lib/planning/uncertainty';
import { inputUncertainty, standardUncertaintyOf, uncertaintyBudget } from '@/lib/planning/uncertainty';
import figures from './figures/uncertainty.json';

function row(id: string) {
  const found = figures.rows.find((candidate) => candidate.id === id);
  if (found === undefined) throw new Error(`no figures for ${id}`);
  return found;
}
function input(name: string, value: number, exponent: number, standardUncertainty: number): BudgetInput {
  return {
    name,
    unit: '',
    value,
    exponent,
    influences: [{ name, distribution: 'normal', standardUncertainty }],
  };
}

describe('EURACHEM/CITAC guide, appendix A', () => {
  test('A1: a cadmium standard of 1002.7 mg/L', () => {
    const printed = row('QUAM-A1').printed;
    if (printed === undefined) throw new Error('no printed figures');
    const inputs: BudgetInput[] = [
      {
        name: 'purity',
        unit: '',
        value: 0.9999,
        exponent: 1,
        influences: [{ name: 'purity', distribution: 'rectangular', halfWidth: 0.0001 }],
      },
      input('mass', 100.28, 1, 0.05),
      {
        name: 'volume',
        unit: 'mL',
        value: 100,
        exponent: -1,
        influences: [
          { name: 'calibration', distribution: 'triangular', halfWidth: 0.1 },
          { name: 'repeatability', distribution: 'normal', standardUncertainty: 0.02 },
          { name: 'temperature', distribution: 'rectangular', halfWidth: 100 * 4 * 2.1e-4 },
        ],
      },
    ];
    const budget = uncertaintyBudget((1000 * 100.28 * 0.9999) / 100, inputs);
    expect(budget.value).toBeCloseTo(printed.c, 1);
    expect(Math.abs(budget.standardUncertainty - printed.u)).toBeLessThan(0.07);
    expect(Math.abs(budget.expandedUncertainty - (printed.U_k2 ?? Number.NaN))).toBeLessThan(0.14);
    // u(V) as in the guide's own spreadsheet.
    expect(inputs[2] && inputUncertainty(inputs[2])).toBeCloseTo(0.06647, 4);
  });

  test('A2: sodium hydroxide against phthalate, 0.10214 mol/L', () => {
    const volume: BudgetInput = {
      name: 'volume',
      unit: 'mL',
      value: 18.64,
      exponent: -1,
      influences: [
        { name: 'calibration', distribution: 'triangular', halfWidth: 0.03 },
        { name: 'temperature', distribution: 'normal-95', halfWidth: 18.64 * 3 * 2.1e-4 },
      ],
    };
    const mass: BudgetInput = {
      name: 'mass',
      unit: 'g',
      value: 0.3888,
      exponent: 1,
      influences: [
        { name: 'tare linearity', distribution: 'rectangular', halfWidth: 0.00015 },
        { name: 'gross linearity', distribution: 'rectangular', halfWidth: 0.00015 },
      ],
    };
    const purity: BudgetInput = {
      name: 'purity',
      unit: '',
      value: 1,
      exponent: 1,
      influences: [{ name: 'purity', distribution: 'rectangular', halfWidth: 0.0005 }],
    };
    const inputs = [
      input('repeatability', 1, 1, 0.0005),
      mass,
      purity,
      input('molar mass', 204.2212, -1, 0.0038),
      volume,
    ];
    const budget = uncertaintyBudget((1000 * 0.3888 * 1) / (204.2212 * 18.64), inputs);
    expect(Math.abs(budget.value - 0.10214)).toBeLessThan(5e-6);
    expect(Math.abs(budget.standardUncertainty - 0.0001)).toBeLessThan(5e-6);
    expect(inputUncertainty(mass)).toBeCloseTo(0.00013, 4);
    expect(Math.abs(inputUncertainty(volume) - 0.013)).toBeLessThan(0.001);
    expect(budget.contributions[0]?.input).toBe('volume');
  });

  test('A3: hydrochloric acid, 0.10139 mol/L; with the repeatability the table combines to 0.0018 (its text), without it to 0.0016 (its print)', () => {
    const parts: [string, number, number, number][] = [
      ['mass', 0.3888, 1, 0.00033],
      ['purity', 1, 1, 0.00029],
      ['second volume', 14.89, 1, 0.001],
      ['first volume', 18.64, -1, 0.00086],
      ['molar mass', 204.2212, -1, 0.000019],
      ['acid volume', 15, -1, 0.00073],
    ];
    const inputs = parts.map(([name, value, exponent, relative]) =>
      input(name, value, exponent, value * relative),
    );
    const value = (1000 * 0.3888 * 1 * 14.89) / (18.64 * 204.2212 * 15);
    const without = uncertaintyBudget(value, inputs);
    const withRepeatability = uncertaintyBudget(value, [...inputs, input('repeatability', 1, 1, 0.001)]);
    expect(Math.abs(value - 0.10139)).toBeLessThan(5e-6);
    expect(without.relativeStandardUncertainty).toBeCloseTo(0.0016, 4);
    expect(Math.abs(withRepeatability.standardUncertainty - 0.00016)).toBeLessThan(4e-5);
    expect(withRepeatability.relativeStandardUncertainty).toBeGreaterThan(
      without.relativeStandardUncertainty,
    );
  });
});

describe('distributions', () => {
  const dilutions = figures.rows.filter((candidate) => candidate.id.startsWith('dil-u'));
  test.each(dilutions)('$id: limits of error as triangular and as rectangular', (figure) => {
    const [, take, make] = /dil-u-(\d+)-(\d+)/.exec(figure.id) ?? [];
    const limits = figure.tolerances_mL ?? [];
    const budget = (distribution: 'triangular' | 'rectangular') =>
      uncertaintyBudget(
        1,
        [Number(take), Number(make)].map((value, i) => ({
          name: `${value} mL`,
          unit: 'mL',
          value,
          exponent: i === 0 ? 1 : -1,
          influences: [{ name: 'limit', distribution, halfWidth: limits[i] ?? Number.NaN }],
        })),
      ).relativeStandardUncertainty;
    expect(budget('triangular')).toBeCloseTo(figure.u_rel_triangular ?? Number.NaN, 6);
    expect(budget('rectangular')).toBeCloseTo(figure.u_rel_rectangular ?? Number.NaN, 5);
  });

  test('largest first, shares add to 100 %, and the sum is never below its largest part', () => {
    const inputs = fc.array(
      fc.tuple(
        fc.double({ min: 0.1, max: 1e4, noNaN: true }),
        fc.double({ min: 1e-6, max: 0.1, noNaN: true }),
      ),
      { minLength: 1, maxLength: 8 },
    );
    fc.assert(
      fc.property(inputs, (given) => {
        const budget = uncertaintyBudget(
          1,
          given.map(([value, relative], i) => input(`${i}`, value, i % 2 === 0 ? 1 : -1, value * relative)),
        );
        const relatives = budget.contributions.map((contribution) => contribution.relative);
        expect(relatives).toEqual([...relatives].sort((a, b) => b - a));
        expect(
          budget.contributions.reduce((sum, contribution) => sum + contribution.sharePercent, 0),
        ).toBeCloseTo(100, 6);
        expect(budget.relativeStandardUncertainty).toBeGreaterThanOrEqual((relatives[0] ?? 0) * (1 - 1e-12));
        expect(budget.relativeStandardUncertainty).toBeLessThanOrEqual(
          relatives.reduce((sum, part) => sum + part, 0) * (1 + 1e-12),
        );
      }),
    );
  });

  test('impossible figures are refused', () => {
    expect(() => standardUncertaintyOf({ name: 'x', distribution: 'rectangular', halfWidth: -1 })).toThrow(
      RangeError,
    );
    expect(() => uncertaintyBudget(0, [])).toThrow(RangeError);
    expect(() => uncertaintyBudget(1, [input('x', 0, 1, 0.1)])).toThrow(RangeError);
    expect(() => uncertaintyBudget(Number.NaN, [])).toThrow(RangeError);
  });
});
