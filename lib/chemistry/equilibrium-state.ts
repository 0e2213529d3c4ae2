import { speciationNotes } from './notes';
import { molarMassOf } from './reaction-system';
import type { ReactionSystem, SystemReaction } from './reaction-system';
import type { EquilibriumFailure, EquilibriumProblem, EquilibriumSolution } from './solver/problem';
import type {
  ComponentBalance,
  EquilibriumState,
  GasState,
  NotConverged,
  SolidState,
  SpeciationInput,
  SpeciesState,
} from './types';

const LN10 = Math.LN10;

/** I = ½ Σ c z², mol/L. */
function ionicStrengthOf(system: ReactionSystem, { amounts }: EquilibriumSolution, volumeL: number): number {
  const parts = [...system.components, ...system.aqueous];
  return parts.reduce(
    (sum, { charge }, column) => sum + (charge * charge * (amounts[column] ?? 0)) / (2 * volumeL),
    0,
  );
}

/** The answer in the words of the interface. */
export function stateOf(
  system: ReactionSystem,
  problem: EquilibriumProblem,
  input: SpeciationInput,
  solved: EquilibriumSolution,
): EquilibriumState {
  const { components, aqueous, solids } = system;
  const parts = [...components, ...aqueous.map(({ species: id, charge }) => ({ id, charge }))];
  const species: SpeciesState[] = parts.map(({ id }, column) => {
    const molarity = (solved.amounts[column] ?? 0) / input.volumeL;
    const gamma = Math.exp(solved.lnGamma[column] ?? 0);
    return { id, phase: 'aq', molarity, gamma, activity: molarity * gamma };
  });
  const solidStates: SolidState[] = solids.map(({ species: id }, index) => {
    const moles = solved.phaseAmounts[index] ?? 0;
    const mass = molarMassOf(id);
    return {
      id,
      moles,
      grams: mass === null ? null : moles * mass,
      saturationIndex: (solved.lnSaturation[index] ?? 0) / LN10,
    };
  });
  const hydrogen = components.findIndex(({ id }) => id === 'H+');
  const pH = hydrogen >= 0 ? -(solved.lnActivity[hydrogen] ?? 0) / LN10 : input.pH;
  const state = {
    converged: true as const,
    iterations: solved.iterations,
    activity: input.activity,
    temperatureC: input.temperatureC,
    pH,
    ionicStrength: ionicStrengthOf(system, solved, input.volumeL),
    species: species.sort((a, b) => b.molarity - a.molarity),
    solids: solidStates.sort((a, b) => b.moles - a.moles || b.saturationIndex - a.saturationIndex),
    gases: gasStates(system, input, solved),
    balances: residualsOf(system, problem, input, solved),
    chargeImbalance: parts.reduce(
      (sum, { charge }, column) => sum + (charge * (solved.amounts[column] ?? 0)) / input.volumeL,
      0,
    ),
  };
  return { ...state, notes: speciationNotes(system, input, state) };
}

function gasStates(
  system: ReactionSystem,
  input: SpeciationInput,
  { lnActivity, amounts }: EquilibriumSolution,
): GasState[] {
  const { components, aqueous } = system;
  const rowOf = new Map(components.map(({ id }, row) => [id, row]));
  return system.gases.map((gas: SystemReaction, index) => {
    let ln = gas.logK * LN10;
    for (const [id, coefficient] of Object.entries(gas.stoich)) {
      const row = rowOf.get(id);
      if (row !== undefined) ln += coefficient * (lnActivity[row] ?? 0);
    }
    const moles =
      input.headspace.kind === 'sealed' ? (amounts[components.length + aqueous.length + index] ?? 0) : 0;
    return { id: gas.species, partialPressureBar: Math.exp(ln), moles };
  });
}

/** Each component's total against what the answer holds of it; for a held one, what the answer holds. */
function residualsOf(
  system: ReactionSystem,
  problem: EquilibriumProblem,
  input: Pick<SpeciationInput, 'amounts'>,
  { amounts, phaseAmounts }: Pick<EquilibriumSolution, 'amounts' | 'phaseAmounts'>,
): ComponentBalance[] {
  const { componentCount: n, soluteCount, phaseCount, stoich } = problem;
  return system.components.map(({ id }, row) => {
    let sum = 0;
    let scale = Math.abs(problem.totals[row] ?? 0);
    for (let column = 0; column < soluteCount + phaseCount; column += 1) {
      const amount =
        column < soluteCount ? (amounts[column] ?? 0) : (phaseAmounts[column - soluteCount] ?? 0);
      const part = (stoich[column * n + row] ?? 0) * amount;
      sum += part;
      scale = Math.max(scale, Math.abs(part));
    }
    return {
      component: id,
      total: input.amounts[id] ?? 0,
      relativeResidual: scale === 0 ? 0 : Math.abs(sum - (problem.totals[row] ?? 0)) / scale,
    };
  });
}

const REASONS: Readonly<Record<NotConverged['reason'], string>> = {
  'iteration-limit': 'The set of solids did not settle.',
  stalled: 'No step brought the balances closer.',
  infeasible: 'No amounts of the listed species can make up these totals.',
};

/** The typed failure, with how far each balance was from closing. */
export function notConverged(
  system: ReactionSystem,
  problem: EquilibriumProblem,
  input: Pick<SpeciationInput, 'amounts'>,
  failure: EquilibriumFailure,
): NotConverged {
  const { status, iterations } = failure;
  return {
    converged: false,
    reason: status,
    message: REASONS[status],
    iterations,
    residuals: residualsOf(system, problem, input, failure),
  };
}
