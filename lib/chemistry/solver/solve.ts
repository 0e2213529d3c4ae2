import { DissolvedPart } from './dissolved';
import { driveToCompletion } from './drive';
import type {
  EquilibriumChange,
  EquilibriumFailure,
  EquilibriumProblem,
  EquilibriumResponse,
  EquilibriumResult,
} from './problem';
import { respondTo } from './respond';
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
 * active ones are independent, which is the phase rule. Activity coefficients enter as constants of the problem
 * at its own ionic strength.)
 *
 * **Digits.** The unknowns are ln amounts of a basis of the most abundant species (tableau.ts). By the exchange
 * property of bases, whatever contains a basis species is then no more abundant than it, so that in each balance
 * the basis species carries the sum, and its relative error is the relative error of the balance.
 *
 * **Steps.** Newton's method on the logarithms of the balances (dissolved.ts); should it fail, damped steps on F
 * itself (safe-steps.ts): slow, but sure because F is convex.
 *
 * **Solids** join and leave the active set one at a time, the most supersaturated first, from the solution of
 * the problem without them.
 */

const MOST_CHANGES = 200;
const MOST_ROUGH_CHANGES = 60;
/** When a solid has to go or may come: below minus this share of the largest total, above this ln saturation. */
const EXACTLY = { amount: 1e-13, lnSaturation: 1e-9 };
/** The same while the dissolved part is only near its answer. */
const ROUGHLY = { amount: 0.01, lnSaturation: 0.1 };
/** A first guess for what the totals say is absent: about what water splits into. */
const TRACE_MOL = 1e-9;

/** @throws RangeError where a total is not finite */
export function solveEquilibrium(problem: EquilibriumProblem): EquilibriumResult {
  return new EquilibriumSolver(problem).solve();
}

/**
 * Solves one problem again and again, each time from its last answer. Totals and constants may change between
 * solves; a total may not become zero or cease to be, since that changes which species there are.
 */
export class EquilibriumSolver {
  private search: Search | null = null;

  constructor(private readonly problem: EquilibriumProblem) {}

  /** @throws RangeError where a total is not finite */
  solve(): EquilibriumResult {
    if (this.problem.totals.some((total) => !Number.isFinite(total)))
      throw new RangeError('Totals must be finite');
    const warm = this.search?.run() ?? null;
    if (warm?.status === 'converged') return warm;
    const table = driveToCompletion(this.problem);
    if (!table) return noAmountsFit(this.problem);
    const search = new Search(this.problem, table);
    search.begin();
    const cold = search.run();
    this.search = cold.status === 'converged' ? search : null;
    return cold;
  }

  /** How the last answer follows a small change. @returns null where there is none or it is singular */
  respond(change: EquilibriumChange): EquilibriumResponse | null {
    return this.search?.respond(change) ?? null;
  }
}

function noAmountsFit({ soluteCount, phaseCount }: EquilibriumProblem): EquilibriumFailure {
  return {
    status: 'infeasible',
    iterations: 0,
    amounts: new Float64Array(soluteCount),
    phaseAmounts: new Float64Array(phaseCount),
  };
}

/** The active set of solids around the dissolved part. */
class Search {
  private readonly n: number;
  private readonly solutes: number;
  private readonly dissolved: DissolvedPart;
  private scale = 0;

  constructor(
    private readonly problem: EquilibriumProblem,
    private readonly table: Tableau,
  ) {
    this.n = problem.componentCount;
    this.solutes = problem.soluteCount;
    this.dissolved = new DissolvedPart(problem, table);
  }

  /** From the corner of complete reaction. */
  begin(): void {
    this.setScale();
    this.leaveEmptySolids();
    for (let row = 0; row < this.n; row += 1)
      this.dissolved.place(row, Math.max(this.table.totals[row] ?? 0, 1e-7 * this.scale, TRACE_MOL));
  }

  run(): EquilibriumResult {
    const { dissolved } = this;
    dissolved.iterations = 0;
    this.table.refreshTotals();
    this.setScale();
    let isRough = this.table.columnCount > this.solutes;
    for (let change = 0; change < MOST_CHANGES; change += 1) {
      if (!dissolved.solve(isRough)) return this.failure('stalled');
      const tolerance = isRough ? ROUGHLY : EXACTLY;
      const leaving = this.mostNegativeSolid(tolerance.amount);
      const joining = leaving < 0 ? this.mostSupersaturated(tolerance.lnSaturation) : -1;
      if (leaving >= 0) {
        if (!this.deactivate(leaving)) return this.failure('stalled');
      } else if (joining >= 0) {
        if (!this.activate(joining)) return this.failure('infeasible');
      } else if (!isRough) return this.success();
      isRough = (leaving >= 0 || joining >= 0) && change < MOST_ROUGH_CHANGES;
    }
    return this.failure('iteration-limit');
  }

  respond(change: EquilibriumChange): EquilibriumResponse | null {
    return respondTo(change, this.problem, this.table, this.dissolved);
  }

  private setScale(): void {
    this.scale = 1e-300;
    for (const total of this.problem.totals) this.scale = Math.max(this.scale, Math.abs(total));
  }

  /** Whether a basis element is a solid that can dissolve, rather than a solute or a reservoir. */
  private isSolid(column: number): boolean {
    return column >= this.solutes && this.problem.isReservoir[column - this.solutes] !== true;
  }

  /** A solid of amount zero in the starting corner is no solid: a dissolved species stands for it. */
  private leaveEmptySolids(): void {
    const { table } = this;
    for (let row = 0; row < this.n; row += 1) {
      if (!this.isSolid(table.basis[row] ?? 0) || (table.totals[row] ?? 0) > 1e-9 * this.scale) continue;
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

  /** What of a basis phase is left when the dissolved part is taken from its total. */
  private phaseAmount(row: number): number {
    const { table, dissolved, n } = this;
    let sum = table.totals[row] ?? 0;
    for (let solute = 0; solute < this.solutes; solute += 1) {
      const entry = table.w[solute * n + row] ?? 0;
      if (entry !== 0) sum -= entry * (dissolved.amounts[solute] ?? 0);
    }
    return sum;
  }

  private mostNegativeSolid(tolerance: number): number {
    let worst = -tolerance * this.scale;
    let found = -1;
    for (let row = 0; row < this.n; row += 1) {
      if (!this.isSolid(this.table.basis[row] ?? 0)) continue;
      const amount = this.phaseAmount(row);
      if (amount < worst) {
        worst = amount;
        found = row;
      }
    }
    return found;
  }

  /** The dissolved species that holds most of a solid's matter takes its place. */
  private deactivate(row: number): boolean {
    const { table, dissolved } = this;
    let best = -1;
    let most = 0;
    for (let solute = 0; solute < this.solutes; solute += 1) {
      if ((table.rowOf[solute] ?? -1) >= 0) continue;
      const weight = Math.abs(table.at(row, solute)) * (dissolved.amounts[solute] ?? 0);
      if (weight > most) {
        most = weight;
        best = solute;
      }
    }
    if (best < 0) return false;
    table.pivot(row, best);
    dissolved.place(row, dissolved.amounts[best] ?? 0);
    return true;
  }

  private lnSaturation(phase: number): number {
    const { table, dissolved, n } = this;
    const column = this.solutes + phase;
    if ((table.rowOf[column] ?? -1) >= 0) return 0;
    let ln = table.lnK[column] ?? 0;
    for (let i = 0; i < n; i += 1) {
      const entry = table.at(i, column);
      if (entry !== 0) ln += entry * (dissolved.y[i] ?? 0);
    }
    return ln;
  }

  private mostSupersaturated(tolerance: number): number {
    let best = -1;
    let highest = tolerance;
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
    const { table, dissolved } = this;
    const column = this.solutes + phase;
    let row = -1;
    let least = Infinity;
    let solidRow = -1;
    let leastSolid = Infinity;
    for (let i = 0; i < this.n; i += 1) {
      const entry = table.at(i, column);
      if (Math.abs(entry) < 1e-9) continue;
      const member = table.basis[i] ?? 0;
      if (member < this.solutes) {
        const ratio = (dissolved.amounts[member] ?? 0) / Math.abs(entry) + (entry < 0 ? this.scale : 0);
        if (ratio < least) {
          least = ratio;
          row = i;
        }
      } else if (entry > 0 && this.isSolid(member)) {
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
    dissolved.place(leaving, 1);
    return true;
  }

  private phaseAmounts(): Float64Array {
    const amounts = new Float64Array(this.problem.phaseCount);
    for (let row = 0; row < this.n; row += 1) {
      const column = this.table.basis[row] ?? 0;
      if (column < this.solutes) continue;
      const amount = this.phaseAmount(row);
      amounts[column - this.solutes] = this.isSolid(column) ? Math.max(0, amount) : amount;
    }
    return amounts;
  }

  private success(): EquilibriumResult {
    const { n, table, problem, dissolved } = this;
    const lnActivity = new Float64Array(n);
    for (let i = 0; i < n; i += 1) {
      let ln = table.lnK[i] ?? 0;
      for (let k = 0; k < n; k += 1) ln += table.at(k, i) * (dissolved.y[k] ?? 0);
      lnActivity[i] = ln - (problem.lnK[i] ?? 0);
    }
    const lnSaturation = new Float64Array(problem.phaseCount);
    for (let phase = 0; phase < lnSaturation.length; phase += 1)
      lnSaturation[phase] = this.lnSaturation(phase);
    return {
      status: 'converged',
      iterations: dissolved.iterations,
      lnActivity,
      amounts: dissolved.amounts.slice(),
      lnGamma: dissolved.lnGamma.slice(),
      ionicStrength: dissolved.ionicStrength,
      phaseAmounts: this.phaseAmounts(),
      lnSaturation,
    };
  }

  private failure(status: EquilibriumFailure['status']): EquilibriumFailure {
    return {
      status,
      iterations: this.dissolved.iterations,
      amounts: this.dissolved.amounts.slice(),
      phaseAmounts: this.phaseAmounts(),
    };
  }
}
