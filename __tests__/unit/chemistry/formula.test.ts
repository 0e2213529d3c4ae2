import { chargeOf, molarMass, parseFormula, withoutPhase } from '@/lib/chemistry/formula';

describe('parseFormula', () => {
  it.each([
    ['CuSO4·5H2O', { Cu: 1, S: 1, O: 9, H: 10 }],
    ['CuSO4.5H2O', { Cu: 1, S: 1, O: 9, H: 10 }],
    ['CuSO4 * 5 H2O', { Cu: 1, S: 1, O: 9, H: 10 }],
    ['CaSO4.0.5H2O', { Ca: 1, S: 1, O: 4.5, H: 1 }],
    ['Fe(NH4)2(SO4)2·6H2O', { Fe: 1, N: 2, H: 20, S: 2, O: 14 }],
    ['[Co(NH3)6]Cl3', { Co: 1, N: 6, H: 18, Cl: 3 }],
    ['Ca(EDTA)-2', { Ca: 1, C: 10, H: 12, N: 2, O: 8 }],
    ['Cu(en)2+2', { Cu: 1, C: 4, H: 16, N: 4 }],
    ['Pb(CH3COO)2.3H2O', { Pb: 1, C: 4, H: 12, O: 7 }],
    ['PbI2(s)', { Pb: 1, I: 2 }],
    ['CO2(g)', { C: 1, O: 2 }],
    ['MnO4-', { Mn: 1, O: 4 }],
  ])('reads %s', (formula, atoms) => {
    expect(parseFormula(formula)).toEqual(atoms);
  });

  it.each(['', '   ', 'cuso4', 'Xx2', 'Cu(SO4', 'CuSO4)', '5', '()', 'Na2CO3·', 'H2O!'])(
    'refuses %p',
    (formula) => {
      expect(() => parseFormula(formula)).toThrow(RangeError);
    },
  );
});

/** Molar masses printed by certificates and data sheets of primary standards and common reagents, g/mol. */
const PRINTED: readonly (readonly [formula: string, mass: number, tolerance: number])[] = [
  ['KHC8H4O4', 204.22, 0.006],
  ['Na2CO3', 105.99, 0.006],
  ['KIO3', 214.0, 0.006],
  ['K2Cr2O7', 294.18, 0.006],
  ['CuSO4·5H2O', 249.68, 0.006],
  ['AgNO3', 169.87, 0.008],
  ['NaCN', 49.007, 0.002],
  ['Na2S2O3·5H2O', 248.18, 0.01],
  ['Na2B4O7·10H2O', 381.37, 0.02],
  ['C10H14N2Na2O8·2H2O', 372.24, 0.01],
];

describe('molarMass', () => {
  it.each(PRINTED)('of %s is the printed %d g/mol', (formula, mass, tolerance) => {
    expect(Math.abs(molarMass(formula) - mass)).toBeLessThanOrEqual(tolerance);
  });
});

describe('ids', () => {
  it.each([
    ['Cu+2', 2],
    ['CN-', -1],
    ['SO4-2', -2],
    ['Cu(NH3)4+2', 2],
    ['PbI2(s)', 0],
    ['H2O', 0],
    ['any name-3', -3],
  ])('%s carries the charge %d', (id, charge) => {
    expect(chargeOf(id)).toBe(charge);
  });

  it('lose their phase but not their brackets', () => {
    expect(withoutPhase('Pb(OH)2(s)')).toBe('Pb(OH)2');
    expect(withoutPhase('HgS(s,red)')).toBe('HgS');
    expect(withoutPhase('Cu(NH3)4+2')).toBe('Cu(NH3)4+2');
  });
});
