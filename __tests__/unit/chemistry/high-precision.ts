import Decimal from 'decimal.js';
import type { EquilibriumState, Reaction, SpeciationInput } from '@/lib/chemistry/types';

/**
 * The same equilibrium to a hundred digits, by another road: Newton's method on the Lagrange conditions in the
 * free components, with solids let in and out until the Kuhn–Tucker conditions hold to forty digits. Those
 * conditions are sufficient because the problem is convex, so wherever the search began, what it ends in is the
 * answer: balances met, no solid of negative amount, none supersaturated.
 */
const Exact = Decimal.clone({ precision: 100, toExpNeg: -400, toExpPos: 400 });
const LN10 = new Exact(10).ln();
const ZERO = new Exact(0);
const TWO_TO_60 = new Exact(2).pow(60);
const SETTLED = new Exact('1e-40');
const MOST_STEPS = 60;
const MOST_CHANGES = 40;

export interface HighPrecisionAnswer {
  /** mol/L by species id, components and products. */
  readonly molarity: ReadonlyMap<string, Decimal>;
  /** mol by solid id. */
  readonly solidMoles: ReadonlyMap<string, Decimal>;
}

interface System {
  readonly components: readonly string[];
  readonly totals: readonly Decimal[];
  readonly solutes: readonly { readonly id: string; readonly nu: readonly number[]; readonly lnK: Decimal }[];
  readonly solids: readonly { readonly id: string; readonly nu: readonly number[]; readonly lnK: Decimal }[];
}

/**
 * @param lnGamma - ln of the activity coefficient by species id; none means 0
 * @param near - where the search begins
 * @throws Error where the conditions are not met after all
 */
export function solveToHighPrecision(
  input: SpeciationInput,
  near: EquilibriumState,
  lnGamma: (id: string) => Decimal = () => ZERO,
): HighPrecisionAnswer {
  if (input.reactions === 'catalogue') throw new TypeError('A list of reactions is needed');
  const system = systemOf(input, input.reactions, lnGamma);
  const start = new Map(near.species.map(({ id, molarity }) => [id, molarity]));
  let x = system.components.map((id) => new Exact(start.get(id) ?? NaN).ln().plus(lnGamma(id)));
  let active = near.solids
    .filter(({ moles }) => moles > 0)
    .map(({ id }) => system.solids.findIndex((solid) => solid.id === id));
  for (let change = 0; change < MOST_CHANGES; change += 1) {
    const found = newton(system, active, x);
    x = found.x;
    const negative = lowest(found.multipliers);
    if (negative.value.lt(SETTLED.neg())) {
      active = active.filter((_, index) => index !== negative.index);
      continue;
    }
    const saturation = system.solids.map((solid, index) =>
      active.includes(index) ? ZERO : affinity(solid, x),
    );
    const over = lowest(saturation.map((value) => value.neg()));
    if (over.value.lt(SETTLED.neg())) {
      active = [...active, over.index];
      continue;
    }
    const volume = new Exact(input.volumeL);
    return {
      molarity: new Map(
        system.solutes.map(({ id }, index) => [id, (found.amounts[index] ?? ZERO).div(volume)]),
      ),
      solidMoles: new Map(
        system.solids.map(({ id }, index) => [
          id,
          active.includes(index) ? (found.multipliers[active.indexOf(index)] ?? ZERO) : ZERO,
        ]),
      ),
    };
  }
  throw new Error('The set of solids did not settle');
}

/** The binary value of a double of at least 2^−60 steps, not the decimal that it is printed as. */
function exactly(value: number): Decimal {
  return new Exact(
    (BigInt(Math.trunc(value * 2 ** 30)) * 2n ** 30n + BigInt(((value * 2 ** 30) % 1) * 2 ** 30)).toString(),
  ).div(TWO_TO_60);
}

function systemOf(
  input: SpeciationInput,
  reactions: readonly Reaction[],
  lnGamma: (id: string) => Decimal,
): System {
  const components = Object.keys(input.amounts);
  const lnVolume = new Exact(input.volumeL).ln();
  const nuOf = (stoich: Readonly<Record<string, number>>) => components.map((id) => stoich[id] ?? 0);
  const lnKOf = ({ logK }: Reaction) => new Exact(logK).times(LN10);
  return {
    components,
    totals: components.map((id) => exactly(input.amounts[id] ?? 0)),
    solutes: [
      ...components.map((id) => ({ id, nu: nuOf({ [id]: 1 }), lnK: lnVolume.minus(lnGamma(id)) })),
      ...reactions
        .filter(({ phase }) => phase === 'aq')
        .map((reaction) => ({
          id: reaction.species,
          nu: nuOf(reaction.stoich),
          lnK: lnKOf(reaction).plus(lnVolume).minus(lnGamma(reaction.species)),
        })),
    ],
    solids: reactions
      .filter(({ phase }) => phase === 's')
      .map((reaction) => ({ id: reaction.species, nu: nuOf(reaction.stoich), lnK: lnKOf(reaction) })),
  };
}

function affinity(
  { nu, lnK }: { readonly nu: readonly number[]; readonly lnK: Decimal },
  x: readonly Decimal[],
): Decimal {
  return nu.reduce(
    (sum, count, index) => (count === 0 ? sum : sum.plus((x[index] ?? ZERO).times(count))),
    lnK,
  );
}

function lowest(values: readonly Decimal[]): { readonly value: Decimal; readonly index: number } {
  return values.reduce((best, value, index) => (value.lt(best.value) ? { value, index } : best), {
    value: ZERO,
    index: -1,
  });
}

function newton(system: System, active: readonly number[], from: readonly Decimal[]) {
  const n = from.length;
  let x = [...from];
  let multipliers = active.map(() => ZERO);
  for (let step = 0; step < MOST_STEPS; step += 1) {
    const amounts = system.solutes.map((solute) => affinity(solute, x).exp());
    const matrix = Array.from({ length: n + active.length }, () =>
      Array.from({ length: n + active.length }, () => ZERO),
    );
    const right = [
      ...system.totals,
      ...active.map((solid) => affinity(system.solids[solid] ?? { nu: [], lnK: ZERO }, x).neg()),
    ];
    const add = (row: number, column: number, value: Decimal) => {
      const line = matrix[row];
      if (line) line[column] = (line[column] ?? ZERO).plus(value);
    };
    system.solutes.forEach(({ nu }, solute) => {
      const amount = amounts[solute] ?? ZERO;
      nu.forEach((count, row) => {
        if (count === 0) return;
        right[row] = (right[row] ?? ZERO).minus(amount.times(count));
        nu.forEach((other, column) => {
          if (other !== 0) add(row, column, amount.times(count * other));
        });
      });
    });
    active.forEach((solid, index) => {
      system.solids[solid]?.nu.forEach((count, row) => {
        add(row, n + index, new Exact(count));
        add(n + index, row, new Exact(count));
      });
    });
    const change = solveLinear(matrix, right);
    const length = change.slice(0, n).reduce((most, value) => Exact.max(most, value.abs()), ZERO);
    const share = length.gt(2) ? new Exact(2).div(length) : new Exact(1);
    x = x.map((value, index) => value.plus((change[index] ?? ZERO).times(share)));
    multipliers = active.map((_, index) => change[n + index] ?? ZERO);
    if (length.lt(SETTLED))
      return { x, multipliers, amounts: system.solutes.map((solute) => affinity(solute, x).exp()) };
  }
  throw new Error('Newton did not settle');
}

/** Gauss with partial pivoting. */
function solveLinear(matrix: Decimal[][], right: Decimal[]): Decimal[] {
  const size = right.length;
  for (let column = 0; column < size; column += 1) {
    let pivot = column;
    for (let row = column + 1; row < size; row += 1) {
      if ((matrix[row]?.[column] ?? ZERO).abs().gt((matrix[pivot]?.[column] ?? ZERO).abs())) pivot = row;
    }
    const line = matrix[pivot];
    const kept = matrix[column];
    if (!line || !kept || (line[column] ?? ZERO).isZero()) throw new Error('The matrix is singular');
    matrix[pivot] = kept;
    matrix[column] = line;
    [right[column], right[pivot]] = [right[pivot] ?? ZERO, right[column] ?? ZERO];
    for (let row = column + 1; row < size; row += 1) {
      const target = matrix[row];
      if (!target || (target[column] ?? ZERO).isZero()) continue;
      const share = (target[column] ?? ZERO).div(line[column] ?? ZERO);
      for (let k = column; k < size; k += 1)
        target[k] = (target[k] ?? ZERO).minus(share.times(line[k] ?? ZERO));
      right[row] = (right[row] ?? ZERO).minus(share.times(right[column] ?? ZERO));
    }
  }
  for (let row = size - 1; row >= 0; row -= 1) {
    let sum = right[row] ?? ZERO;
    for (let k = row + 1; k < size; k += 1)
      sum = sum.minus((matrix[row]?.[k] ?? ZERO).times(right[k] ?? ZERO));
    right[row] = sum.div(matrix[row]?.[row] ?? ZERO);
  }
  return right;
}
