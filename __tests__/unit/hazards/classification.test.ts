import { mixtureEstimate } from '../../../lib/hazards/classification/acute';
import { classifyMixture } from '../../../lib/hazards/classification/classify-mixture';
import type { Ingredient, Mixture, Regime, Route } from '../../../lib/hazards/classification/mixture';
import {
  hazardStatements,
  pictogramsFor,
  signalWordFor,
} from '../../../lib/hazards/classification/statements';
import { supplementalCodes } from '../../../lib/hazards/classification/supplemental';
import rowData from './classification-rows.json';

interface Row {
  readonly id: string;
  readonly kind: string;
  readonly title: string;
  readonly regime: Regime;
  readonly scope: 'all' | readonly string[];
  readonly mixture: Partial<Omit<Mixture, 'ingredients'>> & {
    readonly ingredients: readonly (Partial<Ingredient> & Pick<Ingredient, 'name' | 'percent'>)[];
  };
  readonly expected: {
    readonly classification: readonly string[];
    readonly ate?: Partial<Readonly<Record<Route, number>>>;
    readonly pictograms?: readonly string[];
    readonly signal?: string | null;
    readonly h?: readonly string[];
  };
}
const ROWS = rowData.rows as unknown as readonly Row[];

/** Endpoint of a class, in the words of the rows' scopes. */
function endpointOf(name: string): string {
  const endpoints: readonly (readonly [string, string])[] = [
    ['Skin Corr', 'skin'],
    ['Skin Irrit', 'skin'],
    ['Eye', 'eye'],
    ['Met. Corr', 'met'],
    ['Aquatic Acute', 'aquatic_acute'],
    ['Aquatic Chronic', 'aquatic_chronic'],
    ['STOT RE', 'stot_re'],
    ['STOT SE', 'stot_se'],
  ];
  return (
    endpoints.find(([head]) => name.startsWith(head))?.[1] ?? /^Acute Tox\. \d (\w+)/.exec(name)?.[1] ?? name
  );
}

function mixtureOf({ mixture, regime }: Row): Mixture {
  const ingredients = mixture.ingredients.map((ingredient) => ({
    classes: [],
    specificLimits: [],
    acuteToxicity: {},
    mAcute: 1,
    mChronic: 1,
    isAcidOrBase: false,
    isNonAdditive: false,
    corrosiveToMetalsFromPercent: null,
    supplemental: [],
    ...ingredient,
  }));
  return { pH: null, flashPointC: null, viscosity: null, ...mixture, ingredients, regime };
}

const sorted = (items: readonly string[]) => [...items].sort();

describe.each(['published', 'computed'])('classification agrees with every %s row', (kind) => {
  const rows = ROWS.filter((row) => row.kind === kind);

  test.each(rows.map((row) => [row.id, row.title, row] as const))('%s %s', (_id, _title, row) => {
    const mixture = mixtureOf(row);
    const classes = classifyMixture(mixture);
    const { scope, expected } = row;
    const inScope = classes
      .map(({ class: name }) => name)
      .filter((name) => scope === 'all' || scope.includes(endpointOf(name)));
    expect(sorted(inScope)).toEqual(sorted(expected.classification));
    if (expected.pictograms) expect(pictogramsFor(classes, row.regime)).toEqual(sorted(expected.pictograms));
    if (expected.signal !== undefined) expect(signalWordFor(classes)).toBe(expected.signal);
    if (expected.h)
      expect(
        sorted([
          ...hazardStatements(classes).map(({ code }) => code),
          ...supplementalCodes(mixture, classes),
        ]),
      ).toEqual(sorted(expected.h));
    for (const [route, ate] of Object.entries(expected.ate ?? {})) {
      // The sources round to three digits or to whole mg/kg.
      expect(Math.abs((mixtureEstimate(mixture, route as Route) ?? NaN) - ate) / ate).toBeLessThan(0.01);
    }
  });
});

test('every class that comes out says why', () => {
  for (const row of ROWS)
    for (const { because } of classifyMixture(mixtureOf(row))) expect(because).not.toBe('');
});

test('the rows are all there', () => {
  expect(ROWS.filter(({ kind }) => kind === 'published')).toHaveLength(42);
  expect(ROWS.filter(({ kind }) => kind === 'computed')).toHaveLength(29);
});
