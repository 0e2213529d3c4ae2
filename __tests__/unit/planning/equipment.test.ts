import { balancesOf, chooseMeasure, chooseVessel, glassOf } from '@/lib/planning/glassware';
import { chooseBalance, massText, minimumWeightG, shownDecimals } from '@/lib/planning/balances';
import { isoToleranceMl } from '@/lib/planning/glass-tolerances';
import { dilutionRise, dissolutionRise } from '@/lib/planning/dissolution-heat';
import figures from './figures/uncertainty.json';
import { buildBalance, buildGlass, buildRoom } from './kit';

const glass = glassOf(buildRoom());

describe('limits of error', () => {
  test('flasks of class A as the international standard has them', () => {
    const contrast = figures.rows.find((row) => row.id === 'flask-US-vs-ISO')?.ISO_1042_class_A ?? {};
    expect(Object.keys(contrast)).toHaveLength(6);
    for (const [nominal, limit] of Object.entries(contrast))
      expect(isoToleranceMl('flask', Number(nominal), 'A')).toBe(limit);
  });

  test('class B and an unknown class are coarse, an unknown size has none', () => {
    // 10 mL pipette: A 0.020, B 0.040 mL, as printed by several makers.
    expect(isoToleranceMl('single-volume pipette', 10, 'AS')).toBe(0.02);
    expect(isoToleranceMl('single-volume pipette', 10, 'B')).toBe(0.04);
    expect(isoToleranceMl('burette', 50, null)).toBe(0.1);
    expect(isoToleranceMl('flask', 300, 'A')).toBeNull();
    expect(() => isoToleranceMl('flask', 0, 'A')).toThrow(RangeError);
  });
});

describe('what to make a volume up in', () => {
  test('an analytical 100 mL goes into a class A flask, a bench 100 mL into a cylinder', () => {
    const fine = chooseVessel(glass, 100, 'analytical');
    const rough = chooseVessel(glass, 100, 'bench');
    expect(fine.outcome === 'found' && fine.vessel.glass.use).toBe('flask');
    expect(rough.outcome === 'found' && rough.vessel.glass.use).toBe('cylinder');
  });

  test('every choice meets its class and holds what was asked', () => {
    for (const tolerance of ['bench', 'ordinary', 'analytical'] as const) {
      for (const volumeMl of [15, 80, 100, 300, 750, 1000, 2000, 4500]) {
        const choice = chooseVessel(glass, volumeMl, tolerance);
        if (choice.outcome !== 'found') throw new Error(`nothing for ${volumeMl} mL`);
        expect(choice.vessel.makeVolumeMl).toBeGreaterThanOrEqual(volumeMl - 1e-9);
        expect(choice.vessel.fills * choice.vessel.fillMl).toBeCloseTo(choice.vessel.makeVolumeMl, 9);
        expect(choice.vessel.glass.toleranceMl / choice.vessel.fillMl).toBeLessThanOrEqual(
          { bench: 0.05, ordinary: 0.01, analytical: 0.002 }[tolerance],
        );
      }
    }
  });

  test('a room that can not meet the class says what comes closest', () => {
    const poor = glassOf([buildGlass('cylinder', 100, 'B')]);
    const choice = chooseVessel(poor, 100, 'analytical');
    expect(choice.outcome === 'none-meets' && choice.closest.relativeTolerance).toBe(0.01);
    expect(chooseVessel([], 100, 'bench').outcome).toBe('none-owned');
    expect(() => chooseVessel(glass, -5, 'bench')).toThrow(RangeError);
  });

  test('scales are used from half their capacity (UKAS LAB 15)', () => {
    for (const volumeMl of [0.7, 3, 7, 30, 60, 180, 400]) {
      const choice = chooseMeasure(glass, volumeMl, 0.05);
      expect(choice).not.toBeNull();
      if (choice?.glass.use !== 'single-volume pipette')
        expect(volumeMl / (choice?.glass.nominalMl ?? 0)).toBeGreaterThanOrEqual(0.5);
    }
    expect(chooseMeasure(glass, 7.3, 1e-6)).toBeNull();
  });
});

describe('balances', () => {
  test('minimum weights of USP <41>', () => {
    const check = figures.rows.find((row) => row.id === 'balance-USP41')?.check;
    const balance = (readabilityG: number, repeatabilityG: number | null) => ({
      id: 'b',
      name: 'b',
      capacityG: 200,
      readabilityG,
      repeatabilityG,
    });
    expect(minimumWeightG(balance(check?.d_g ?? 0, 0))).toBeCloseTo(check?.min_weight_g ?? Number.NaN, 9);
    expect(minimumWeightG(balance(check?.d_g_2 ?? 0, 0))).toBeCloseTo(check?.min_weight_g_2 ?? Number.NaN, 9);
    expect(minimumWeightG(balance(1e-4, check?.s_g ?? 0))).toBeCloseTo(
      check?.min_weight_from_s_g ?? Number.NaN,
      9,
    );
  });

  test('the coarsest balance that may weigh it, in its own digits', () => {
    const balances = balancesOf(buildRoom());
    expect(chooseBalance(balances, 25)?.readabilityG).toBe(0.01);
    expect(chooseBalance(balances, 4.9936)?.readabilityG).toBe(0.001);
    expect(chooseBalance(balances, 0.05)).toBeNull();
    expect(chooseBalance(balances, 9000)).toBeNull();
    const [fine] = balancesOf([buildBalance(0.0005, null, 100)]);
    expect(fine && massText(fine, 1.23456)).toBe('1.2345 g');
    expect(shownDecimals(0.01)).toBe(2);
    expect(shownDecimals(1)).toBe(0);
    expect(() => chooseBalance(balances, Number.NaN)).toThrow(RangeError);
  });
});

describe('heat', () => {
  test('20.0 g of calcium chloride in 100 mL from 20.0 °C reaches 55.1 °C (Oxtoby, Principles of Modern Chemistry, 12.43)', () => {
    const rise = dissolutionRise('CaCl2', 20 / 110.98, 100);
    expect(20 + (rise?.riseC ?? 0)).toBeCloseTo(55.1, 0);
  });

  test('sulfuric acid to 53.6 mol water per mol: 73.39 kJ/mol (Felder and Rousseau, solution of 9.39)', () => {
    const rise = dilutionRise(
      { formula: 'H2SO4', molarMassGPerMol: 98.072, massPercent: 100, massG: 98.072 },
      53.6 * 18.015,
    );
    expect(Math.abs((rise?.heatKj ?? 0) - 73.39)).toBeLessThan(0.3);
  });

  test('ammonium nitrate cools, an unknown substance gives no figure, bad input is refused', () => {
    expect(dissolutionRise('NH4NO3', 0.5, 200)?.riseC).toBeLessThan(0);
    expect(dissolutionRise('C6H12O6', 1, 100)).toBeNull();
    expect(
      dilutionRise({ formula: 'H3PO4', molarMassGPerMol: 97.994, massPercent: 85, massG: 10 }, 100),
    ).toBeNull();
    expect(() => dissolutionRise('NaOH', -1, 100)).toThrow(RangeError);
    expect(() =>
      dilutionRise({ formula: 'HCl', molarMassGPerMol: 36.458, massPercent: 120, massG: 10 }, 100),
    ).toThrow(RangeError);
  });
});
