import type { DissolvedPart } from './dissolved';
import type { EquilibriumChange, EquilibriumProblem, EquilibriumResponse } from './problem';
import type { Tableau } from './tableau';

/**
 * Derivative of an answer along a change of the problem, by the implicit function theorem in the basis that
 * carries the digits. Written for n_c = exp(lnK_c + Σ W y − lnγ_c(u)): what a change does to the amounts while
 * the unknowns stay shifts the balances, and the unknowns answer the shift.
 *
 * @returns null where the answer is singular
 */
export function respondTo(
  change: EquilibriumChange,
  problem: EquilibriumProblem,
  table: Tableau,
  dissolved: DissolvedPart,
): EquilibriumResponse | null {
  const { componentCount: n, soluteCount, phaseCount } = problem;
  const { w, basis } = table;
  const { amounts, slope, ionicStrength } = dissolved;

  const direct = Float64Array.from({ length: soluteCount }, (_, solute) => {
    let sum = change.lnK[solute] ?? 0;
    for (let i = 0; i < n; i += 1) sum -= (w[solute * n + i] ?? 0) * (change.lnK[basis[i] ?? 0] ?? 0);
    return sum;
  });
  const totals = Float64Array.from({ length: n }, (_, row) => {
    let sum = 0;
    for (let k = 0; k < n; k += 1) sum += (w[k * n + row] ?? 0) * (change.totals[k] ?? 0);
    return sum;
  });

  const shift = new Float64Array(n + 1);
  shift[n] = change.lnStrengthPerMol;
  for (let row = 0; row < n; row += 1) shift[row] = -(totals[row] ?? 0);
  const perMol = problem.activity?.strengthPerMol;
  for (let solute = 0; solute < soluteCount; solute += 1) {
    const moved = (amounts[solute] ?? 0) * (direct[solute] ?? 0);
    for (let row = 0; row < n; row += 1) shift[row] = (shift[row] ?? 0) + (w[solute * n + row] ?? 0) * moved;
    if (perMol) shift[n] = (shift[n] ?? 0) + ((perMol[solute] ?? 0) * moved) / ionicStrength;
  }

  const answer = new Float64Array(n + 1);
  if (!dissolved.respond(shift, answer)) return null;
  const followed = (column: number) => {
    let sum = 0;
    for (let i = 0; i < n; i += 1) sum += (w[column * n + i] ?? 0) * (answer[i] ?? 0);
    return sum;
  };
  const lnAmounts = Float64Array.from(
    direct,
    (moved, solute) => moved + followed(solute) - (slope[solute] ?? 0) * ionicStrength * (answer[n] ?? 0),
  );
  const lnActivity = Float64Array.from(
    { length: n },
    (_, component) => (direct[component] ?? 0) + followed(component) - (change.lnK[component] ?? 0),
  );
  const phaseAmounts = new Float64Array(phaseCount);
  for (let row = 0; row < n; row += 1) {
    const column = basis[row] ?? 0;
    if (column < soluteCount) continue;
    let sum = totals[row] ?? 0;
    for (let solute = 0; solute < soluteCount; solute += 1) {
      sum -= (w[solute * n + row] ?? 0) * (amounts[solute] ?? 0) * (lnAmounts[solute] ?? 0);
    }
    phaseAmounts[column - soluteCount] = sum;
  }
  return { lnAmounts, lnActivity, phaseAmounts };
}
