import { pourMix } from '../../../lib/chemistry/mixing';
import type { Portion } from '../../../lib/chemistry/types';
import { screenedBottle } from '../../../lib/hazards/contents';
import { estimateGas, ppmIn, predictedPpm, worstCase } from '../../../lib/hazards/gas';
import { previewMix } from '../../../lib/hazards/preview';
import { screenMix } from '../../../lib/hazards/screen';
import { findGas, HAZARD_RULES } from '../../../lib/hazards/tables';

const ROOM = { volumeM3: 150, airChangesPerHour: 6, fumeCupboard: false };

const portion = (label: string, volumeMl: number, ...solutes: (readonly [string, number])[]): Portion => ({
  label,
  volumeMl,
  solutes: solutes.map(([substance, molarity]) => ({ substance, molarity })),
});

/**
 * Worked by hand: mL = mmol × 24.465; ppm = mol × 0.024465 m³/mol ÷ m³ × 10⁶; the prediction by
 * C = n / (V + K V(liquid)/α) with K from the Henry constant named beside each gas and α from its pKa.
 */
const WORKED = [
  {
    title: '10 mL of 0.1 mol/L cyanide with 10 mL of excess acid',
    rule: 'CN01',
    gas: 'HCN',
    portions: [
      portion('cyanide', 10, ['sodium-cyanide', 0.1]),
      portion('acid', 10, ['hydrochloric-acid', 1]),
    ],
    mmol: 1,
    mL: 24.47,
    roomPpm: 0.163,
    zonePpm: 244.7,
    liquidMl: 20,
    predicted: [
      [1, 234.3],
      [9, 228.4],
      [10, 185.9],
      [12, 8.7],
    ],
  },
  {
    title: '5 mL of 0.70 mol/L hypochlorite with excess acid',
    rule: 'HY01',
    gas: 'Cl2',
    portions: [
      portion('bleach', 5, ['sodium-hypochlorite', 0.7]),
      portion('acid', 10, ['hydrochloric-acid', 1]),
    ],
    mmol: 3.5,
    mL: 85.63,
    roomPpm: 0.571,
    zonePpm: 856.3,
    liquidMl: 15,
    predicted: [[1, 856.1]],
  },
  {
    title: '25 mL of 0.5 mol/L thiosulfate with 25 mL of excess acid',
    rule: 'SO03',
    gas: 'SO2',
    portions: [
      portion('thiosulfate', 25, ['sodium-thiosulfate', 0.5]),
      portion('acid', 25, ['hydrochloric-acid', 2]),
    ],
    mmol: 12.5,
    mL: 305.82,
    roomPpm: 2.039,
    zonePpm: 3058.2,
    liquidMl: 50,
    predicted: [
      [1, 3002.3],
      [4, 870.8],
    ],
  },
  {
    title: '10 mL of 2 mol/L ammonium chloride with 10 mL of 2 mol/L alkali',
    rule: 'HT09',
    gas: 'NH3',
    portions: [
      portion('ammonium', 10, ['ammonium-chloride', 2]),
      portion('alkali', 10, ['sodium-hydroxide', 2]),
    ],
    mmol: 20,
    mL: 489.31,
    roomPpm: 3.262,
    zonePpm: 4893.1,
    liquidMl: 20,
    predicted: [
      [12, 3784.2],
      [9.25, 3087.1],
    ],
  },
  {
    title: '2 mL of 0.1 mol/L sulfide with acid',
    rule: 'SU01',
    gas: 'H2S',
    portions: [portion('sulfide', 2, ['sodium-sulfide', 0.1]), portion('acid', 2, ['hydrochloric-acid', 1])],
    mmol: 0.2,
    mL: 4.89,
    roomPpm: 0.033,
    zonePpm: 48.9,
    liquidMl: 4,
    predicted: [
      [2, 48.9],
      [10, 45],
    ],
  },
] as const;

/** Within the rounding of the worked figures. */
function expectNear(actual: number | null | undefined, worked: number, relative = 0.011) {
  expect(actual).not.toBeNull();
  expect(Math.abs((actual ?? NaN) - worked)).toBeLessThanOrEqual(Math.abs(worked) * relative);
}

test.each(WORKED)(
  '$title: amount, volume, room, breathing zone and prediction',
  ({ rule, gas: gasId, portions, mmol, mL, roomPpm, zonePpm, liquidMl, predicted }) => {
    const gas = findGas(gasId);
    const stoichiometry = HAZARD_RULES.find(({ id }) => id === rule)?.gas?.[0];
    if (!gas || !stoichiometry) throw new Error('not in the tables');
    const mol =
      worstCase(
        stoichiometry,
        portions.flatMap((entry) => screenedBottle(entry).solutes),
      )[gasId] ?? NaN;
    expectNear(mol * 1000, mmol, 1e-9);
    const estimate = estimateGas(gasId, mol, liquidMl, null, ROOM);
    expectNear(estimate?.mlAt25C, mL);
    expectNear(estimate?.ppmInRoom, roomPpm, 0.02);
    expectNear(estimate?.ppmInBreathingZone, zonePpm);
    for (const [pH, ppm] of predicted) expectNear(predictedPpm(gas, mol, liquidMl, pH), ppm, 0.02);
  },
);

test('limits are named and sourced, the short-term one of hydrogen cyanide being 4.7 ppm', () => {
  const estimate = estimateGas('HCN', 1e-3, 20, null, ROOM);
  expect(estimate?.limit).toEqual({
    name: expect.stringContaining('15 min'),
    ppm: 4.7,
    source: expect.stringContaining('NIOSH'),
  });
  expect(estimate?.limits.map(({ ppm }) => ppm)).toEqual([4.7, 17, 27, 50]);
});

test('the scarcer reactant decides: little acid frees little', () => {
  const stoichiometry = { consumes: { 'CN-': 1, 'H+': 1 }, limiting: 'CN-', gives: { HCN: 1 } };
  const solutes = [
    portion('a', 100, ['sodium-cyanide', 0.1]),
    portion('b', 2, ['hydrochloric-acid', 0.1]),
  ].flatMap((entry) => screenedBottle(entry).solutes);
  expect(worstCase(stoichiometry, solutes).HCN).toBeCloseTo(2e-4, 12);
});

test('an acid that is one only by hydrolysis does not limit what it frees', () => {
  const stoichiometry = { consumes: { 'CN-': 1, 'H+': 1 }, limiting: 'CN-', gives: { HCN: 1 } };
  const solutes = [
    portion('a', 10, ['sodium-cyanide', 0.1]),
    portion('b', 10, ['potassium-alum', 0.1]),
  ].flatMap((entry) => screenedBottle(entry).solutes);
  expect(worstCase(stoichiometry, solutes).HCN).toBeCloseTo(1e-3, 12);
});

test('ppm falls as the air grows', () => {
  expect(ppmIn(0.1, 1e-3) / ppmIn(150, 1e-3)).toBeCloseTo(1500, 6);
});

describe('cyanide kept at pH 12', () => {
  const preview = previewMix({
    portions: [
      portion('cyanide', 10, ['sodium-cyanide', 0.1]),
      portion('alkali', 10, ['sodium-hydroxide', 0.04]),
    ],
    activity: 'davies',
    temperatureC: 25,
    room: ROOM,
  });
  if (!('decision' in preview)) throw new Error('not converged');
  const vapour = preview.findings.find(({ rule }) => rule === 'vapour:HCN');

  test('its pH is about 12', () => {
    expect(preview.equilibrium.pH).toBeGreaterThan(11.8);
    expect(preview.equilibrium.pH).toBeLessThan(12.5);
  });
  test('the air just above the open liquid reaches the order of the short-term limit all the same', () => {
    expect(vapour?.gas?.ppmAboveLiquid).toBeGreaterThan(4.7 / 3);
    expect(vapour?.gas?.ppmAboveLiquid).toBeLessThan(4.7 * 10);
  });
  test('it is negligible in the room, and yet not cleared', () => {
    expect((vapour?.gas?.predictedPpmInBreathingZone ?? NaN) * (0.1 / 150)).toBeLessThan(0.01);
    expect(preview.decision).toBe('review');
    expect(vapour?.precautions.join(' ')).toMatch(/covered/);
  });
});

test('the prediction never lowers a rule: cyanide with acid is a stop in a vast room with a fume cupboard', () => {
  const portions = [
    portion('cyanide', 0.1, ['sodium-cyanide', 0.01]),
    portion('acid', 10, ['hydrochloric-acid', 0.1]),
  ];
  const mix = pourMix({ portions, activity: 'davies', temperatureC: 25 });
  if (!mix.converged) throw new Error('not converged');
  const findings = screenMix(portions, mix, { volumeM3: 5000, airChangesPerHour: 20, fumeCupboard: true });
  expect(findings[0]).toMatchObject({ rule: 'CN01', severity: 'stop' });
});

test('a large worst case raises a severity: much sulfite with acid is for the safety officer', () => {
  const judge = (volumeMl: number) => {
    const portions = [
      portion('sulfite', volumeMl, ['sodium-sulfite', 0.05]),
      portion('acid', volumeMl, ['hydrochloric-acid', 0.5]),
    ];
    const mix = pourMix({ portions, activity: 'davies', temperatureC: 25 });
    if (!mix.converged) throw new Error('not converged');
    return screenMix(portions, mix, ROOM).find(({ rule }) => rule === 'SO01')?.severity;
  };
  expect(judge(1)).toBe('controlled');
  expect(judge(500)).toBe('review');
});
