import { driveToCompletion } from './drive';
import { solveInPlace } from './linear';
import type { EquilibriumProblem, EquilibriumResult } from './problem';
import type { Tableau } from './tableau';

/**
 * Chemical equilibrium at given totals.
 *
 * **The problem is convex.** With x_i = ln a_i and amounts n_j(x) = exp(lnK_j + Σ_i ν_ij x_i), let
 * F(x) = Σ_j n_j(x) − Σ_i T_i x_i, to be minimised where lnK_k + Σ_i ν_ik x_i ≤ 0 for every solid k. Each n_j
 * is the exponential of a linear function, so F is convex; its gradient, Σ_j ν_ij n_j − T_i, is the mass
 * balance of the dissolved part, and the multiplier s_k ≥ 0 of an active solid enters it as Σ_k ν_ik s_k: the
 * amount precipitated. The Karush–Kuhn–Tucker conditions are therefore the equilibrium conditions, no more
 * and no less. Because every component is itself a species, ∇²F = N·diag(n)·Nᵀ is positive definite, F strictly
 * convex, and there is at most one minimum: **one answer**. The other roots of the textbook polynomial, with
 * negative or absurd concentrations, belong to no x at all. (Amounts of solids are unique as long as the
 * active ones are independent, which is the phase rule.)
 *
 * **Digits.** The unknowns are ln amounts of a basis of the most abundant species (tableau.ts). By the exchange
 * property of bases, whatever contains a basis species is then no more abundant than it, so that in each balance
 * the basis species carries the sum, and its relative error is the relative error of the balance.
 *
 * **Steps.** Each balance is written as ln(what is made) − ln(what it is made of) = 0 and solved by Newton's
 * method. Where one term rules each side that is linear in the unknowns, so a species can move through forty
 * powers of ten in one step; at the answer it is Newton's method on ∇F = 0 with its rows scaled. Should it
 * fail, damped steps on F itself follow: slow, but sure because F is convex.
 *
 * **Solids** join and leave the active set one at a time, the most supersaturated first, from the solution of
 * the problem without them.
 */

const MOST_STEPS = 120;
const MOST_SAFE_STEPS = 400;
const MOST_CHANGES = 200;
/** Convergence of ln amounts; a hundred times what the answer needs. */
const STEP_DONE = 1e-10;
const BALANCE_DONE = 1e-11;
/** A species this many times as abundant as a basis species it contains takes its place. */
const TOO_ABUNDANT = 3;
const LONGEST_STEP = 60;
const SUPERSATURATED = 1e-9;
/** A first guess for what the totals say is absent: about what water splits into. */
const TRACE_MOL = 1e-9;

/** @throws RangeError where a total is not finite */
export function solveEquilibrium(problem: EquilibriumProblem): EquilibriumResult {
  if (problem.totals.some((total) => !Number.isFinite(total))) throw new RangeError('Totals must be finite');
  const table = driveToCompletion(problem);
  if (!table) {
    return { status: 'infeasible', iterations: 0, amounts: new Float64Array(problem.soluteCount), phaseAmounts: new Float64Array(problem.phaseCount) };
  }
  return new Search(problem, table).run();
}

class Search {
  private readonly n: number;
  private readonly solutes: number;
  /** ln amount of each basis solute; 0 for basis phases, whose ln activity is 0. */
  private readonly y: Float64Array;
  private readonly amounts: Float64Array;
  private readonly scale: number;
  private readonly free: Int32Array;
  private freeCount = 0;
  private readonly matrix: Float64Array;
  private readonly step: Float64Array;
  private readonly residual: Float64Array;
  private readonly kept: Float64Array;
  private iterations = 0;

  constructor(
    private readonly problem: EquilibriumProblem,
    private readonly table: Tableau,
  ) {
    this.n = problem.componentCount;
    this.solutes = problem.soluteCount;
    this.y = new Float64Array(this.n);
    this.amounts = new Float64Array(this.solutes);
    this.scale = Math.max(...problem.totals.map(Math.abs), 1e-300);
    this.free = new Int32Array(this.n);
    this.matrix = new Float64Array(this.n * this.n);
    this.step = new Float64Array(this.n);
    this.residual = new Float64Array(this.n);
    this.kept = new Float64Array(this.n);
  }

  run(): EquilibriumResult {
    this.leaveEmptySolids();
    this.firstGuess();
    for (let change = 0; change < MOST_CHANGES; change += 1) {
      if (!this.solveDissolved()) return this.failure('stalled');
      const leaving = this.mostNegativeSolid();
      if (leaving >= 0) {
        if (!this.deactivate(leaving)) return this.failure('stalled');
        continue;
      }
      const joining = this.mostSupersaturated();
      if (joining < 0) return this.success();
      if (!this.activate(joining)) return this.failure('infeasible');
    }
    return this.failure('iteration-limit');
  }

  private isPhase(column: number): boolean {
    return column >= this.solutes;
  }

  /** A solid of amount zero in the starting corner is no solid: a dissolved species stands for it. */
  private leaveEmptySolids(): void {
    const { table, problem } = this;
    for (let row = 0; row < this.n; row += 1) {
      const column = table.basis[row] ?? 0;
      if (!this.isPhase(column) || problem.isReservoir[column - this.solutes]) continue;
      if ((table.totals[row] ?? 0) > 1e-9 * this.scale) continue;
      let best = -1;
      let highest = -Infinity;
      for (let solute = 0; solute < this.solutes; solute += 1) {
        const lnK = table.lnK[solute] ?? 0;
        if ((table.rowOf[solute] ?? -1) < 0 && Math.abs(table.at(row, solute)) > 1e-9 && lnK > highest) {
          best = solute;
          highest = lnK;
        }
      }
      if (best >= 0) table.pivot(row, best);
    }
  }

  private firstGuess(): void {
    for (let row = 0; row < this.n; row += 1) {
      const total = this.table.totals[row] ?? 0;
      this.y[row] = this.isPhase(this.table.basis[row] ?? 0) ? 0 : Math.log(Math.max(total, 1e-7 * this.scale, TRACE_MOL));
    }
  }

  private computeAmounts(): void {
    const { table, y, n, amounts } = this;
    const { w, lnK, rowOf } = table;
    for (let solute = 0; solute < this.solutes; solute += 1) {
      const row = rowOf[solute] ?? -1;
      let ln = 0;
      if (row >= 0) ln = y[row] ?? 0;
      else {
        ln = lnK[solute] ?? 0;
        const at = solute * n;
        for (let i = 0; i < n; i += 1) {
          const entry = w[at + i] ?? 0;
          if (entry !== 0) ln += entry * (y[i] ?? 0);
        }
      }
      amounts[solute] = Math.exp(Math.min(ln, 650));
    }
  }

  /** Exchanges basis species for more abundant ones that contain them until none is left. */
  private keepAbundantBasis(): void {
    const { table, amounts, n } = this;
    for (let exchange = 0; exchange < 3 * n; exchange += 1) {
      let best = TOO_ABUNDANT;
      let row = -1;
      let column = -1;
      for (let solute = 0; solute < this.solutes; solute += 1) {
        if ((table.rowOf[solute] ?? -1) >= 0) continue;
        const amount = amounts[solute] ?? 0;
        for (let i = 0; i < n; i += 1) {
          const member = table.basis[i] ?? 0;
          if (this.isPhase(member) || table.at(i, solute) === 0) continue;
          const ratio = amount / Math.max(amounts[member] ?? 0, 1e-300);
          if (ratio > best) {
            best = ratio;
            row = i;
            column = solute;
          }
        }
      }
      if (row < 0) return;
      table.pivot(row, column);
      this.y[row] = Math.log(Math.max(amounts[column] ?? 0, 1e-300));
    }
  }

  private listFreeRows(): void {
    this.freeCount = 0;
    for (let row = 0; row < this.n; row += 1) {
      if (!this.isPhase(this.table.basis[row] ?? 0)) {
        this.free[this.freeCount] = row;
        this.freeCount += 1;
      }
    }
  }

  /** ln(made) − ln(made of) for each free row, and optionally its derivatives. @returns the largest in size */
  private balances(withMatrix: boolean): number {
    const { table, amounts, free, freeCount: f, matrix, residual, n } = this;
    const { w, totals } = table;
    if (withMatrix) matrix.fill(0, 0, f * f);
    let worst = 0;
    for (let r = 0; r < f; r += 1) {
      const row = free[r] ?? 0;
      const total = totals[row] ?? 0;
      let made = total < 0 ? -total : 0;
      let of = total > 0 ? total : 0;
      for (let solute = 0; solute < this.solutes; solute += 1) {
        const entry = w[solute * n + row] ?? 0;
        if (entry > 0) made += entry * (amounts[solute] ?? 0);
        else if (entry < 0) of -= entry * (amounts[solute] ?? 0);
      }
      made = Math.max(made, 1e-290);
      of = Math.max(of, 1e-290);
      const value = Math.log(made / of);
      residual[r] = value;
      worst = Math.max(worst, Math.abs(value));
      if (!withMatrix) continue;
      for (let solute = 0; solute < this.solutes; solute += 1) {
        const at = solute * n;
        const entry = w[at + row] ?? 0;
        if (entry === 0) continue;
        const weight = (entry * (amounts[solute] ?? 0)) / (entry > 0 ? made : of);
        for (let k = 0; k < f; k += 1) {
          const other = w[at + (free[k] ?? 0)] ?? 0;
          if (other !== 0) matrix[r * f + k] = (matrix[r * f + k] ?? 0) + weight * other;
        }
      }
    }
    return worst;
  }

  /** The dissolved part with the present solids held. @returns false where no step helps */
  private solveDissolved(): boolean {
    let isSettled = false;
    for (let count = 0; count < MOST_STEPS; count += 1) {
      this.iterations += 1;
      this.computeAmounts();
      this.keepAbundantBasis();
      this.listFreeRows();
      if (this.freeCount === 0) return true;
      const before = this.balances(true);
      const f = this.freeCount;
      for (let r = 0; r < f; r += 1) this.step[r] = -(this.residual[r] ?? 0);
      if (!solveInPlace(this.matrix, this.step, f)) break;
      const length = this.limitStep();
      if (!Number.isFinite(length)) break;
      if (length < STEP_DONE && before < BALANCE_DONE) {
        this.move(1);
        this.computeAmounts();
        isSettled = true;
        break;
      }
      this.takeStep(before);
    }
    return isSettled || this.solveSafely();
  }

  /** Shortens a step that would leave the range of floating point. @returns the largest change of a ln amount */
  private limitStep(): number {
    let length = 0;
    for (let r = 0; r < this.freeCount; r += 1) length = Math.max(length, Math.abs(this.step[r] ?? 0));
    if (length > LONGEST_STEP) for (let r = 0; r < this.freeCount; r += 1) this.step[r] = ((this.step[r] ?? 0) * LONGEST_STEP) / length;
    return length;
  }

  private move(share: number): void {
    for (let r = 0; r < this.freeCount; r += 1) {
      const row = this.free[r] ?? 0;
      this.y[row] = (this.y[row] ?? 0) + share * (this.step[r] ?? 0);
    }
  }

  /** The whole step, or half of it as often as it makes the balances much worse. */
  private takeStep(before: number): void {
    this.kept.set(this.y);
    let share = 1;
    for (let half = 0; half < 6; half += 1) {
      this.y.set(this.kept);
      this.move(share);
      this.computeAmounts();
      const after = this.balances(false);
      if (after < Math.max(before * 1.5, 0.5)) return;
      share /= 2;
    }
  }

  /** F of the dissolved part in the present basis. */
  private potential(): number {
    let sum = 0;
    for (const amount of this.amounts) sum += amount;
    for (let r = 0; r < this.freeCount; r += 1) {
      const row = this.free[r] ?? 0;
      sum -= (this.table.totals[row] ?? 0) * (this.y[row] ?? 0);
    }
    return sum;
  }

  /** Damped Newton steps on F. Convexity makes each accepted step a gain; rows are scaled by their basis amount. */
  private solveSafely(): boolean {
    for (let count = 0; count < MOST_SAFE_STEPS; count += 1) {
      this.iterations += 1;
      this.computeAmounts();
      this.keepAbundantBasis();
      this.listFreeRows();
      if (this.freeCount === 0) return true;
      const worst = this.gradientStep();
      const length = this.limitStep();
      if (!Number.isFinite(length)) return false;
      if (length < STEP_DONE && worst < 1e-9) {
        this.move(1);
        this.computeAmounts();
        return true;
      }
      const cap = length > 4 ? 4 / Math.min(length, LONGEST_STEP) : 1;
      const start = this.potential();
      this.kept.set(this.y);
      let share = cap;
      for (let half = 0; half < 40; half += 1) {
        this.y.set(this.kept);
        this.move(share);
        this.computeAmounts();
        if (this.potential() <= start + 1e-13 * Math.abs(start)) break;
        share /= 2;
      }
    }
    return false;
  }

  /** Newton direction of F. @returns the worst balance relative to its basis species */
  private gradientStep(): number {
    const { table, amounts, free, freeCount: f, matrix, step, n } = this;
    const { w, totals } = table;
    matrix.fill(0, 0, f * f);
    let worst = 0;
    for (let r = 0; r < f; r += 1) {
      const row = free[r] ?? 0;
      const scale = 1 / Math.max(amounts[table.basis[row] ?? 0] ?? 0, 1e-290);
      let sum = -(totals[row] ?? 0);
      for (let solute = 0; solute < this.solutes; solute += 1) {
        const at = solute * n;
        const entry = w[at + row] ?? 0;
        if (entry === 0) continue;
        const weighed = entry * (amounts[solute] ?? 0);
        sum += weighed;
        for (let k = 0; k < f; k += 1) {
          const other = w[at + (free[k] ?? 0)] ?? 0;
          if (other !== 0) matrix[r * f + k] = (matrix[r * f + k] ?? 0) + weighed * other * scale;
        }
      }
      step[r] = -sum * scale;
      worst = Math.max(worst, Math.abs(sum) * scale);
    }
    return solveInPlace(matrix, step, f) ? worst : NaN;
  }

  /** What of a basis phase is left when the dissolved part is taken from its total. */
  private phaseAmount(row: number): number {
    const { table, amounts, n } = this;
    let sum = table.totals[row] ?? 0;
    for (let solute = 0; solute < this.solutes; solute += 1) {
      const entry = table.w[solute * n + row] ?? 0;
      if (entry !== 0) sum -= entry * (amounts[solute] ?? 0);
    }
    return sum;
  }

  private mostNegativeSolid(): number {
    let worst = -1e-13 * this.scale;
    let found = -1;
    for (let row = 0; row < this.n; row += 1) {
      const column = this.table.basis[row] ?? 0;
      if (!this.isPhase(column) || this.problem.isReservoir[column - this.solutes]) continue;
      const amount = this.phaseAmount(row);
      if (amount < worst) {
        worst = amount;
        found = row;
      }
    }
    return found;
  }

  private deactivate(row: number): boolean {
    const { table, amounts } = this;
    let best = -1;
    let most = 0;
    for (let solute = 0; solute < this.solutes; solute += 1) {
      if ((table.rowOf[solute] ?? -1) >= 0) continue;
      const weight = Math.abs(table.at(row, solute)) * (amounts[solute] ?? 0);
      if (weight > most) {
        most = weight;
        best = solute;
      }
    }
    if (best < 0) return false;
    table.pivot(row, best);
    this.y[row] = Math.log(Math.max(amounts[best] ?? 0, 1e-300));
    return true;
  }

  private lnSaturation(phase: number): number {
    const { table, y, n } = this;
    const column = this.solutes + phase;
    if ((table.rowOf[column] ?? -1) >= 0) return 0;
    let ln = table.lnK[column] ?? 0;
    for (let i = 0; i < n; i += 1) {
      const entry = table.at(i, column);
      if (entry !== 0) ln += entry * (y[i] ?? 0);
    }
    return ln;
  }

  private mostSupersaturated(): number {
    let best = -1;
    let highest = SUPERSATURATED;
    for (let phase = 0; phase < this.problem.phaseCount; phase += 1) {
      if ((this.table.rowOf[this.solutes + phase] ?? -1) >= 0) continue;
      const ln = this.lnSaturation(phase);
      if (ln > highest) {
        highest = ln;
        best = phase;
      }
    }
    return best;
  }

  /**
   * Lets a solid join. The dissolved species that it would use up first makes room; where it is made of
   * present solids alone, the one of them that it would use up first goes.
   */
  private activate(phase: number): boolean {
    const { table, amounts } = this;
    const column = this.solutes + phase;
    let row = -1;
    let least = Infinity;
    let solidRow = -1;
    let leastSolid = Infinity;
    for (let i = 0; i < this.n; i += 1) {
      const entry = table.at(i, column);
      if (Math.abs(entry) < 1e-9) continue;
      const member = table.basis[i] ?? 0;
      if (!this.isPhase(member)) {
        const ratio = (amounts[member] ?? 0) / Math.abs(entry) + (entry < 0 ? this.scale : 0);
        if (ratio < least) {
          least = ratio;
          row = i;
        }
      } else if (entry > 0 && !this.problem.isReservoir[member - this.solutes]) {
        const ratio = Math.max(0, this.phaseAmount(i)) / entry;
        if (ratio < leastSolid) {
          leastSolid = ratio;
          solidRow = i;
        }
      }
    }
    const leaving = row >= 0 ? row : solidRow;
    if (leaving < 0) return false;
    table.pivot(leaving, column);
    this.y[leaving] = 0;
    return true;
  }

  private phaseAmounts(): Float64Array {
    const amounts = new Float64Array(this.problem.phaseCount);
    for (let row = 0; row < this.n; row += 1) {
      const column = this.table.basis[row] ?? 0;
      if (this.isPhase(column)) amounts[column - this.solutes] = this.phaseAmount(row);
    }
    this.problem.isReservoir.forEach((isReservoir, phase) => {
      if (!isReservoir) amounts[phase] = Math.max(0, amounts[phase] ?? 0);
    });
    return amounts;
  }

  private success(): EquilibriumResult {
    const { n, table, y, problem } = this;
    const lnActivity = new Float64Array(n);
    for (let i = 0; i < n; i += 1) {
      const row = table.rowOf[i] ?? -1;
      let ln = 0;
      if (row >= 0) ln = y[row] ?? 0;
      else {
        ln = table.lnK[i] ?? 0;
        for (let k = 0; k < n; k += 1) ln += table.at(k, i) * (y[k] ?? 0);
      }
      lnActivity[i] = ln - (problem.lnK[i] ?? 0);
    }
    const lnSaturation = Float64Array.from({ length: problem.phaseCount }, (_, phase) => this.lnSaturation(phase));
    return { status: 'converged', iterations: this.iterations, lnActivity, amounts: this.amounts, phaseAmounts: this.phaseAmounts(), lnSaturation };
  }

  private failure(status: 'iteration-limit' | 'stalled' | 'infeasible'): EquilibriumResult {
    return { status, iterations: this.iterations, amounts: this.amounts, phaseAmounts: this.phaseAmounts() };
  }
}
