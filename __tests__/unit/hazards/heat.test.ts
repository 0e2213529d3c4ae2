import { pourMix } from '../../../lib/chemistry/mixing';
import type { Portion } from '../../../lib/chemistry/types';
import { screenedBottle } from '../../../lib/hazards/contents';
import { adiabaticRiseK, heatFinding } from '../../../lib/hazards/heat';

const portion = (label: string, volumeMl: number, ...solutes: (readonly [string, number])[]): Portion => ({
  label,
  volumeMl,
  solutes: solutes.map(([substance, molarity]) => ({ substance, molarity })),
});
const total = (portions: readonly Portion[]) => portions.reduce((sum, { volumeMl }) => sum + volumeMl, 0);

/** By hand: 55.8 kJ per mol of water formed; integral heat of diluting sulfuric acid, its mass and heat capacity from handbook tables. */
const WORKED: readonly (readonly [string, number, readonly Portion[]])[] = [
  [
    '50 mL each of 2 mol/L acid and alkali',
    13.3,
    [portion('a', 50, ['hydrochloric-acid', 2]), portion('b', 50, ['sodium-hydroxide', 2])],
  ],
  [
    '25 mL each of 6 mol/L acid and alkali',
    40,
    [portion('a', 25, ['hydrochloric-acid', 6]), portion('b', 25, ['sodium-hydroxide', 6])],
  ],
  [
    '10 mL of concentrated sulfuric acid in 90 mL of water',
    33.1,
    [portion('a', 90), portion('b', 10, ['sulfuric-acid', 18.39])],
  ],
  [
    '50 mL of concentrated sulfuric acid in 50 mL of water',
    147.2,
    [portion('a', 50), portion('b', 50, ['sulfuric-acid', 18.39])],
  ],
];

test.each(WORKED)('%s: a rise of about %d K', (_title, riseK, portions) => {
  const rise = adiabaticRiseK(portions.map(screenedBottle), total(portions));
  expect(Math.abs(rise - riseK) / riseK).toBeLessThan(0.03);
});

function severityOf(portions: readonly Portion[]) {
  const mix = pourMix({ portions, activity: 'davies', temperatureC: 25 });
  if (!mix.converged) throw new Error('not converged');
  return heatFinding(portions.map(screenedBottle), mix, 25)?.severity ?? null;
}

test.each([
  ['a titration at 0.1 mol/L says nothing', 0.1, null],
  ['2 mol/L, 13 K: still nothing', 2, null],
  ['4 mol/L, 27 K: caution', 4, 'caution'],
  ['7 mol/L, 47 K: controlled', 7, 'controlled'],
  ['12 mol/L, 80 K, boiling: review', 12, 'review'],
] as const)('%s', (_title, molarity, severity) => {
  expect(
    severityOf([
      portion('acid', 50, ['hydrochloric-acid', molarity]),
      portion('alkali', 50, ['sodium-hydroxide', molarity]),
    ]),
  ).toBe(severity);
});

test('salts that neutralise nothing grow no hotter', () => {
  const portions = [portion('a', 50, ['sodium-chloride', 5]), portion('b', 50, ['potassium-nitrate', 2])];
  expect(adiabaticRiseK(portions.map(screenedBottle), 100)).toBe(0);
});
