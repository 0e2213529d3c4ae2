import { findSubstance } from '../../../lib/chemistry/substances';
import type { Portion } from '../../../lib/chemistry/types';
import { distancesToDanger, STANDARD_SUSPECTS } from '../../../lib/hazards/distance';
import { screenPolicy } from '../../../lib/hazards/policy-gates';
import { previewMix } from '../../../lib/hazards/preview';
import { decide, screenNeighbours, screenSolutions, sortFindings } from '../../../lib/hazards/screen';
import { screenStorage } from '../../../lib/hazards/storage';
import type { Stored } from '../../../lib/hazards/storage';
import type { Finding, Severity } from '../../../lib/hazards/types';
import { screenWaste, wasteStreamOf } from '../../../lib/hazards/waste';

const ROOM = { volumeM3: 150, airChangesPerHour: 6, fumeCupboard: false };
const portion = (label: string, volumeMl: number, ...solutes: (readonly [string, number])[]): Portion => ({
  label,
  volumeMl,
  solutes: solutes.map(([substance, molarity]) => ({ substance, molarity })),
});
function preview(...portions: Portion[]) {
  const outcome = previewMix({ portions, activity: 'davies', temperatureC: 25, room: ROOM });
  if (!('decision' in outcome)) throw new Error(outcome.message);
  return outcome;
}
const finding = (severity: Severity, rule = 'X', concerns: readonly string[] = ['a']): Finding => ({
  rule,
  severity,
  scope: 'mix',
  title: '',
  reason: '',
  mustNot: null,
  gas: null,
  precautions: [],
  alternative: null,
  source: '',
  concerns,
});

describe('deciding', () => {
  test('the gravest finding decides', () => {
    expect(decide([finding('caution'), finding('stop'), finding('review')])).toBe('stop');
    expect(decide([finding('controlled'), finding('note')])).toBe('controlled');
  });
  test('notes alone, and nothing at all, leave it clear', () => {
    expect(decide([finding('note')])).toBe('clear');
    expect(decide([])).toBe('clear');
  });
  test('the same rule on the same bottles is told once, the gravest first', () => {
    const sorted = sortFindings([
      finding('caution', 'X', ['b', 'a']),
      finding('review', 'X', ['a', 'b']),
      finding('stop', 'Y'),
    ]);
    expect(sorted.map(({ rule, severity }) => `${rule} ${severity}`)).toEqual(['Y stop', 'X review']);
  });
});

describe('neighbours', () => {
  test.each(['hydrochloric-acid', 'nitric-acid', 'acetic-acid'])(
    'cyanide beside 0.1 mol/L %s: both bottles named, the hydrogen cyanide counted',
    (acid) => {
      const findings = screenNeighbours(
        [
          portion('Cyanide set', 200, ['sodium-cyanide', 0.1]),
          portion('Acid set', 1000, [acid, 0.1]),
          portion('Salt', 500, ['sodium-chloride', 0.1]),
        ],
        ROOM,
      );
      const [gravest] = findings;
      expect(['stop', 'review']).toContain(gravest?.severity);
      expect(gravest?.concerns).toEqual(['Cyanide set', 'Acid set']);
      expect(gravest?.reason).toMatch(/Cyanide set and Acid set/);
      // 200 mL of 0.1 mol/L: 20 mmol, 489 mL at 25 °C.
      expect(gravest?.gas?.worstCaseMoles).toBeCloseTo(0.02, 9);
      expect(gravest?.gas?.mlAt25C).toBeCloseTo(489.3, 0);
      expect(findings.every(({ concerns }) => !concerns.includes('Salt'))).toBe(true);
    },
  );
  test('cyanide beside a hydrolysing salt is not overlooked', () => {
    const findings = screenNeighbours(
      [portion('Cyanide', 100, ['sodium-cyanide', 0.1]), portion('Alum', 100, ['potassium-alum', 0.1])],
      ROOM,
    );
    expect(decide(findings)).toBe('review');
  });
  test('bottles of the same name are still two bottles', () => {
    const findings = screenNeighbours(
      [
        portion('Bottle', 100, ['sodium-hypochlorite', 0.7]),
        portion('Bottle', 100, ['hydrochloric-acid', 1]),
      ],
      ROOM,
    );
    expect(decide(findings)).toBe('review');
  });
  test('a rule that one bottle meets by itself is not told of its neighbours', () => {
    expect(
      screenNeighbours(
        [
          portion('Silver', 100, ['silver-nitrate', 0.1], ['ammonia-solution', 1]),
          portion('Salt', 100, ['potassium-nitrate', 0.1]),
        ],
        ROOM,
      ),
    ).toEqual([]);
  });
  test('one bottle alone has no neighbours', () => {
    expect(screenNeighbours([portion('Cyanide', 100, ['sodium-cyanide', 0.1])], ROOM)).toEqual([]);
  });
});

describe('a mix as poured', () => {
  test('a danger that passes while pouring is told though the last pour hides it', () => {
    const outcome = preview(
      portion('cyanide', 10, ['sodium-cyanide', 0.1]),
      portion('acid', 10, ['hydrochloric-acid', 0.1]),
      portion('alkali', 50, ['sodium-hydroxide', 1]),
    );
    expect(outcome.equilibrium.pH).toBeGreaterThan(12);
    expect(outcome.findings[0]).toMatchObject({ rule: 'CN01', severity: 'stop' });
  });
  test('another order that would be worse is told', () => {
    const outcome = preview(
      portion('alkali', 50, ['sodium-hydroxide', 1]),
      portion('cyanide', 10, ['sodium-cyanide', 0.1]),
      portion('acid', 10, ['hydrochloric-acid', 0.1]),
    );
    expect(outcome.findings.find(({ scope }) => scope === 'order')).toMatchObject({
      rule: 'CN01',
      severity: 'review',
    });
  });
  test('copper(II) with iodide is told to be redox, a note that leaves it below review', () => {
    const outcome = preview(
      portion('copper', 10, ['copper-sulfate', 0.1]),
      portion('iodide', 20, ['potassium-iodide', 0.1]),
    );
    expect(outcome.findings.find(({ title }) => title.startsWith('Redox'))).toMatchObject({
      scope: 'quality',
      severity: 'note',
    });
    expect(['clear', 'caution']).toContain(outcome.decision);
  });
  test('copper(II) with sulfate needs no such note', () => {
    const outcome = preview(
      portion('copper', 10, ['copper-sulfate', 0.1]),
      portion('sulfate', 20, ['sodium-sulfate', 0.1]),
    );
    expect(outcome.findings.some(({ title }) => title.startsWith('Redox'))).toBe(false);
  });
  test('a highly reactive substance with something no rule speaks of is for a person', () => {
    const outcome = preview(
      portion('hydrazine', 10, ['hydrazine-sulfate', 0.1]),
      portion('bleach', 10, ['sodium-hypochlorite', 0.1]),
    );
    expect(outcome.findings.find(({ rule }) => rule.startsWith('no-rule:'))).toMatchObject({
      severity: 'review',
    });
  });
  test('a highly reactive substance with what was looked at raises no such finding', () => {
    const outcome = preview(
      portion('bleach', 10, ['sodium-hypochlorite', 0.1]),
      portion('salt', 10, ['sodium-chloride', 0.1]),
    );
    expect(outcome.findings.some(({ rule }) => rule.startsWith('no-rule:'))).toBe(false);
  });
  test('every finding says why, from where, and about which portions', () => {
    const outcome = preview(
      portion('A', 25, ['silver-nitrate', 0.075]),
      portion('B', 40, ['sodium-cyanide', 0.1]),
      portion('C', 10, ['hydrochloric-acid', 0.1]),
    );
    for (const entry of outcome.findings) {
      expect(entry.reason).not.toBe('');
      expect(entry.source).not.toBe('');
      expect(entry.concerns.length).toBeGreaterThan(0);
    }
  });
  test('silver nitrate 25 mL of 0.075 with cyanide 40 mL of 0.100 mol/L dilutes to 0.02885 and 0.06154 and is for the safety officer', () => {
    const outcome = preview(portion('A', 25, ['7761-88-8', 0.075]), portion('B', 40, ['143-33-9', 0.1]));
    expect(outcome.diluted.map(({ molarity }) => Number(molarity.toFixed(5)))).toEqual([0.02885, 0.06154]);
    expect(outcome.decision).toBe('review');
  });
  test('an unknown substance is refused', () => {
    expect(() => preview(portion('A', 25, ['unobtainium', 1]))).toThrow(RangeError);
  });
});

describe('solutions as kept', () => {
  test('ammoniacal silver in a bottle is a stop', () => {
    expect(
      decide(
        screenSolutions([portion('Reagent', 50, ['silver-nitrate', 0.1], ['ammonia-solution', 1])], ROOM),
      ),
    ).toBe('stop');
  });
  test('what reacts inside one bottle is found', () => {
    expect(
      decide(
        screenSolutions([portion('Odd', 50, ['sodium-hypochlorite', 0.1], ['ammonium-chloride', 0.1])], ROOM),
      ),
    ).toBe('stop');
  });
  test('everyday solutions stand quietly', () => {
    for (const [id, molarity] of [
      ['sodium-chloride', 0.1],
      ['hydrochloric-acid', 0.1],
      ['copper-sulfate', 0.5],
      ['silver-nitrate', 0.1],
      ['potassium-permanganate', 0.02],
      ['sodium-hydroxide', 1],
    ] as const) {
      expect(decide(screenSolutions([portion(id, 500, [id, molarity])], ROOM))).toBe('clear');
    }
  });
});

describe('local policy', () => {
  test.each([
    ['sodium-cyanide', 0.01, 'review'],
    ['sodium-azide', 0.01, 'review'],
    ['mercury-chloride', 0.01, 'review'],
    ['potassium-chromate', 0.5, 'controlled'],
    ['lead-nitrate', 0.5, 'controlled'],
    ['nitric-acid', 15, 'review'],
    ['formaldehyde-solution', 1, 'controlled'],
    ['thioacetamide', 0.05, 'clear'],
    ['ammonium-nitrate', 0.5, 'clear'],
    ['potassium-chromate', 0.05, 'clear'],
    ['lead-nitrate', 0.05, 'clear'],
    ['nitric-acid', 1, 'clear'],
    ['potassium-thiocyanate', 0.1, 'clear'],
    ['potassium-ferrocyanide', 0.1, 'clear'],
  ] as const)('%s at %d mol/L: %s', (id, molarity, decision) => {
    expect(decide(screenPolicy([portion('bottle', 100, [id, molarity])]))).toBe(decision);
  });
});

describe('storage', () => {
  const lot = (substance: string, molarity: number | null = null): Stored => ({
    label: findSubstance(substance)?.name ?? substance,
    substance,
    molarity,
  });
  test.each([
    ['sodium-cyanide', 'hydrochloric-acid', 'stop'],
    ['nitric-acid', 'acetic-acid', 'stop'],
    ['potassium-permanganate', 'ethanol', 'stop'],
    ['hydrochloric-acid', 'sodium-hydroxide', 'stop'],
    ['sodium-hypochlorite', 'hydrochloric-acid', 'stop'],
    ['sodium-chloride', 'potassium-iodide', 'clear'],
    ['ethanol', 'acetone', 'clear'],
    ['sodium-chloride', 'hydrochloric-acid', 'caution'],
  ] as const)('%s with %s: %s', (first, second, decision) => {
    expect(decide(screenStorage(lot(first), [lot(second)]))).toBe(decision);
    expect(decide(screenStorage(lot(second), [lot(first)]))).toBe(decision);
  });
  test('dilute acid and alkali may share a shelf', () => {
    expect(decide(screenStorage(lot('hydrochloric-acid', 0.1), [lot('sodium-hydroxide', 0.1)]))).toBe(
      'clear',
    );
  });
  test('dilute acid may not stand with cyanide all the same', () => {
    expect(decide(screenStorage(lot('hydrochloric-acid', 0.1), [lot('sodium-cyanide', 0.1)]))).toBe('stop');
  });
  test('dilute bleach is still bleach', () => {
    expect(decide(screenStorage(lot('sodium-hypochlorite', 0.1), [lot('hydrochloric-acid', 2)]))).toBe(
      'stop',
    );
  });
});

describe('waste', () => {
  test('nitric acid into a solvent jar: stop', () => {
    expect(
      screenWaste(
        portion('solvent jar', 500, ['ethanol', 8]),
        [portion('nitric', 20, ['nitric-acid', 8])],
        ROOM,
      ).decision,
    ).toBe('stop');
  });
  test('an acid rinse into the alkaline cyanide jar: stop', () => {
    const { decision, findings } = screenWaste(
      portion('cyanide jar', 200, ['sodium-cyanide', 0.05]),
      [portion('rinse', 200, ['hydrochloric-acid', 0.1])],
      ROOM,
    );
    expect(decision).toBe('stop');
    expect(findings[0]).toMatchObject({ scope: 'waste', gas: { species: 'HCN' } });
  });
  test('ammoniacal silver into the silver jar may not stand', () => {
    expect(
      screenWaste(
        portion('silver jar', 200, ['silver-nitrate', 0.01]),
        [portion('rest', 20, ['ammonia-solution', 2])],
        ROOM,
      ).decision,
    ).toBe('stop');
  });
  test('copper residues go together', () => {
    expect(['clear', 'caution']).toContain(
      screenWaste(
        portion('metal jar', 200, ['copper-sulfate', 0.1]),
        [portion('rest', 20, ['nickel-sulfate', 0.1])],
        ROOM,
      ).decision,
    );
  });
  test('salt into the drain stream is clear', () => {
    expect(
      screenWaste(
        portion('drain', 500, ['sodium-chloride', 0.1]),
        [portion('rest', 20, ['sodium-sulfate', 0.1])],
        ROOM,
      ).decision,
    ).toBe('clear');
  });
  test.each([
    ['sodium-cyanide', 0.1, 'cyanide_alk'],
    ['silver-nitrate', 0.1, 'silver'],
    ['copper-sulfate', 0.1, 'heavy_metal'],
    ['nitric-acid', 8, 'nitric'],
    ['nitric-acid', 0.5, 'acid_aq'],
    ['sodium-chloride', 0.1, 'drain_permitted'],
  ] as const)('%s at %d mol/L belongs to %s', (id, molarity, stream) => {
    expect(wasteStreamOf(portion('x', 10, [id, molarity]))).toBe(stream);
  });
});

describe('distance to danger', () => {
  test('bleach is drops away from a stop when acid comes', () => {
    const [nearest] = distancesToDanger(
      [portion('bleach', 10, ['sodium-hypochlorite', 0.1])],
      STANDARD_SUSPECTS,
      ROOM,
    );
    expect(nearest).toMatchObject({ label: '1 mol/L strong acid', decision: 'stop' });
    // 10 mL of 0.1 mol/L hypochlorite hold 1 mmol: pH 7 is passed by the time about 0.8 mmol of acid are in (pKa 7.5).
    expect(nearest?.volumeMl).toBeGreaterThan(0.3);
    expect(nearest?.volumeMl).toBeLessThan(1.1);
  });
  test('cyanide in alkali is as far from danger as its alkali reaches', () => {
    const acid = distancesToDanger(
      [portion('cyanide', 10, ['sodium-cyanide', 0.1]), portion('alkali', 10, ['sodium-hydroxide', 0.1])],
      STANDARD_SUSPECTS,
      ROOM,
    ).find(({ label }) => label.includes('acid'));
    // 1 mmol of alkali stands before the cyanide: about 1 mL of 1 mol/L acid takes it to pH 11, where it gives off gas.
    expect(['stop', 'review']).toContain(acid?.decision);
    expect(acid?.volumeMl).toBeGreaterThan(0.9);
    expect(acid?.volumeMl).toBeLessThan(1.3);
  });
  test('salt water is nowhere near', () => {
    const distances = distancesToDanger(
      [portion('salt', 50, ['sodium-chloride', 0.1])],
      STANDARD_SUSPECTS,
      ROOM,
    );
    expect(distances.map(({ volumeMl }) => volumeMl)).toEqual([null, null, null]);
  });
});
