import fc from 'fast-check';
import { planDilution } from '@/lib/planning/dilution-route';
import { glassOf } from '@/lib/planning/glassware';
import { planStockRoute } from '@/lib/planning/stock-and-dilute';
import { canServeFor, lotStrength, stockVolumeMl, weighOut } from '@/lib/planning/weigh-out';
import figures from './figures/weigh-outs.json';
import { buildGlass, buildRoom, buildSubstance } from './kit';

const pure = { assayPercent: 100, densityGPerMl: null };

describe('weigh-outs', () => {
  test.each(figures.weighOuts)('$id: $formula', (row) => {
    const substance = buildSubstance({
      id: row.formula,
      formula: row.formula,
      molarMassGPerMol: row.molarMassGPerMol,
    });
    const out = weighOut({ substance, molarity: row.molarity }, row.volumeMl, { substance, ...pure });
    expect(Math.abs(out.massG - row.printedG)).toBeLessThanOrEqual(row.toleranceG);
  });

  test.each(figures.dilutions)('$id: volume of stock', (row) => {
    expect(
      Math.abs(stockVolumeMl(row.stockMolarity, row.molarity, row.volumeMl) - row.printedMl),
    ).toBeLessThanOrEqual(row.toleranceMl);
  });

  test('a lot of another hydrate is weighed by its own molar mass', () => {
    const releases = { 'Cu+2': 1, 'SO4-2': 1 };
    const blue = buildSubstance({ id: 'blue', formula: 'CuSO4.5H2O', molarMassGPerMol: 249.677, releases });
    const white = buildSubstance({ id: 'white', formula: 'CuSO4', molarMassGPerMol: 159.602, releases });
    const out = weighOut({ substance: blue, molarity: 0.1 }, 1000, { substance: white, ...pure });
    // 0.1 mol of the anhydrous salt by the IUPAC 2021 weights.
    expect(out.massG).toBeCloseTo(15.9602, 4);
    expect(out.uncorrectedG).toBeCloseTo(24.9677, 4);
  });

  test('hydrochloric acid 37 %, 1.19 g/mL (label values): 1 L of 1 mol/L takes 82.8 mL', () => {
    const acid = buildSubstance({
      formula: 'HCl',
      molarMassGPerMol: 36.458,
      form: 'liquid or solution',
      assayPercent: 37,
      densityGPerMl: 1.19,
    });
    const out = weighOut({ substance: acid, molarity: 1 }, 1000, {
      substance: acid,
      assayPercent: null,
      densityGPerMl: null,
    });
    expect(out.volumeMl).toBeCloseTo(1000 / 12.077, 1);
    expect(out.massG).toBeCloseTo(98.535, 2);
  });

  test('a lot whose assay differs from the catalogue follows the density table', () => {
    const acid = buildSubstance({
      formula: 'HCl',
      molarMassGPerMol: 36.458,
      form: 'liquid or solution',
      assayPercent: 37,
      densityGPerMl: 1.18,
    });
    const strength = lotStrength({ substance: acid, assayPercent: 32, densityGPerMl: null });
    expect(strength.densitySource).toBe('density table at 20 °C');
    expect(strength.densityGPerMl).toBeCloseTo(1.1593, 4);
    expect(strength.assaySource).toBe('certificate');
  });

  test('the solute in what is weighed is the solute asked for, whatever the assay', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-4, max: 5, noNaN: true }),
        fc.double({ min: 1, max: 5000, noNaN: true }),
        fc.double({ min: 1, max: 100, noNaN: true }),
        (molarity, volumeMl, assayPercent) => {
          const substance = buildSubstance();
          const out = weighOut({ substance, molarity }, volumeMl, {
            substance,
            assayPercent,
            densityGPerMl: null,
          });
          expect(
            (out.massG * assayPercent) / 100 / substance.molarMassGPerMol / (volumeMl / 1000) / molarity,
          ).toBeCloseTo(1, 9);
        },
      ),
    );
  });

  test('a bottle that gives other ions, or figures that are no amounts, are refused', () => {
    const salt = buildSubstance();
    const other = buildSubstance({ id: 'potassium-chloride', releases: { 'K+': 1, 'Cl-': 1 } });
    const unknown = buildSubstance({ id: 'dye', releases: null });
    expect(canServeFor(salt, other)).toBe(false);
    expect(canServeFor(unknown, buildSubstance({ id: 'dye-2', releases: null }))).toBe(false);
    expect(() => weighOut({ substance: salt, molarity: 1 }, 100, { substance: other, ...pure })).toThrow(
      RangeError,
    );
    for (const bad of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(() => weighOut({ substance: salt, molarity: bad }, 100, { substance: salt, ...pure })).toThrow(
        RangeError,
      );
      expect(() => weighOut({ substance: salt, molarity: 1 }, bad, { substance: salt, ...pure })).toThrow(
        RangeError,
      );
    }
    for (const assayPercent of [0, -3, 100.1, Number.NaN]) {
      expect(() => lotStrength({ substance: salt, assayPercent, densityGPerMl: null })).toThrow(RangeError);
    }
    expect(() => stockVolumeMl(0.1, 0.2, 100)).toThrow(RangeError);
  });
});

describe('stock-and-dilute', () => {
  const glass = glassOf(buildRoom());
  const litre = glass.find((piece) => piece.use === 'flask' && piece.nominalMl === 1000);
  if (litre === undefined) throw new Error('the room has no litre flask');
  const final = { glass: litre, makeMl: 1000 };

  test('1.0 to 0.0010 mol/L: one step for ordinary work, two where one is too rough (Harvey, chapter 4)', () => {
    expect(planDilution(1000, glass, final, 0.01)?.steps).toHaveLength(1);
    const fine = planDilution(1000, glass, final, 0.002);
    expect(fine?.steps).toHaveLength(2);
    const factor = fine?.steps.reduce((product, step) => (product * step.makeMl) / step.takeMl, 1);
    expect(factor).toBeCloseTo(1000, 9);
  });

  test('a mass below the minimum weight becomes a stock that can be weighed, of the same final strength', () => {
    const route = planStockRoute(0.00744, 0.2, 0.0001, glass, final, 0.01, null);
    expect(route).not.toBeNull();
    if (route === null) return;
    expect(route.massG).toBeGreaterThanOrEqual(0.2);
    const factor = route.dilution.steps.reduce((product, step) => (product * step.makeMl) / step.takeMl, 1);
    const reached = route.stockMolarity / factor;
    expect(reached).toBeCloseTo(0.0001, 12);
    expect((route.massG / 0.00744) * (1000 / route.stockFlask.nominalMl)).toBeCloseTo(factor, 9);
    expect(route.dilution.relativeExpanded).toBeLessThanOrEqual(0.01);
    expect(route.dilution.steps).toHaveLength(1);
  });

  test('never stronger than what dissolves, and none where nothing meets the tolerance', () => {
    const route = planStockRoute(0.00744, 0.2, 0.0001, glass, final, 0.01, 0.01);
    expect(route?.stockMolarity).toBeLessThanOrEqual(0.01);
    expect(planStockRoute(0.00744, 0.2, 0.0001, glass, final, 1e-6, null)).toBeNull();
    expect(planDilution(10, glassOf([buildGlass('flask', 1000, 'A')]), final, 0.05)).toBeNull();
    expect(() => planDilution(1, glass, final, 0.01)).toThrow(RangeError);
    expect(() => planStockRoute(-1, 0.2, 0.1, glass, final, 0.01, null)).toThrow(RangeError);
  });
});
