import { BALANCE_DONE, DissolvedState, LEAST, STEP_DONE } from './dissolved-state';
import { solveInPlace } from './linear';
import type { EquilibriumProblem } from './problem';
import { solveSafely } from './safe-steps';
import type { Tableau } from './tableau';

const MOST_STEPS = 120;
const ROUGH = 1e-2;
/** A step is halved until it helps, but not below this share. */
const LEAST_SHARE = 1 / 64;
/** Balances this close, in ln, to being met: from here the ionic strength joins the unknowns. */
const NEAR = 0.5;

/**
 * The dissolved part of an equilibrium, solved while the present solids are held.
 *
 * Each balance is written as ln(what is made) − ln(what it is made of) = 0, the ionic strength as
 * ln(Σ n z² / 2V) − u = 0, and Newton's method solves all of them together. Where one term rules each side that
 * is linear in the unknowns, so a species can move through forty powers of ten in one step. Far from the answer
 * the coefficients are held, so that a wild first guess can't mislead them.
 */
export class DissolvedPart extends DissolvedState {
  private isCoupled = false;
  private readonly made: Float64Array;
  private readonly madeOf: Float64Array;
  private readonly residual: Float64Array;
  private readonly kept: Float64Array;

  constructor(problem: EquilibriumProblem, table: Tableau) {
    super(problem, table);
    const n = problem.componentCount;
    this.made = new Float64Array(n);
    this.madeOf = new Float64Array(n);
    this.residual = new Float64Array(n + 1);
    this.kept = new Float64Array(n);
  }

  /**
   * @param roughly - ends as soon as the balances are near enough to tell which solids will be there
   * @returns false where no step helps; never leaves an answer that is not settled
   */
  solve(roughly: boolean): boolean {
    this.table.settle();
    this.computeAmounts();
    this.keepAbundantBasis();
    this.listPlaces();
    let worst = this.computeBalances();
    for (let count = 0; count < MOST_STEPS; count += 1) {
      if (this.freeCount === 0 && !this.problem.activity) return true;
      if (this.problem.activity && !this.isCoupled && worst < NEAR) {
        this.isCoupled = true;
        this.setStrength(this.computedStrength());
        this.computeAmounts();
        worst = this.computeBalances();
      }
      if (roughly && worst < ROUGH) return true;
      this.iterations += 1;
      const length = this.newtonStep();
      if (!Number.isFinite(length)) break;
      if (length < STEP_DONE && worst < BALANCE_DONE) {
        this.move(1);
        this.computeAmounts();
        return this.hasDigits();
      }
      worst = this.takeStep(worst);
      if (this.keepAbundantBasis()) {
        this.listPlaces();
        worst = this.computeBalances();
      }
    }
    this.isCoupled = false;
    return solveSafely(this) && this.hasDigits();
  }

  /** What each free row makes and is made of, and the ln of their ratio. @returns the largest of those in size */
  private computeBalances(): number {
    const { table, amounts, free, entryPlace, made, madeOf, residual, freeCount: f } = this;
    const { entryStart, entryValue, totals } = table;
    for (let r = 0; r < f; r += 1) {
      const total = totals[free[r] ?? 0] ?? 0;
      made[r] = Math.max(-total, LEAST);
      madeOf[r] = Math.max(total, LEAST);
    }
    for (let solute = 0; solute < amounts.length; solute += 1) {
      const amount = amounts[solute] ?? 0;
      const end = entryStart[solute + 1] ?? 0;
      for (let k = entryStart[solute] ?? 0; k < end; k += 1) {
        const r = entryPlace[k] ?? -1;
        if (r < 0) continue;
        const part = (entryValue[k] ?? 0) * amount;
        if (part > 0) made[r] = (made[r] ?? 0) + part;
        else madeOf[r] = (madeOf[r] ?? 0) - part;
      }
    }
    let worst = 0;
    for (let r = 0; r < f; r += 1) {
      const value = Math.log((made[r] ?? 1) / (madeOf[r] ?? 1));
      residual[r] = value;
      worst = Math.max(worst, Math.abs(value));
    }
    if (this.isCoupled) {
      const value = Math.log(this.computedStrength() / this.ionicStrength);
      residual[f] = value;
      worst = Math.max(worst, Math.abs(value));
    }
    return worst;
  }

  /** Newton's direction, shortened where it would leave the range of numbers. @returns the largest change; NaN where there is none */
  private newtonStep(): number {
    const { step, residual } = this;
    const size = this.fillMatrix();
    for (let r = 0; r < size; r += 1) step[r] = -(residual[r] ?? 0);
    return solveInPlace(this.matrix, step, size) ? this.limitStep() : NaN;
  }

  /** Derivatives of the balances by the unknowns. @returns how many unknowns there are */
  private fillMatrix(): number {
    const { table, amounts, entryPlace, made, madeOf, matrix, freeCount: f } = this;
    const { entryStart, entryValue } = table;
    const size = this.isCoupled ? f + 1 : f;
    this.unknownCount = size;
    matrix.fill(0, 0, size * size);
    const perMol = this.isCoupled ? this.problem.activity?.strengthPerMol : undefined;
    const strength = perMol ? this.computedStrength() : 1;
    for (let solute = 0; solute < amounts.length; solute += 1) {
      const amount = amounts[solute] ?? 0;
      const begin = entryStart[solute] ?? 0;
      const end = entryStart[solute + 1] ?? 0;
      const byStrength = perMol ? -this.ionicStrength * (this.slope[solute] ?? 0) : 0;
      const ofStrength = perMol ? ((perMol[solute] ?? 0) * amount) / strength : 0;
      for (let k = begin; k < end; k += 1) {
        const r = entryPlace[k] ?? -1;
        if (r < 0) continue;
        const value = entryValue[k] ?? 0;
        const weight = (value * amount) / ((value > 0 ? made[r] : madeOf[r]) ?? 1);
        const line = r * size;
        for (let other = begin; other < end; other += 1) {
          const column = entryPlace[other] ?? -1;
          if (column < 0) continue;
          matrix[line + column] = (matrix[line + column] ?? 0) + weight * (entryValue[other] ?? 0);
        }
        if (!perMol) continue;
        matrix[r * size + f] = (matrix[r * size + f] ?? 0) + weight * byStrength;
        matrix[f * size + r] = (matrix[f * size + r] ?? 0) + ofStrength * value;
      }
      if (perMol) matrix[f * size + f] = (matrix[f * size + f] ?? 0) + ofStrength * byStrength;
    }
    if (perMol) matrix[f * size + f] = (matrix[f * size + f] ?? 0) - 1;
    return size;
  }

  /** The whole step, or half of it as often as it makes the balances much worse. @returns the largest balance after it */
  private takeStep(before: number): number {
    this.kept.set(this.y);
    const strength = this.ionicStrength;
    for (let share = 1; ; share /= 2) {
      this.move(share);
      this.computeAmounts();
      const after = this.computeBalances();
      if (share < LEAST_SHARE || after < Math.max(before * 1.5, NEAR)) return after;
      this.y.set(this.kept);
      if (this.isCoupled) this.setStrength(strength);
    }
  }

  /**
   * How the unknowns answer a shift of the balances, at the answer (implicit function theorem).
   * @param shift - mol by row of the basis, made less total; then that of ln(ionic strength)
   * @param answer - receives the change of y by row of the basis; then that of u
   * @returns false where the answer is singular
   */
  respond(shift: Float64Array, answer: Float64Array): boolean {
    const { problem, free, step, matrix, freeCount: f } = this;
    const n = problem.componentCount;
    answer.fill(0);
    if (f === 0) return true;
    this.isCoupled = problem.activity !== null;
    this.computeBalances();
    const size = this.fillMatrix();
    for (let r = 0; r < f; r += 1) step[r] = -(shift[free[r] ?? 0] ?? 0) / (this.made[r] ?? 1);
    if (size > f) step[f] = -(shift[n] ?? 0);
    if (!solveInPlace(matrix, step, size)) return false;
    for (let r = 0; r < f; r += 1) answer[free[r] ?? 0] = step[r] ?? 0;
    answer[n] = size > f ? (step[f] ?? 0) : 0;
    return true;
  }
}
