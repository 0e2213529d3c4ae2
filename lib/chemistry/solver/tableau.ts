import { exactDot } from './double-double';
import type { EquilibriumProblem } from './problem';

/** Every fraction with a denominator up to 16 is a whole number of these. */
const DENOMINATOR = 720_720;
const SNAP = 1e-9;

/**
 * The columns of a problem written in a basis of n of them, as in the simplex method: column j is
 * Σ_i W[i][j] · basis[i]. Chemically: every species as formed from the n that now serve as components.
 *
 * Totals in the new basis are computed from the given ones without rounding on the way. A basis of the most
 * abundant species therefore keeps the digits that are lost when the free ions are the unknowns.
 */
export class Tableau {
  readonly n: number;
  readonly columnCount: number;
  /** W by column. */
  readonly w: Float64Array;
  /** Which column serves as basis element i. */
  readonly basis: Int32Array;
  /** Row of a column in the basis, −1 outside it. */
  readonly rowOf: Int32Array;
  /** Σ totals in the basis. */
  readonly totals: Float64Array;
  /** lnK of each column as formed from the basis. */
  readonly lnK: Float64Array;
  private readonly weights: Float64Array;

  constructor(
    private readonly problem: EquilibriumProblem,
    columnCount = problem.soluteCount + problem.phaseCount,
  ) {
    const { componentCount: n, stoich } = problem;
    this.n = n;
    this.columnCount = columnCount;
    this.w = Float64Array.from(stoich.subarray(0, columnCount * n));
    this.basis = Int32Array.from({ length: n }, (_, i) => i);
    this.rowOf = new Int32Array(columnCount).fill(-1);
    for (let i = 0; i < n; i += 1) this.rowOf[i] = i;
    this.totals = Float64Array.from(problem.totals);
    this.lnK = new Float64Array(columnCount);
    this.weights = new Float64Array(n * n);
    this.refreshConstants();
  }

  at(row: number, column: number): number {
    return this.w[column * this.n + row] ?? 0;
  }

  /** Lets a column take the place of basis element `row`. The entry must not be zero. */
  pivot(row: number, column: number): void {
    const { n, w, columnCount } = this;
    const start = column * n;
    const entry = w[start + row] ?? 0;
    const pivotColumn = w.slice(start, start + n);
    for (let c = 0; c < columnCount; c += 1) {
      const at = c * n;
      const inRow = w[at + row] ?? 0;
      if (inRow === 0) continue;
      const share = inRow / entry;
      for (let i = 0; i < n; i += 1) w[at + i] = snap((w[at + i] ?? 0) - share * (pivotColumn[i] ?? 0));
      w[at + row] = snap(share);
    }
    this.rowOf[this.basis[row] ?? 0] = -1;
    this.basis[row] = column;
    this.rowOf[column] = row;
    this.refreshTotals();
    this.refreshConstants();
  }

  /** Totals of the basis: row i is Σ_k W[i][component k] · T_k, summed exactly. */
  private refreshTotals(): void {
    const { n, w, weights, totals } = this;
    for (let k = 0; k < n * n; k += 1) weights[k] = inDenominators(w[k] ?? 0);
    for (let i = 0; i < n; i += 1) totals[i] = exactDot(weights, i, n, this.problem.totals) / DENOMINATOR;
  }

  /** To be called after the problem's constants changed too. */
  refreshConstants(): void {
    const { n, w, basis, lnK, columnCount } = this;
    const given = this.problem.lnK;
    for (let c = 0; c < columnCount; c += 1) {
      let sum = given[c] ?? 0;
      for (let i = 0; i < n; i += 1) {
        const entry = w[c * n + i] ?? 0;
        if (entry !== 0) sum -= entry * (given[basis[i] ?? 0] ?? 0);
      }
      lnK[c] = this.rowOf[c] === -1 ? sum : 0;
    }
  }
}

/** An entry in units of 1/DENOMINATOR: a whole number where it is a simple fraction, which then sums without error. */
function inDenominators(value: number): number {
  const scaled = value * DENOMINATOR;
  const whole = Math.round(scaled);
  return Math.abs(whole - scaled) < SNAP * DENOMINATOR ? whole : scaled;
}

/** Stoichiometric coefficients are simple fractions; rounding of a pivot must not stay in them. */
function snap(value: number): number {
  return inDenominators(value) / DENOMINATOR;
}
