import { BALANCE_DONE, LEAST, LONGEST_STEP, STEP_DONE } from './dissolved-state';
import type { DissolvedState } from './dissolved-state';
import { solveInPlace } from './linear';

const MOST_ROUNDS = 60;
const MOST_STEPS = 400;
const STRENGTH_AGREES = 1e-12;
const MOST_HALVINGS = 40;
/** A step of more than this, in ln, is taken in part at first. */
const LONG = 4;
/** Rounding of the sum: a gain is no more than this below nothing. */
const NO_LOSS = 1e-13;

/** Safe steps at held coefficients, which then follow the composition until the two agree. */
export function solveSafely(state: DissolvedState): boolean {
  const kept = new Float64Array(state.y.length);
  for (let round = 0; round < MOST_ROUNDS; round += 1) {
    if (!settle(state, kept)) return false;
    if (!state.problem.activity) return true;
    const strength = state.computedStrength();
    if (Math.abs(strength - state.ionicStrength) <= STRENGTH_AGREES * strength) return true;
    state.setStrength(strength);
  }
  return false;
}

/** F of the dissolved part in the present basis. */
function potential(state: DissolvedState): number {
  let sum = 0;
  for (const amount of state.amounts) sum += amount;
  for (let r = 0; r < state.freeCount; r += 1) {
    const row = state.free[r] ?? 0;
    sum -= (state.table.totals[row] ?? 0) * (state.y[row] ?? 0);
  }
  return sum;
}

/** Damped Newton steps on F. Convexity makes each accepted step a gain; rows are scaled by their basis amount. */
function settle(state: DissolvedState, kept: Float64Array): boolean {
  for (let count = 0; count < MOST_STEPS; count += 1) {
    state.iterations += 1;
    state.computeAmounts();
    if (state.keepAbundantBasis()) state.listPlaces();
    if (state.freeCount === 0) return true;
    const worst = gradientStep(state);
    if (!Number.isFinite(worst)) return false;
    const length = state.limitStep();
    if (length < STEP_DONE && worst < BALANCE_DONE) {
      state.move(1);
      state.computeAmounts();
      return true;
    }
    const start = potential(state);
    kept.set(state.y);
    let share = length > LONG ? LONG / Math.min(length, LONGEST_STEP) : 1;
    for (let half = 0; half < MOST_HALVINGS; half += 1) {
      state.y.set(kept);
      state.move(share);
      state.computeAmounts();
      if (potential(state) <= start + NO_LOSS * Math.abs(start)) break;
      share /= 2;
    }
  }
  return false;
}

/** Newton's direction of F. @returns the worst balance relative to its basis species */
function gradientStep(state: DissolvedState): number {
  const { table, amounts, free, entryPlace, matrix, step, freeCount: f } = state;
  const { entryStart, entryValue, totals, basis } = table;
  state.unknownCount = f;
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
