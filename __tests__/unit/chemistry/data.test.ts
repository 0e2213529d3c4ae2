import { findDataFaults, hasCasCheckDigit } from '@/lib/chemistry/data-check';
import { ATOMIC_WEIGHTS } from '@/lib/chemistry/atomic-weights';
import {
  ALL_REACTIONS,
  ALL_SPECIES,
  findReaction,
  findSpecies,
  formsOnTheBench,
  isMasterComponent,
  reactionsAmong,
} from '@/lib/chemistry/species-catalogue';
import { ALL_SUBSTANCES, findSubstance } from '@/lib/chemistry/substances';

describe('data files', () => {
  it('balance in atoms and charge, with right CAS digits, masses and releases', () => {
    expect(findDataFaults()).toEqual([]);
  });

  it('give a source for every constant, alternative and ion size', () => {
    expect(ALL_REACTIONS.filter(({ source }) => source.length < 4)).toEqual([]);
    expect(
      ALL_REACTIONS.flatMap(({ alternatives }) => alternatives).filter(({ source }) => source.length < 4),
    ).toEqual([]);
    expect(
      ALL_SPECIES.filter(({ ionSizePm, ionSizeSource }) => ionSizePm !== null && ionSizeSource === null),
    ).toEqual([]);
  });

  it('release only master components', () => {
    const odd = ALL_SUBSTANCES.flatMap(({ releases }) => Object.keys(releases ?? {})).filter(
      (id) => id !== 'H2O' && !isMasterComponent(id),
    );
    expect(odd).toEqual([]);
  });

  it('keep what is not seen on the bench out of a calculation', () => {
    const sulfide = findReaction('S-2');
    expect(sulfide?.flags).toContain('off-by-default');
    expect(sulfide && formsOnTheBench(sulfide)).toBe(false);
  });

  /** Handbook values that no calculation of ours enters: log10 of the textbook constant, OpenStax Chemistry 2e, appendices H to K. */
  it.each([
    ['CH3COOH', -Math.log10(1.8e-5)],
    ['HCN', -Math.log10(4.9e-10)],
    ['NH4+', 14 + Math.log10(1.8e-5)],
    ['AgCl(s)', -Math.log10(1.6e-10)],
    ['AgI(s)', -Math.log10(1.5e-16)],
    ['Ag(NH3)2+', Math.log10(1.7e7)],
    ['Ag(CN)2-', 21],
    ['OH-', -14],
  ])('%s lies within 0.6 of its textbook log K', (id, logK) => {
    expect(Math.abs((findReaction(id)?.logK ?? NaN) - logK)).toBeLessThan(0.6);
  });
});

describe('catalogue look-ups', () => {
  it('find a substance by id and by CAS number', () => {
    expect(findSubstance('7761-88-8')).toMatchObject({ formula: 'AgNO3', releases: { 'Ag+': 1, 'NO3-': 1 } });
    expect(findSubstance('143-33-9')).toMatchObject({ formula: 'NaCN', releases: { 'Na+': 1, 'CN-': 1 } });
    for (const substance of ALL_SUBSTANCES) expect(findSubstance(substance.id)).toBe(substance);
    for (const { cas } of ALL_SUBSTANCES) expect(findSubstance(cas)?.cas).toBe(cas);
  });

  it('find nothing under another name', () => {
    expect(findSubstance('7761-88-9')).toBeNull();
    expect(findSpecies('Qq+9')).toBeNull();
    expect(findReaction('Cu+2')).toBeNull();
    expect(isMasterComponent('H2O')).toBe(false);
  });

  it('take only reactions whose components are all there', () => {
    const ids = reactionsAmong(new Set(['Cu+2', 'NH3'])).map(({ species }) => species);
    expect(ids).toEqual(expect.arrayContaining(['OH-', 'NH4+', 'Cu(NH3)4+2', 'Cu(OH)2(s)']));
    expect(ids).not.toContain('Ag(NH3)2+');
  });
});

describe('CAS check digits', () => {
  it.each(['7732-18-5', '7761-88-8', '143-33-9', '50-00-0', '58-08-2'])('accept %s', (cas) => {
    expect(hasCasCheckDigit(cas)).toBe(true);
  });

  it.each(['7732-18-6', '7761-88-0', '143-33-8', '143339', '', '1-1-1'])('refuse %p', (cas) => {
    expect(hasCasCheckDigit(cas)).toBe(false);
  });
});

/** CIAAW, standard atomic weights 2021: the full value or interval that the abridged one stands for. */
const CIAAW_2021: readonly (readonly [element: string, low: number, high: number])[] = [
  ['H', 1.00784, 1.00811],
  ['Li', 6.938, 6.997],
  ['B', 10.806, 10.821],
  ['C', 12.0096, 12.0116],
  ['N', 14.00643, 14.00728],
  ['O', 15.99903, 15.99977],
  ['Mg', 24.304, 24.307],
  ['S', 32.059, 32.076],
  ['Cl', 35.446, 35.457],
  ['Br', 79.901, 79.907],
];

/** Abridged weights are rounded to three decimals. */
const ROUNDING = 5e-4;

describe('atomic weights', () => {
  it.each(CIAAW_2021)('%s is its standard value, rounded', (element, low, high) => {
    expect(ATOMIC_WEIGHTS[element]).toBeGreaterThanOrEqual(low - ROUNDING);
    expect(ATOMIC_WEIGHTS[element]).toBeLessThanOrEqual(high + ROUNDING);
  });
});
