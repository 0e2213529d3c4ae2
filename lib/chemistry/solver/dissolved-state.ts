import type { EquilibriumProblem } from './problem';
import type { Tableau } from './tableau';

/** A species this many times as abundant as a basis species it contains takes its place. */
const TOO_ABUNDANT = 3;
/** A last step this short leaves an error of about its square. */
export const STEP_DONE = 1e-6;
export const BALANCE_DONE = 1e-6;
export const LONGEST_STEP = 60;
const LONGEST_STRENGTH_STEP = 2;
/** Smallest amount and ionic strength that still have digits to work with. */
export const LEAST = 1e-290;
const LEAST_STRENGTH = 1e-30;
/** exp of more than this leaves the range of numbers once it is summed. */
const LARGEST_LN = 650;

/**
 * The unknowns of the dissolved part while the present solids are held, and what follows from them.
 *
 * Unknown are y_i = ln(amount · γ) of each basis solute and, where activities count, u = ln of the ionic strength.
 */
export class DissolvedState {
  /** ln(amount · γ) by row of the basis; 0 for phases. */
  readonly y: Float64Array;
  readonly amounts: Float64Array;
  readonly lnGamma: Float64Array;
  /** dlnγ/dI by solute. */
  readonly slope: Float64Array;
  ionicStrength = 0;
  iterations = 0;
  /** The rows of the basis that are solutes. */
  readonly free: Int32Array;
  freeCount = 0;
  /** Place, among the free rows, of each entry of the tableau; −1 where a phase stands. */
  readonly entryPlace: Int32Array;
  /** The same by row. */
  private readonly placeOf: Int32Array;
  /** The free rows and, where it is solved for too, the ionic strength. */
  unknownCount = 0;
  readonly matrix: Float64Array;
  readonly step: Float64Array;

  constructor(
    readonly problem: EquilibriumProblem,
    readonly table: Tableau,
  ) {
    const { componentCount: n, soluteCount } = problem;
    this.y = new Float64Array(n);
    this.amounts = new Float64Array(soluteCount);
    this.lnGamma = new Float64Array(soluteCount);
    this.slope = new Float64Array(soluteCount);
    this.free = new Int32Array(n);
    this.entryPlace = new Int32Array(soluteCount * n);
    this.placeOf = new Int32Array(n);
    this.matrix = new Float64Array((n + 1) * (n + 1));
    this.step = new Float64Array(n + 1);
  }

  isPhase(column: number): boolean {
    return column >= this.problem.soluteCount;
  }

  /** Sets the amount of the solute that has just entered the basis. */
  place(row: number, amount: number): void {
    const column = this.table.basis[row] ?? 0;
    this.y[row] = this.isPhase(column) ? 0 : Math.log(Math.max(amount, LEAST)) + (this.lnGamma[column] ?? 0);
  }

  /** Which rows are free, and where each entry of the tableau belongs among them. */
  listPlaces(): void {
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

  /** Whether every basis species still has digits to work with. */
  hasDigits(): boolean {
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
      amounts[solute] = Math.exp(Math.min(ln, LARGEST_LN));
    }
  }

  computedStrength(): number {
    const perMol = this.problem.activity?.strengthPerMol;
    if (!perMol) return 0;
    let sum = 0;
    for (let solute = 0; solute < perMol.length; solute += 1)
      sum += (perMol[solute] ?? 0) * (this.amounts[solute] ?? 0);
    return Math.max(sum, LEAST_STRENGTH);
  }

  setStrength(strength: number): void {
    this.ionicStrength = strength;
    this.problem.activity?.fill(strength, this.lnGamma, this.slope);
  }

  /** Exchanges basis species for more abundant ones that contain them until none is left. @returns whether any was */
  keepAbundantBasis(): boolean {
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

  /** Shortens the step where it would leave the range of numbers. @returns the largest change before that */
  limitStep(): number {
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

  /** Takes a share of the step. */
  move(share: number): void {
    const { step, free, y, freeCount: f } = this;
    for (let r = 0; r < f; r += 1) {
      const row = free[r] ?? 0;
      y[row] = (y[row] ?? 0) + share * (step[r] ?? 0);
    }
    if (this.unknownCount > f) this.setStrength(this.ionicStrength * Math.exp(share * (step[f] ?? 0)));
  }
}
