import { speciate } from '@/lib/chemistry/speciation';
import type { EquilibriumState, Reaction, SpeciationInput } from '@/lib/chemistry/types';
import analyticalTexts from './published/analytical-texts.json';
import openstax14 from './published/openstax-14.json';
import openstax15 from './published/openstax-15.json';
import stressCases from './published/stress-cases.json';

type Amounts = Readonly<Record<string, number>>;
interface Expectation {
  readonly quantity: 'pH' | 'pOH' | 'p' | 'c' | 'frac' | 'solid' | 'dissolved' | 'SI' | 'found';
  readonly of?: string;
  readonly label?: string;
  readonly amounts?: Amounts;
  /** Components whose activity is held. */
  readonly held?: Amounts;
  /** false: left supersaturated. */
  readonly solids?: false;
  readonly factor?: number;
  readonly offset?: number;
  /** The total (or held activity) of a component at which another quantity reaches a target. */
  readonly find?: {
    readonly component: string;
    readonly isHeld?: boolean;
    readonly quantity: Expectation['quantity'];
    readonly of: string;
    readonly target: number;
    readonly from: number;
    readonly to: number;
    /** Other components that come with it, per mole. */
    readonly also?: Amounts;
  };
  readonly printed: string | null;
  readonly full: number;
  readonly printedTolerance?: number;
  readonly sourceIsOff?: boolean;
}
interface Row {
  readonly id: string;
  readonly recipe: string;
  readonly components: readonly string[];
  readonly amounts: Amounts;
  readonly reactions: readonly Reaction[];
  readonly held?: Amounts;
  readonly expected: readonly Expectation[];
}

/** Relative, against the multiple-precision solution; absolute for pH and other logarithms. */
const FULL_RELATIVE = 1e-8;
const FULL_LOGARITHMIC = 1e-8;
const LOGARITHMIC = new Set<Expectation['quantity']>(['pH', 'pOH', 'p', 'SI']);

const rows = [openstax14, openstax15, analyticalTexts, stressCases].flatMap(
  (file) => file.rows as unknown as Row[],
);
const cases = rows.flatMap((row) =>
  row.expected.map((expected) => ({
    name: `${row.id}: ${expected.label ?? `${expected.quantity} ${expected.of ?? ''}`}`,
    row,
    expected,
  })),
);

/** Held activities are open gases of unit Henry constant; that of H+ is the pH. */
function inputOf(row: Row, { solids }: Expectation, amounts: Amounts, held: Amounts): SpeciationInput {
  const { 'H+': hydrogen, ...others } = held;
  const gases = Object.keys(others).map((id): Reaction => ({
    species: `${id}(g)`,
    phase: 'g',
    stoich: { [id]: 1 },
    logK: 0,
  }));
  const all = row.components.map((id) => [id, amounts[id] ?? 0] as const);
  return {
    volumeL: 1,
    amounts: Object.fromEntries(all),
    reactions: [...row.reactions.filter(({ phase }) => solids !== false || phase !== 's'), ...gases],
    pH: hydrogen === undefined ? null : -Math.log10(hydrogen),
    suppress: [],
    activity: 'ideal',
    temperatureC: 25,
    headspace: gases.length === 0 ? { kind: 'none' } : { kind: 'open', partialPressuresBar: others },
  };
}

function solve(input: SpeciationInput): EquilibriumState {
  const outcome = speciate(input);
  if (!outcome.converged) throw new Error(outcome.message);
  return outcome;
}

function valueOf(row: Row, input: SpeciationInput, quantity: Expectation['quantity'], of: string): number {
  const state = solve(input);
  const molarity = (id: string) => state.species.find((species) => species.id === id)?.molarity ?? 0;
  const total = input.amounts[of] ?? 0;
  switch (quantity) {
    case 'pH':
      return state.pH ?? NaN;
    case 'pOH':
      return -Math.log10(molarity('OH-'));
    case 'p':
      return -Math.log10(molarity(of));
    case 'c':
      return molarity(of);
    case 'frac':
      return molarity(of) / total;
    case 'solid':
      return state.solids.find(({ id }) => id === of)?.moles ?? NaN;
    case 'dissolved':
      return state.species.reduce(
        (sum, { id, molarity: c }) =>
          sum + c * (id === of ? 1 : (row.reactions.find(({ species }) => species === id)?.stoich[of] ?? 0)),
        0,
      );
    case 'SI': {
      const solid = row.reactions.find(({ species }) => species === of);
      return Object.entries(solid?.stoich ?? {}).reduce(
        (sum, [id, count]) => sum + count * Math.log10(molarity(id)),
        solid?.logK ?? NaN,
      );
    }
    case 'found':
      throw new TypeError('A found amount is no property of a state');
  }
}

/** By halving on the logarithm. */
function findAmount(
  row: Row,
  expected: Expectation,
  find: NonNullable<Expectation['find']>,
  amounts: Amounts,
  held: Amounts,
): number {
  const inputAt = (x: number) => {
    if (find.isHeld) return inputOf(row, expected, amounts, { ...held, [find.component]: x });
    const also = Object.entries(find.also ?? {}).map(([id, share]) => [id, (amounts[id] ?? 0) + share * x]);
    return inputOf(row, expected, { ...amounts, [find.component]: x, ...Object.fromEntries(also) }, held);
  };
  const gapAt = (x: number) => valueOf(row, inputAt(x), find.quantity, find.of) - find.target;
  let [low, high] = [find.from, find.to];
  const rises = gapAt(high) > gapAt(low);
  expect(gapAt(high) > 0).not.toBe(gapAt(low) > 0);
  for (let halving = 0; halving < 100; halving += 1) {
    const middle = Math.sqrt(low * high);
    if (gapAt(middle) > 0 === rises) high = middle;
    else low = middle;
  }
  return Math.sqrt(low * high);
}

function computed(row: Row, expected: Expectation): number {
  const amounts = { ...row.amounts, ...expected.amounts };
  const held = { ...row.held, ...expected.held };
  const scaled = (value: number) => value * (expected.factor ?? 1) + (expected.offset ?? 0);
  const { find } = expected;
  if (!find)
    return scaled(valueOf(row, inputOf(row, expected, amounts, held), expected.quantity, expected.of ?? ''));
  const amount = findAmount(row, expected, find, amounts, held);
  if (expected.quantity === 'found' || (expected.quantity === 'c' && expected.of === find.component))
    return scaled(amount);
  const at = find.isHeld
    ? inputOf(row, expected, amounts, { ...held, [find.component]: amount })
    : inputOf(row, expected, { ...amounts, [find.component]: amount }, held);
  return scaled(valueOf(row, at, expected.quantity, expected.of ?? ''));
}

describe('published equilibria', () => {
  it.each(cases)('$name agrees with the full solution', ({ row, expected }) => {
    const found = computed(row, expected);
    const allowed = LOGARITHMIC.has(expected.quantity)
      ? FULL_LOGARITHMIC
      : FULL_RELATIVE * Math.abs(expected.full) + 1e-14;
    expect(Math.abs(found - expected.full)).toBeLessThanOrEqual(allowed);
  });

  it.each(cases.filter(({ expected }) => expected.printed !== null && !expected.sourceIsOff))(
    '$name agrees with the printed figure',
    ({ row, expected }) => {
      expect(Math.abs(computed(row, expected) - Number(expected.printed))).toBeLessThanOrEqual(
        expected.printedTolerance ?? 0,
      );
    },
  );
});
