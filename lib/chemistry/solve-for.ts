import { FamilySolver } from './family';
import type { MixtureFamily } from './family';
import { valueOf } from './quantities';
import type { Quantity } from './quantities';
import type { EquilibriumState } from './types';

/** What is sought along a family of mixtures. */
export interface Aim {
  readonly quantity: Quantity;
  /**
   * `at-least`, `at-most`: the smallest x from which it holds. `gone`: where a solid that was there has just
   * dissolved. `least`, `most`: where the quantity is at its extreme.
   */
  readonly condition: 'at-least' | 'at-most' | 'gone' | 'least' | 'most';
  /** In the unit of the quantity; not looked at for `gone`, `least` and `most`. */
  readonly target: number;
  readonly from: number;
  readonly to: number;
}

export type Found =
  | { readonly status: 'found'; readonly x: number; readonly value: number; readonly state: EquilibriumState }
  | { readonly status: 'not-reachable'; readonly nearestX: number; readonly nearestValue: number }
  | { readonly status: 'not-converged'; readonly x: number };

/** Looked at before a bracket is narrowed; two crossings between neighbours can be missed. */
const GLANCES = 400;
const HALVINGS = 60;
/** Extremes of a smooth curve can't be told apart closer than the root of the rounding error. */
const GOLDEN_STEPS = 45;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * Finds where a condition comes to hold, by a look along the range and then halving.
 *
 * @throws RangeError for a range that is empty or not finite, or a point that `speciate` would refuse
 */
export function solveFor(family: MixtureFamily, aim: Aim): Found {
  const { from, to } = aim;
  if (!(Number.isFinite(from) && Number.isFinite(to) && to > from))
    throw new RangeError('The range must run upwards');
  const solver = new FamilySolver(family);
  const glances: { readonly x: number; readonly value: number }[] = [];
  for (let index = 0; index <= GLANCES; index += 1) {
    const x = from + ((to - from) * index) / GLANCES;
    const solved = solver.solve(x);
    if (!solved.converged) return { status: 'not-converged', x };
    glances.push({ x, value: valueOf(solved, aim.quantity) });
  }
  if (aim.condition === 'least' || aim.condition === 'most') return extreme(solver, aim, glances);
  return crossing(solver, aim, glances);
}

function holds({ condition, target }: Aim, value: number): boolean {
  if (condition === 'at-least') return value >= target;
  return value <= (condition === 'gone' ? 0 : target);
}

function crossing(
  solver: FamilySolver,
  aim: Aim,
  glances: readonly { readonly x: number; readonly value: number }[],
): Found {
  const mustFailFirst = aim.condition === 'gone';
  const first = glances[0];
  if (first && !mustFailFirst && holds(aim, first.value)) return found(solver, aim, first.x);
  for (let index = 1; index < glances.length; index += 1) {
    const [before, after] = [glances[index - 1], glances[index]];
    if (!before || !after || holds(aim, before.value) || !holds(aim, after.value)) continue;
    let [low, high] = [before.x, after.x];
    for (let halving = 0; halving < HALVINGS; halving += 1) {
      const middle = (low + high) / 2;
      const solved = solver.solve(middle);
      if (!solved.converged) return { status: 'not-converged', x: middle };
      if (holds(aim, valueOf(solved, aim.quantity))) high = middle;
      else low = middle;
    }
    return found(solver, aim, high);
  }
  const sign = aim.condition === 'at-least' ? -1 : 1;
  const nearest = glances.reduce((best, glance) => (sign * glance.value < sign * best.value ? glance : best));
  return { status: 'not-reachable', nearestX: nearest.x, nearestValue: nearest.value };
}

/** Golden section around the best glance. */
function extreme(
  solver: FamilySolver,
  aim: Aim,
  glances: readonly { readonly x: number; readonly value: number }[],
): Found {
  const sign = aim.condition === 'least' ? 1 : -1;
  const valueAt = (x: number) => {
    const solved = solver.solve(x);
    return solved.converged ? sign * valueOf(solved, aim.quantity) : NaN;
  };
  const best = glances.reduce(
    (least, { value }, index) => (sign * value < sign * (glances[least]?.value ?? NaN) ? index : least),
    0,
  );
  let low = glances[Math.max(0, best - 1)]?.x ?? aim.from;
  let high = glances[Math.min(glances.length - 1, best + 1)]?.x ?? aim.to;
  let [left, right] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
  let [atLeft, atRight] = [valueAt(left), valueAt(right)];
  for (let step = 0; step < GOLDEN_STEPS; step += 1) {
    if (atLeft <= atRight) {
      [high, right, atRight] = [right, left, atLeft];
      left = high - GOLDEN * (high - low);
      atLeft = valueAt(left);
    } else {
      [low, left, atLeft] = [left, right, atRight];
      right = low + GOLDEN * (high - low);
      atRight = valueAt(right);
    }
  }
  return found(solver, aim, (low + high) / 2);
}

function found(solver: FamilySolver, aim: Aim, x: number): Found {
  const solved = solver.solve(x);
  if (!solved.converged) return { status: 'not-converged', x };
  return { status: 'found', x, value: valueOf(solved, aim.quantity), state: solved.prepared.stateOf(solved) };
}
