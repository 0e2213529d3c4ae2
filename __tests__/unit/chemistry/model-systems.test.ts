import { pourMix } from '@/lib/chemistry/mixing';
import type { Mix } from '@/lib/chemistry/types';
import { complex, litre, molarity, solid, solidMoles, solved } from './kit';

function relativeGap(found: number, expected: number): number {
  return Math.abs(found / expected - 1);
}

describe('copper(II) with ammonia, one complex of K 1.7e13', () => {
  const state = solved(
    litre({
      amounts: { 'Cu+2': 0.2, NH3: 0.5 },
      reactions: [complex('Cu(NH3)4+2', { 'Cu+2': 1, NH3: 4 }, 1.7e13)],
    }),
  );

  it('leaves what driving to completion and going back by hand leaves', () => {
    expect(molarity(state, 'Cu(NH3)4+2')).toBeCloseTo(0.12486, 5);
    expect(molarity(state, 'NH3')).toBeCloseTo(5.59e-4, 6);
    expect(molarity(state, 'Cu+2')).toBeCloseTo(0.07514, 5);
  });

  it('meets the constant and both balances', () => {
    const [copper, ammonia, bound] = [
      molarity(state, 'Cu+2'),
      molarity(state, 'NH3'),
      molarity(state, 'Cu(NH3)4+2'),
    ];
    expect(relativeGap(bound / (copper * ammonia ** 4), 1.7e13)).toBeLessThan(1e-10);
    expect(relativeGap(copper + bound, 0.2)).toBeLessThan(1e-14);
    expect(relativeGap(ammonia + 4 * bound, 0.5)).toBeLessThan(1e-14);
  });
});

describe('silver with cyanide', () => {
  const dicyano = complex('Ag(CN)2-', { 'Ag+': 1, 'CN-': 2 }, 1e21);

  it('gives the hand-worked free ions where silver is in excess', () => {
    const state = solved(litre({ amounts: { 'Ag+': 0.0288, 'CN-': 0.0385 }, reactions: [dicyano] }));
    expect(relativeGap(molarity(state, 'Ag(CN)2-'), 0.01925)).toBeLessThan(1e-6);
    expect(relativeGap(molarity(state, 'CN-'), 4.5e-11)).toBeLessThan(0.02);
    expect(
      relativeGap(molarity(state, 'CN-'), Math.sqrt(0.01925 / (1e21 * (0.0288 - 0.01925)))),
    ).toBeLessThan(1e-6);
  });

  it('dilutes 25 mL of 0.075 mol/L and 40 mL of 0.100 mol/L in the whole 65 mL, so that cyanide is in excess', () => {
    const mix = pourMix({
      portions: [
        { label: 'silver nitrate', solutes: [{ substance: '7761-88-8', molarity: 0.075 }], volumeMl: 25 },
        { label: 'sodium cyanide', solutes: [{ substance: '143-33-9', molarity: 0.1 }], volumeMl: 40 },
      ],
      activity: 'ideal',
      temperatureC: 25,
    });
    expect(mix.converged).toBe(true);
    const { finalVolumeMl, diluted, equilibrium } = mix as Mix;
    expect(finalVolumeMl).toBe(65);
    expect(diluted.map(({ molarity: strength }) => strength)).toEqual([
      expect.closeTo(0.02885, 5),
      expect.closeTo(0.06154, 5),
    ]);
    const excess = 0.06154 - 2 * 0.02885;
    expect(
      relativeGap(
        molarity(equilibrium, 'CN-') + molarity(equilibrium, 'HCN') + molarity(equilibrium, 'Ag(CN)3-2'),
        excess,
      ),
    ).toBeLessThan(0.05);
    expect(molarity(equilibrium, 'Ag+')).toBeLessThan(1e-15);
  });
});

describe('lead iodide with PbI4 2-', () => {
  const reactions = [
    solid('PbI2(s)', { 'Pb+2': 1, 'I-': 2 }, 9.8e-9),
    complex('PbI4-2', { 'Pb+2': 1, 'I-': 4 }, 3e4),
  ];

  it('saturates where the textbook says, and never at the root of hundreds of mol/L', () => {
    const state = solved(litre({ amounts: { 'Pb+2': 0.1, 'I-': 0.2 }, reactions }));
    expect(molarity(state, 'Pb+2')).toBeCloseTo(0.00135, 5);
    expect(molarity(state, 'I-')).toBeCloseTo(0.0027, 5);
    expect(relativeGap(molarity(state, 'PbI4-2'), 2.1e-9)).toBeLessThan(0.03);
    expect(solidMoles(state, 'PbI2(s)')).toBeCloseTo(0.1 - 0.00135, 5);
  });

  it.each([1e-3, 0.1, 1, 10, 300])('holds no more than was put in, for %d mol of lead iodide', (mol) => {
    const state = solved(litre({ amounts: { 'Pb+2': mol, 'I-': 2 * mol }, reactions }));
    const dissolved = molarity(state, 'Pb+2') + molarity(state, 'PbI4-2');
    expect(dissolved).toBeLessThanOrEqual(Math.min(mol, 0.0014));
    expect(relativeGap(dissolved + solidMoles(state, 'PbI2(s)'), mol)).toBeLessThan(1e-12);
  });
});
