import { appearanceOf } from './appearance';
import { FamilySolver } from './family';
import type { MixtureFamily } from './family';
import type { SolvedPoint } from './prepared-system';
import { molarityIn, phOf, valueOf } from './quantities';
import type { Quantity } from './quantities';

/** A limit whose crossing the reader wants to see. */
export interface Limit {
  readonly label: string;
  readonly quantity: Quantity;
  readonly value: number;
}

export interface SweepRange {
  readonly from: number;
  readonly to: number;
  /** Points, ends included; 2 or more. */
  readonly points: number;
  readonly limits?: readonly Limit[];
}

export type SweepEvent = { readonly x: number } & (
  | { readonly kind: 'solid-appears' | 'solid-gone'; readonly solid: string }
  | { readonly kind: 'colour'; readonly before: string; readonly after: string }
  | { readonly kind: 'equivalence'; readonly pH: number }
  | { readonly kind: 'limit'; readonly label: string; readonly isRising: boolean }
);

export interface Sweep {
  /** Only the points that converged. */
  readonly x: readonly number[];
  readonly pH: readonly (number | null)[];
  readonly ionicStrength: readonly number[];
  /** mol/L by species that any point has, each as long as `x`; 0 where a point lacks it. */
  readonly species: readonly { readonly id: string; readonly molarity: readonly number[] }[];
  /** mol by solid that forms anywhere, each as long as `x`. */
  readonly solids: readonly { readonly id: string; readonly moles: readonly number[] }[];
  /** Colour of the solution at each point. */
  readonly colours: readonly { readonly hex: string; readonly words: string }[];
  /** In the order of x, each located to a millionth of it. */
  readonly events: readonly SweepEvent[];
  readonly failedAt: readonly number[];
}

/** A solid counts as there from this on, mol: what rounding leaves is less. */
const THERE_FROM_MOL = 1e-12;
const HALVINGS = 40;
/** A steepest place counts as an equivalence where the curve is this many times as steep as it is on the whole. */
const STEEP_TIMES = 4;
const GOLDEN = (Math.sqrt(5) - 1) / 2;
const GOLDEN_STEPS = 40;
const LN10 = Math.LN10;

/**
 * A family of mixtures over a range, each point solved from its neighbour, with what happens on the way.
 *
 * @throws RangeError for a range that is empty or not finite, fewer than two points, or a point that `speciate`
 *   would refuse
 */
export function sweep(family: MixtureFamily, { from, to, points, limits = [] }: SweepRange): Sweep {
  if (!(Number.isFinite(from) && Number.isFinite(to) && to > from))
    throw new RangeError('The range must run upwards');
  if (!Number.isInteger(points) || points < 2) throw new RangeError('A sweep needs two points or more');
  const solver = new FamilySolver(family);
  const failedAt: number[] = [];
  const x: number[] = [];
  const solved: SolvedPoint[] = [];
  for (let index = 0; index < points; index += 1) {
    const at = from + ((to - from) * index) / (points - 1);
    const point = solver.solve(at);
    if (point.converged) {
      x.push(at);
      solved.push(point);
    } else failedAt.push(at);
  }
  const colours = solved.map(colourOf);
  return {
    x,
    pH: solved.map(phOf),
    ionicStrength: solved.map(({ solution }) => solution.ionicStrength),
    species: seriesOf(solved),
    solids: solidSeriesOf(solved),
    colours,
    events: eventsOf(solver, { x, solved, colours }, limits),
    failedAt,
  };
}

function seriesOf(solved: readonly SolvedPoint[]): Sweep['species'] {
  const ids = new Set(solved.flatMap(({ prepared }) => [...prepared.columnOf.keys()]));
  return [...ids].map((id) => ({ id, molarity: solved.map((point) => molarityIn(point, id)) }));
}

function solidMoles({ prepared, solution }: SolvedPoint, id: string): number {
  const index = prepared.system.solids.findIndex(({ species }) => species === id);
  return index < 0 ? 0 : (solution.phaseAmounts[index] ?? 0);
}

function solidSeriesOf(solved: readonly SolvedPoint[]): Sweep['solids'] {
  return solidIds(solved).map((id) => ({ id, moles: solved.map((point) => solidMoles(point, id)) }));
}

/** Solids that are there at any of the points. */
function solidIds(solved: readonly SolvedPoint[]): string[] {
  const ids = new Set<string>();
  for (const { prepared, solution } of solved) {
    prepared.system.solids.forEach(({ species }, index) => {
      if ((solution.phaseAmounts[index] ?? 0) > THERE_FROM_MOL) ids.add(species);
    });
  }
  return [...ids];
}

function colourOf(point: SolvedPoint): { readonly hex: string; readonly words: string } {
  const species = [...point.prepared.columnOf.keys()].map((id) => ({ id, molarity: molarityIn(point, id) }));
  return appearanceOf({ species, solids: [] }).solution;
}

interface Trace {
  readonly x: readonly number[];
  readonly solved: readonly SolvedPoint[];
  readonly colours: readonly { readonly words: string }[];
}

function eventsOf(solver: FamilySolver, trace: Trace, limits: readonly Limit[]): SweepEvent[] {
  const events: SweepEvent[] = [];
  for (const solid of solidIds(trace.solved)) {
    changes(
      solver,
      trace,
      (point) => solidMoles(point, solid) > THERE_FROM_MOL,
      (x, isThere) => {
        events.push({ kind: isThere ? 'solid-appears' : 'solid-gone', solid, x });
      },
    );
  }
  for (const { label, quantity, value } of limits) {
    changes(
      solver,
      trace,
      (point) => valueOf(point, quantity) >= value,
      (x, isRising) => events.push({ kind: 'limit', label, isRising, x }),
    );
  }
  colourEvents(solver, trace, events);
  equivalences(solver, trace, events);
  return events.sort((a, b) => a.x - b.x);
}

/** Places between neighbours where a yes turns to a no or back, narrowed by halving. */
function changes(
  solver: FamilySolver,
  { x, solved }: Trace,
  test: (point: SolvedPoint) => boolean,
  tell: (x: number, after: boolean) => void,
): void {
  let before = solved[0] ? test(solved[0]) : false;
  for (let index = 1; index < solved.length; index += 1) {
    const point = solved[index];
    const after = point ? test(point) : before;
    if (after !== before)
      tell(
        narrow(solver, x[index - 1] ?? 0, x[index] ?? 0, (middle) => test(middle) === after),
        after,
      );
    before = after;
  }
}

/** The x from which a test holds, between one where it does not and one where it does. */
function narrow(
  solver: FamilySolver,
  from: number,
  to: number,
  holds: (point: SolvedPoint) => boolean,
): number {
  let [low, high] = [from, to];
  for (let halving = 0; halving < HALVINGS; halving += 1) {
    const middle = (low + high) / 2;
    const point = solver.solve(middle);
    if (point.converged && !holds(point)) low = middle;
    else high = middle;
  }
  return high;
}

function colourEvents(solver: FamilySolver, { x, colours }: Trace, events: SweepEvent[]): void {
  for (let index = 1; index < colours.length; index += 1) {
    const [before, after] = [colours[index - 1]?.words ?? '', colours[index]?.words ?? ''];
    if (before === after) continue;
    const at = narrow(solver, x[index - 1] ?? 0, x[index] ?? 0, (point) => colourOf(point).words !== before);
    events.push({ kind: 'colour', before, after, x: at });
  }
}

/** Where the pH is steepest: local maxima of |dpH/dx|, by its derivative and a golden section. */
function equivalences(solver: FamilySolver, { x, solved }: Trace, events: SweepEvent[]): void {
  const [first, last] = [x[0] ?? 0, x.at(-1) ?? 0];
  const pH = solved.map(phOf);
  const overall = Math.abs((pH.at(-1) ?? NaN) - (pH[0] ?? NaN)) / (last - first);
  if (!(overall > 0) || solved[0]?.point.pH !== null) return;
  const along = solver.slope(first, last);
  const steepness = (at: number) => {
    const point = solver.solve(at);
    if (!point.converged) return 0;
    const answer = point.prepared.respond({
      amounts: along.amounts,
      lnVolume: along.volumeL / point.point.volumeL,
    });
    const row = point.prepared.columnOf.get('H+') ?? -1;
    return Math.abs((answer?.lnActivity[row] ?? 0) / LN10);
  };
  const steps = x
    .slice(1)
    .map((right, index) => Math.abs(((pH[index + 1] ?? 0) - (pH[index] ?? 0)) / (right - (x[index] ?? 0))));
  for (let index = 1; index + 1 < steps.length; index += 1) {
    const step = steps[index] ?? 0;
    if (step < STEEP_TIMES * overall || step < (steps[index - 1] ?? 0) || step <= (steps[index + 1] ?? 0))
      continue;
    const at = steepest(steepness, x[index - 1] ?? first, x[index + 2] ?? last);
    const point = solver.solve(at);
    if (point.converged) events.push({ kind: 'equivalence', pH: phOf(point) ?? NaN, x: at });
  }
}

function steepest(steepness: (x: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  let [left, right] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
  let [atLeft, atRight] = [steepness(left), steepness(right)];
  for (let step = 0; step < GOLDEN_STEPS; step += 1) {
    if (atLeft >= atRight) {
      [high, right, atRight] = [right, left, atLeft];
      left = high - GOLDEN * (high - low);
      atLeft = steepness(left);
    } else {
      [low, left, atLeft] = [left, right, atRight];
      right = low + GOLDEN * (high - low);
      atRight = steepness(right);
    }
  }
  return (low + high) / 2;
}
