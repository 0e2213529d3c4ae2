import { notConverged, stateOf } from './equilibrium-state';
import { checkInput } from './input-checks';
import { buildSystem } from './reaction-system';
import { solveEquilibrium } from './solver/solve';
import { systemProblem } from './system-problem';
import type { EquilibriumOutcome, SpeciationInput } from './types';

/**
 * What is dissolved, solid and gaseous at equilibrium.
 *
 * @returns the state, or why there is none; never a state that is not converged
 * @throws RangeError for a volume that is not positive, an amount that is not finite or negative (but H+), a
 *   component or gas the catalogue does not know, a species formed twice, or a constant beyond 1e±300
 */
export function speciate(input: SpeciationInput): EquilibriumOutcome {
  checkInput(input);
  const system = buildSystem(input);
  const { problem } = systemProblem(system, input);
  const solved = solveEquilibrium(problem);
  return solved.status === 'converged'
    ? stateOf(system, problem, input, solved)
    : notConverged(system, problem, input, solved);
}
