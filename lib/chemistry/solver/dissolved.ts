import { solveInPlace } from './linear';
import type { EquilibriumProblem } from './problem';
import type { Tableau } from './tableau';

const MOST_STEPS = 120;
const MOST_SAFE_STEPS = 400;
const MOST_ROUNDS = 60;
/** A last step this short leaves an error of about its square. */
const STEP_DONE = 1e-6;
const BALANCE_DONE = 1e-6;
const ROUGH = 1e-2;
/** A step is halved until it helps, but not below this share. */
const LEAST_SHARE = 1 / 64;
/** A species this many times as abundant as a basis species it contains takes its place. */
const TOO_ABUNDANT = 3;
const LONGEST_STEP = 60;
const LONGEST_STRENGTH_STEP = 2;
/** Balances this close, in ln, to being met: from here the ionic strength joins the unknowns. */
const NEAR = 0.5;
const STRENGTH_AGREES = 1e-12;
/** Smallest amount and ionic strength that still have digits to work with. */
const LEAST = 1e-290;
const LEAST_STRENGTH = 1e-30;

/**
 * The dissolved part of an equilibrium while the present solids are held.
 *
 * Unknown are y_i = ln(amount · γ) of each basis solute and, where activities count, u = ln of the ionic strength.
 * Each balance is written as ln(what is made) − ln(what it is made of) = 0, the ionic strength as
 * ln(Σ n z² / 2V) − u = 0, and Newton's method solves all of them together. Where one term rules each side that
 * is linear in the unknowns, so a species can move through forty powers of ten in one step. Far from the answer
 * the coefficients are held, so that a wild first guess can't mislead them.
 */
export class DissolvedPart {
  /** ln(amount · γ) by row of the basis; 0 for phases. */
  readonly y: Float64Array;
  readonly amounts: Float64Array;
  readonly lnGamma: Float64Array;
  iterations = 0;
  ionicStrength = 0;
  private isCoupled = false;
  /** dlnγ/dI by solute. */
  readonly slope: Float64Array;
  private readonly free: Int32Array;
  /** Place, among the free rows, of each entry of the tableau; −1 where a phase stands. */
  private readonly entryPlace: Int32Array;
  /** The same by row. */
  private readonly placeOf: Int32Array;
  private freeCount = 0;
  private unknownCount = 0;
  private readonly made: Float64Array;
  private readonly madeOf: Float64Array;
  private readonly matrix: Float64Array;
  private readonly step: Float64Array;
  private readonly residual: Float64Array;
  private readonly kept: Float64Array;

  constructor(
    private readonly problem: EquilibriumProblem,
    private readonly table: Tableau,
  ) {
    const { componentCount: n, soluteCount } = problem;
    this.y = new Float64Array(n);
    this.amounts = new Float64Array(soluteCount);
    this.lnGamma = new Float64Array(soluteCount);
    this.slope = new Float64Array(soluteCount);
    this.free = new Int32Array(n);
    this.entryPlace = new Int32Array(soluteCount * n);
    this.placeOf = new Int32Array(n);
    this.made = new Float64Array(n);
    this.madeOf = new Float64Array(n);
    this.matrix = new Float64Array((n + 1) * (n + 1));
    this.step = new Float64Array(n + 1);
    this.residual = new Float64Array(n + 1);
    this.kept = new Float64Array(n);
  }

  isPhase(column: number): boolean {
    return column >= this.problem.soluteCount;
  }

  /** Sets the amount of the solute that has just entered the basis. */
  place(row: number, amount: number): void {
    const column = this.table.basis[row] ?? 0;
    this.y[row] = this.isPhase(column) ? 0 : Math.log(Math.max(amount, LEAST)) + (this.lnGamma[column] ?? 0);
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
    return this.solveSlowly() && this.hasDigits();
  }

  /** Which rows are free, and where each entry of the tableau belongs among them. */
  private listPlaces(): void {
    const { table, free, placeOf, entryPlace } = this;
    this.freeCount = 0;
    for (let row = 0; row < table.n; row += 1) {
      const isFree = !this.isPhase(table.basis[row] ?? 0);
      placeOf[row] = isFree ? this.freeCount : -1;
      if (!isFree) continue;
      free[this.freeCount] = row;
      this.freeCount += 1;
    }
    const { entryStart, entryRow } = table;
    const entryCount = entryStart[entryStart.length - 1] ?? 0;
    for (let k = 0; k < entryCount; k += 1) entryPlace[k] = placeOf[entryRow[k] ?? 0] ?? -1;
  }

  private hasDigits(): boolean {
    for (let r = 0; r < this.freeCount; r += 1) {
      if ((this.amounts[this.table.basis[this.free[r] ?? 0] ?? 0] ?? 0) < LEAST) return false;
    }
    return true;
  }

  computeAmounts(): void {
    const { table, y, amounts, lnGamma } = this;
    const { lnK, entryStart, entryRow, entryValue } = table;
    for (let solute = 0; solute < amounts.length; solute += 1) {
      let ln = (lnK[solute] ?? 0) - (lnGamma[solute] ?? 0);
      const end = entryStart[solute + 1] ?? 0;
      for (let k = entryStart[solute] ?? 0; k < end; k += 1)
        ln += (entryValue[k] ?? 0) * (y[entryRow[k] ?? 0] ?? 0);
      amounts[solute] = Math.exp(Math.min(ln, 650));
    }
  }

  private computedStrength(): number {
    const perMol = this.problem.activity?.strengthPerMol;
    if (!perMol) return 0;
    let sum = 0;
    for (let solute = 0; solute < perMol.length; solute += 1)
      sum += (perMol[solute] ?? 0) * (this.amounts[solute] ?? 0);
    return Math.max(sum, LEAST_STRENGTH);
  }

  private setStrength(strength: number): void {
    this.ionicStrength = strength;
    this.problem.activity?.fill(strength, this.lnGamma, this.slope);
  }

  /** Exchanges basis species for more abundant ones that contain them until none is left. @returns whether any was */
  private keepAbundantBasis(): boolean {
    const { table, amounts } = this;
    for (let exchange = 0; exchange < 3 * table.n; exchange += 1) {
      const { entryStart, entryRow, rowOf, basis } = table;
      let best = TOO_ABUNDANT;
      let row = -1;
      let column = -1;
      for (let solute = 0; solute < amounts.length; solute += 1) {
        if ((rowOf[solute] ?? -1) >= 0) continue;
        const amount = amounts[solute] ?? 0;
        const end = entryStart[solute + 1] ?? 0;
        for (let k = entryStart[solute] ?? 0; k < end; k += 1) {
          const member = basis[entryRow[k] ?? 0] ?? 0;
          if (this.isPhase(member) || amount <= best * (amounts[member] ?? 0)) continue;
          best = amount / Math.max(amounts[member] ?? 0, LEAST);
          row = entryRow[k] ?? 0;
          column = solute;
        }
      }
      if (row < 0) return exchange > 0;
      table.pivot(row, column);
      this.place(row, amounts[column] ?? 0);
      table.settle();
    }
    return true;
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

  private limitStep(): number {
    const { step, freeCount: f, unknownCount } = this;
    let length = 0;
    for (let r = 0; r < f; r += 1) length = Math.max(length, Math.abs(step[r] ?? 0));
    if (length > LONGEST_STEP)
      for (let r = 0; r < f; r += 1) step[r] = ((step[r] ?? 0) * LONGEST_STEP) / length;
    if (unknownCount === f) return length;
    const strengthStep = step[f] ?? 0;
    step[f] = Math.min(Math.max(strengthStep, -LONGEST_STRENGTH_STEP), LONGEST_STRENGTH_STEP);
    return Math.max(length, Math.abs(strengthStep));
  }

  private move(share: number): void {
    const { step, free, y, freeCount: f } = this;
    for (let r = 0; r < f; r += 1) {
      const row = free[r] ?? 0;
      y[row] = (y[row] ?? 0) + share * (step[r] ?? 0);
    }
    if (this.unknownCount > f) this.setStrength(this.ionicStrength * Math.exp(share * (step[f] ?? 0)));
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

  /** Safe steps at held coefficients, which then follow the composition until the two agree. */
  private solveSlowly(): boolean {
    this.isCoupled = false;
    for (let round = 0; round < MOST_ROUNDS; round += 1) {
      if (!this.solveSafely()) return false;
      if (!this.problem.activity) return true;
      const strength = this.computedStrength();
      if (Math.abs(strength - this.ionicStrength) <= STRENGTH_AGREES * strength) return true;
      this.setStrength(strength);
    }
    return false;
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
      if (this.keepAbundantBasis()) this.listPlaces();
      if (this.freeCount === 0) return true;
      const worst = this.gradientStep();
      if (!Number.isFinite(worst)) return false;
      const length = this.limitStep();
      if (length < STEP_DONE && worst < BALANCE_DONE) {
        this.move(1);
        this.computeAmounts();
        return true;
      }
      const start = this.potential();
      this.kept.set(this.y);
      let share = length > 4 ? 4 / Math.min(length, LONGEST_STEP) : 1;
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

  /** Newton's direction of F. @returns the worst balance relative to its basis species */
  private gradientStep(): number {
    const { table, amounts, free, entryPlace, matrix, step, freeCount: f } = this;
    const { entryStart, entryValue, totals, basis } = table;
    this.unknownCount = f;
    matrix.fill(0, 0, f * f);
    for (let r = 0; r < f; r += 1) step[r] = totals[free[r] ?? 0] ?? 0;
    for (let solute = 0; solute < amounts.length; solute += 1) {
      const begin = entryStart[solute] ?? 0;
      const end = entryStart[solute + 1] ?? 0;
      for (let k = begin; k < end; k += 1) {
        const r = entryPlace[k] ?? -1;
        if (r < 0) continue;
        const part = (entryValue[k] ?? 0) * (amounts[solute] ?? 0);
        step[r] = (step[r] ?? 0) - part;
        for (let other = begin; other < end; other += 1) {
          const column = entryPlace[other] ?? -1;
          if (column >= 0)
            matrix[r * f + column] = (matrix[r * f + column] ?? 0) + part * (entryValue[other] ?? 0);
        }
      }
    }
    let worst = 0;
    for (let r = 0; r < f; r += 1) {
      const scale = 1 / Math.max(amounts[basis[free[r] ?? 0] ?? 0] ?? 0, LEAST);
      step[r] = (step[r] ?? 0) * scale;
      worst = Math.max(worst, Math.abs(step[r] ?? 0));
      for (let k = 0; k < f; k += 1) matrix[r * f + k] = (matrix[r * f + k] ?? 0) * scale;
    }
    return solveInPlace(matrix, step, f) ? worst : NaN;
  }
}
