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
  columnCount: number;
  /** W by column. */
  readonly w: Float64Array;
  /** Which column serves as basis element i. */
  readonly basis: Int32Array;
  /** Row of a column in the basis, −1 outside it. */
  readonly rowOf: Int32Array;
  /** Σ totals in the basis. */
  readonly totals: Float64Array;
  /** lnK of each column as formed from the basis; 0 for the basis itself. */
  readonly lnK: Float64Array;
  /** The entries of the first columns that are not zero, by column: `entryStart[c]` to `entryStart[c + 1]`. */
  readonly entryStart: Int32Array;
  readonly entryRow: Int32Array;
  readonly entryValue: Float64Array;
  private readonly weights: Float64Array;
  private readonly pivotColumn: Float64Array;
  private readonly pivotRows: Int32Array;

  constructor(
    private problem: EquilibriumProblem,
    columnCount = problem.soluteCount + problem.phaseCount,
  ) {
    const { componentCount: n, soluteCount, stoich } = problem;
    this.n = n;
    this.columnCount = columnCount;
    this.w = stoich.slice(0, columnCount * n);
    this.basis = new Int32Array(n);
    this.rowOf = new Int32Array(columnCount).fill(-1);
    this.totals = problem.totals.slice();
    this.lnK = new Float64Array(columnCount);
    this.entryStart = new Int32Array(soluteCount + 1);
    this.entryRow = new Int32Array(soluteCount * n);
    this.entryValue = new Float64Array(soluteCount * n);
    this.weights = new Float64Array(n * n);
    this.pivotColumn = new Float64Array(n);
    this.pivotRows = new Int32Array(n);
    for (let i = 0; i < n; i += 1) {
      this.basis[i] = i;
      this.rowOf[i] = i;
      this.weights[i * n + i] = DENOMINATOR;
    }
    this.refreshConstants();
  }

  /** Leaves out columns beyond those of a problem, none of which may be in the basis, and takes its constants. */
  narrowTo(problem: EquilibriumProblem): void {
    this.problem = problem;
    this.columnCount = problem.soluteCount + problem.phaseCount;
  }

  at(row: number, column: number): number {
    return this.w[column * this.n + row] ?? 0;
  }

  /** Lets a column take the place of basis element `row`. The entry must not be zero. */
  pivot(row: number, column: number): void {
    const { n, w, lnK, columnCount, pivotColumn, pivotRows } = this;
    const start = column * n;
    const entry = w[start + row] ?? 0;
    const gained = lnK[column] ?? 0;
    let rowCount = 0;
    for (let i = 0; i < n; i += 1) {
      const value = w[start + i] ?? 0;
      if (value === 0 || i === row) continue;
      pivotColumn[i] = value;
      pivotRows[rowCount] = i;
      rowCount += 1;
    }
    for (let c = 0; c < columnCount; c += 1) {
      const at = c * n;
      const inRow = w[at + row] ?? 0;
      if (inRow === 0) continue;
      const share = snap(inRow / entry);
      for (let k = 0; k < rowCount; k += 1) {
        const i = pivotRows[k] ?? 0;
        w[at + i] = snap((w[at + i] ?? 0) - share * (pivotColumn[i] ?? 0));
      }
      w[at + row] = share;
      lnK[c] = (lnK[c] ?? 0) - share * gained;
    }
    this.rowOf[this.basis[row] ?? 0] = -1;
    this.basis[row] = column;
    this.rowOf[column] = row;
    lnK[column] = 0;
    this.refreshTotal(row);
    for (let k = 0; k < rowCount; k += 1) this.refreshTotal(pivotRows[k] ?? 0);
  }

  /** Total of a basis element: Σ_k W[i][component k] · T_k, summed exactly. */
  private refreshTotal(row: number): void {
    const { n, w, weights } = this;
    for (let k = 0; k < n; k += 1) weights[k * n + row] = inDenominators(w[k * n + row] ?? 0);
    this.totals[row] = exactDot(weights, row, n, this.problem.totals) / DENOMINATOR;
  }

  /** To be called after the problem's totals changed. */
  refreshTotals(): void {
    for (let row = 0; row < this.n; row += 1) this.refreshTotal(row);
  }

  /** lnK of every column as formed from the basis, without the rounding that pivots leave in it. */
  private refreshConstants(): void {
    const { n, w, basis, lnK, rowOf, columnCount } = this;
    const given = this.problem.lnK;
    for (let c = 0; c < columnCount; c += 1) {
      let sum = 0;
      if (rowOf[c] === -1) {
        sum = given[c] ?? 0;
        for (let i = 0; i < n; i += 1) {
          const value = w[c * n + i] ?? 0;
          if (value !== 0) sum -= value * (given[basis[i] ?? 0] ?? 0);
        }
      }
      lnK[c] = sum;
    }
  }

  /** Brings constants and the lists of entries up to date: after pivots, and after the problem's constants changed. */
  settle(): void {
    const { n, w, entryStart, entryRow, entryValue } = this;
    this.refreshConstants();
    let count = 0;
    for (let c = 0; c + 1 < entryStart.length; c += 1) {
      for (let i = 0; i < n; i += 1) {
        const value = w[c * n + i] ?? 0;
        if (value === 0) continue;
        entryRow[count] = i;
        entryValue[count] = value;
        count += 1;
      }
      entryStart[c + 1] = count;
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
