import { findSubstance } from '../../../lib/chemistry/substances';
import { classifySolution, massPercent } from '../../../lib/hazards/classification/classify-solution';
import { previewMix } from '../../../lib/hazards/preview';
import { MOST_PRECAUTIONS, precautionText } from '../../../lib/hazards/classification/statements';
import bandData from './classification-bands.json';

const ACTIVE_CHLORINE_G_PER_MOL = 70.9;
/** Suppliers differ on metal corrosion, and the bands leave it and the note on data sheets out. */
const LEFT_OUT = new Set(['H290', 'EUH210']);

/** Where our table of substances says more than the bands' inputs did: supplier sheets and Annex VI disagree or were read further. */
const ALSO_OURS: Readonly<Record<string, readonly string[] | undefined>> = {
  iodine: ['H372', 'H373'],
  acetone: ['EUH066'],
  phenol: ['H411', 'H412'],
  'sodium-thiosulfate': ['EUH031'],
};

function molarityOf(substance: string, percent: number): number {
  const molarMass =
    substance === 'sodium-hypochlorite'
      ? ACTIVE_CHLORINE_G_PER_MOL
      : (findSubstance(substance)?.molarMassGPerMol ?? NaN);
  return (percent * 10) / molarMass;
}

const BANDS = bandData.rows.flatMap(({ substance, bands }) =>
  bands.map((band) => [substance, band.fromPercent, band.toPercent, band] as const),
);

test.each(BANDS)('%s from %d to %d %%', (substance, fromPercent, toPercent, band) => {
  // Both just above the lower end and in the middle of the band.
  for (const percent of [
    fromPercent === 0 ? toPercent / 100 : fromPercent * 1.0005,
    (fromPercent + toPercent) / 2,
  ]) {
    const { hazards, supplemental, signalWord } = classifySolution({
      solutes: [{ substance, molarity: molarityOf(substance, percent) }],
      densityGPerMl: 1,
      pH: null,
    });
    const codes = [...hazards.map(({ code }) => code), ...supplemental].filter(
      (code) => !LEFT_OUT.has(code) && (!ALSO_OURS[substance]?.includes(code) || band.h.includes(code)),
    );
    expect({ percent, codes: codes.sort() }).toEqual({ percent, codes: [...band.h].sort() });
    if (!hazards.some(({ code }) => code === 'H290' || ALSO_OURS[substance]?.includes(code)))
      expect(signalWord).toBe(band.signal);
  }
});

test('hydrochloric acid of 12 % says why it irritates', () => {
  const { hazards, signalWord, pictograms } = classifySolution({
    solutes: [{ substance: 'hydrochloric-acid', molarity: molarityOf('hydrochloric-acid', 12) }],
    densityGPerMl: 1,
    pH: -0.5,
  });
  expect(signalWord).toBe('Warning');
  expect(pictograms).toContain('GHS05');
  expect(hazards.find(({ code }) => code === 'H315')?.because).toBe(
    '12 % hydrochloric acid: Skin Irrit. 2 from 10 %',
  );
});

test('the same acid at 0.1 mol/L is corrosive to metals alone: its own limits beat its pH', () => {
  const { hazards } = classifySolution({
    solutes: [{ substance: 'hydrochloric-acid', molarity: 0.1 }],
    pH: 1,
  });
  expect(hazards.map(({ code }) => code)).toEqual(['H290']);
});

test('two acids at an extreme pH corrode, whatever their sums say', () => {
  const solutes = [
    { substance: 'hydrochloric-acid', molarity: 0.5 },
    { substance: 'sulfuric-acid', molarity: 0.2 },
  ];
  expect(classifySolution({ solutes, pH: 0.2 }).hazards.map(({ code }) => code)).toContain('H314');
  expect(classifySolution({ solutes, pH: 4 }).hazards.map(({ code }) => code)).not.toContain('H314');
});

test('density 1 errs to the safe side, and a measured density corrects it', () => {
  const solutes = [{ substance: 'sodium-hydroxide', molarity: 0.5001 }];
  expect(classifySolution({ solutes, pH: 13.7 }).hazards.map(({ code }) => code)).toContain('H314');
  expect(
    classifySolution({ solutes, pH: 13.7, densityGPerMl: 1.02 }).hazards.map(({ code }) => code),
  ).not.toContain('H314');
});

test('what is lighter than water is not taken at density 1', () => {
  // 25 % ammonia has a density of 0.907 g/mL: 13.3 mol/L.
  expect(massPercent('ammonia-solution', 13.3, 17.031)).toBeGreaterThan(24.5);
  expect(massPercent('ammonia-solution', 13.3, 17.031)).toBeLessThan(26);
});

test('HazCom knows no harm to water and no EUH statement, and has the lower limit for what harms the unborn', () => {
  const solutes = [
    { substance: 'lead-nitrate', molarity: 0.006 },
    { substance: 'sodium-cyanide', molarity: 0.1 },
  ];
  const [clp, hazcom] = (['CLP', 'HazCom'] as const).map((regime) => classifySolution({ solutes, regime }));
  expect(clp?.supplemental).toContain('EUH032');
  expect(hazcom?.supplemental).toEqual([]);
  expect(hazcom?.hazards.some(({ code }) => code.startsWith('H4'))).toBe(false);
  expect(hazcom?.hazards.some(({ code }) => code.startsWith('H360'))).toBe(true);
  expect(clp?.hazards.some(({ code }) => code.startsWith('H360'))).toBe(false);
});

test('no more than six precautionary statements, each with a text, eyes and skin among them where it corrodes', () => {
  for (const { substance } of bandData.rows) {
    const { precautions, hazards } = classifySolution({
      solutes: [{ substance, molarity: 5 }],
      densityGPerMl: 1,
    });
    expect(precautions.length).toBeLessThanOrEqual(MOST_PRECAUTIONS);
    for (const code of precautions) expect(precautionText(code)).not.toBe('');
    if (hazards.some(({ code }) => code === 'H314'))
      expect(precautions).toEqual(expect.arrayContaining(['P280', 'P305+P351+P338', 'P303+P361+P353']));
  }
});

test.each([
  ['sodium-hydroxide', 6, ['P280', 'P303+P361+P353', 'P305+P351+P338', 'P310']],
  ['hydrochloric-acid', 30, ['P280', 'P303+P361+P353', 'P305+P351+P338', 'P310']],
  ['sodium-hydroxide', 1, ['P280', 'P302+P352', 'P305+P351+P338', 'P332+P313', 'P337+P313']],
] as const)(
  '%s at %d %%: the statements a published sheet prints are among ours',
  (substance, percent, published) => {
    expect(
      classifySolution({
        solutes: [{ substance, molarity: molarityOf(substance, percent) }],
        densityGPerMl: 1,
      }).precautions,
    ).toEqual(expect.arrayContaining([...published]));
  },
);

test('salt water has no label elements', () => {
  expect(classifySolution({ solutes: [{ substance: 'sodium-chloride', molarity: 1 }], pH: 7 })).toEqual({
    signalWord: null,
    pictograms: [],
    hazards: [],
    precautions: [],
    supplemental: [],
    incomplete: [],
  });
});

test('an unknown substance is refused', () => {
  expect(() => classifySolution({ solutes: [{ substance: 'unobtainium', molarity: 1 }] })).toThrow(
    RangeError,
  );
});

describe('a mix is classified by what is left after neutralising', () => {
  const codesOf = (...portions: (readonly [string, number])[]) => {
    const outcome = previewMix({
      portions: portions.map(([substance, molarity], index) => ({
        label: String(index),
        volumeMl: 50,
        solutes: [{ substance, molarity }],
      })),
      activity: 'davies',
      temperatureC: 25,
      room: { volumeM3: 150, airChangesPerHour: 6, fumeCupboard: false },
    });
    if (!('decision' in outcome)) throw new Error(outcome.message);
    return outcome.classification.hazards.map(({ code }) => code);
  };
  test('equal amounts of strong acid and alkali leave salt water', () => {
    expect(codesOf(['hydrochloric-acid', 4], ['sodium-hydroxide', 4])).toEqual([]);
  });
  test('an excess of alkali still corrodes', () => {
    expect(codesOf(['hydrochloric-acid', 1], ['sodium-hydroxide', 5])).toContain('H314');
  });
  test('barium stays poisonous when its hydroxide is neutralised', () => {
    expect(codesOf(['hydrochloric-acid', 0.4], ['barium-hydroxide', 0.2]).length).toBeGreaterThan(0);
  });
  test('ammonia set free from its salt counts as ammonia', () => {
    // 2 mol/L of ammonia: about pH 11.8, past the limit of 11.5.
    expect(codesOf(['ammonium-chloride', 4], ['sodium-hydroxide', 4])).toContain('H314');
    expect(codesOf(['ammonium-chloride', 4], ['sodium-chloride', 4])).not.toContain('H314');
  });
  test('sulfide does not lose its class to the acid', () => {
    expect(codesOf(['sodium-sulfide', 1], ['hydrochloric-acid', 1])).toContain('H314');
  });
});
