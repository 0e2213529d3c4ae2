import { activityLaw } from './activity';
import { speciationNotes } from './notes';
import { buildSystem, gasId, molarMassOf } from './reaction-system';
import type { ReactionSystem, SystemReaction } from './reaction-system';
import type { EquilibriumFailure, EquilibriumProblem, EquilibriumSolution } from './solver/problem';
import { solveEquilibrium } from './solver/solve';
import { findReaction, isMasterComponent } from './species-catalogue';
import { GAS_CONSTANT, KELVIN_AT_0C } from './temperature';
import type {
  ComponentBalance,
  EquilibriumOutcome,
  EquilibriumState,
  GasState,
  NotConverged,
  Reaction,
  SolidState,
  SpeciationInput,
  SpeciesState,
} from './types';

const LN10 = Math.LN10;
const PASCAL_PER_BAR = 1e5;
const LITRES_PER_M3 = 1000;
/** The tables of water's constants end here. */
const LOWEST_C = 0;
const HIGHEST_C = 60;
/** Beyond this no double holds the amounts. */
const LARGEST_LOG_K = 300;

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
  const problem = problemOf(system, input);
  const solved = solveEquilibrium(problem);
  if (solved.status !== 'converged') return notConverged(system, problem, solved);
  return stateOf(system, problem, input, solved);
}

function checkInput({ volumeL, amounts, reactions, pH, temperatureC, headspace }: SpeciationInput): void {
  if (!(volumeL > 0) || !Number.isFinite(volumeL)) throw new RangeError('The volume must be positive');
  if (pH !== null && !Number.isFinite(pH)) throw new RangeError('The pH must be finite');
  if (!(temperatureC >= LOWEST_C && temperatureC <= HIGHEST_C))
    throw new RangeError(`The temperature must be ${LOWEST_C} to ${HIGHEST_C} °C`);
  for (const [id, amount] of Object.entries(amounts)) {
    if (!Number.isFinite(amount) || (amount < 0 && id !== 'H+'))
      throw new RangeError(`The amount of ${id} must be finite and not negative`);
    if (reactions === 'catalogue' && !isMasterComponent(id))
      throw new RangeError(`${id} is not a component of the catalogue`);
  }
  if (reactions !== 'catalogue') checkReactions(reactions, amounts);
  if (headspace.kind === 'sealed' && !(headspace.volumeL > 0 && Number.isFinite(headspace.volumeL)))
    throw new RangeError('The headspace must be positive');
  if (headspace.kind === 'open') {
    for (const [gas, bar] of Object.entries(headspace.partialPressuresBar)) {
      if (!(bar > 0 && Number.isFinite(bar)))
        throw new RangeError(`The partial pressure of ${gas} must be positive`);
      const isKnown =
        reactions === 'catalogue'
          ? findReaction(gasId(gas)) !== null
          : reactions.some(({ species }) => species === gasId(gas));
      if (!isKnown) throw new RangeError(`No reaction forms ${gasId(gas)}`);
    }
  }
}

function checkReactions(reactions: readonly Reaction[], amounts: SpeciationInput['amounts']): void {
  const taken = new Set([...Object.keys(amounts), ...reactions.flatMap(({ stoich }) => Object.keys(stoich))]);
  for (const { species, logK, stoich } of reactions) {
    if (taken.has(species)) throw new RangeError(`${species} stands twice`);
    taken.add(species);
    if (!(Math.abs(logK) <= LARGEST_LOG_K))
      throw new RangeError(`log K of ${species} must lie within ±${LARGEST_LOG_K}`);
    if (!Object.values(stoich).every(Number.isFinite))
      throw new RangeError(`The coefficients of ${species} must be finite`);
  }
}

/** Row numbers of a system in its problem. */
function columnsOf(system: ReactionSystem, input: SpeciationInput) {
  const open = input.headspace.kind === 'open' ? input.headspace.partialPressuresBar : {};
  const openGases = Object.entries(open).flatMap(([name, bar]) => {
    const gas = system.gases.find(({ species }) => species === gasId(name));
    return gas ? [{ gas, lnPressure: Math.log(bar) }] : [];
  });
  const sealed = input.headspace.kind === 'sealed' ? system.gases : [];
  const holdsPh = input.pH !== null && system.components.some(({ id }) => id === 'H+');
  return { sealed, openGases, holdsPh };
}

function problemOf(system: ReactionSystem, input: SpeciationInput): EquilibriumProblem {
  const { components, aqueous, solids } = system;
  const n = components.length;
  const { sealed, openGases, holdsPh } = columnsOf(system, input);
  const rowOf = new Map(components.map(({ id }, row) => [id, row]));
  const columns: { readonly stoich: Readonly<Record<string, number>>; readonly lnK: number }[] = [];
  const lnVolume = Math.log(input.volumeL);
  for (const { id } of components) columns.push({ stoich: { [id]: 1 }, lnK: lnVolume });
  for (const { stoich, logK } of aqueous) columns.push({ stoich, lnK: logK * LN10 + lnVolume });
  if (input.headspace.kind === 'sealed') {
    const kelvin = input.temperatureC + KELVIN_AT_0C;
    const molPerBar = (PASCAL_PER_BAR * (input.headspace.volumeL / LITRES_PER_M3)) / (GAS_CONSTANT * kelvin);
    for (const { stoich, logK } of sealed) columns.push({ stoich, lnK: logK * LN10 + Math.log(molPerBar) });
  }
  const soluteCount = columns.length;
  for (const { stoich, logK } of solids) columns.push({ stoich, lnK: logK * LN10 });
  for (const { gas, lnPressure } of openGases)
    columns.push({ stoich: gas.stoich, lnK: gas.logK * LN10 - lnPressure });
  if (holdsPh) columns.push({ stoich: { 'H+': 1 }, lnK: (input.pH ?? 0) * LN10 });

  const stoich = new Float64Array(columns.length * n);
  columns.forEach((column, index) => {
    for (const [id, coefficient] of Object.entries(column.stoich)) {
      const row = rowOf.get(id);
      if (row !== undefined) stoich[index * n + row] = coefficient;
    }
  });
  return {
    componentCount: n,
    soluteCount,
    phaseCount: columns.length - soluteCount,
    stoich,
    lnK: Float64Array.from(columns, ({ lnK }) => lnK),
    totals: Float64Array.from(components, ({ id, total }) => (id === 'H+' && holdsPh ? 0 : total)),
    isReservoir: [...solids.map(() => false), ...openGases.map(() => true), ...(holdsPh ? [true] : [])],
    activity: activityLaw(
      input.activity,
      [...components, ...aqueous],
      soluteCount,
      input.volumeL,
      input.temperatureC,
    ),
  };
}

/** I = ½ Σ c z², mol/L. */
function ionicStrengthOf(system: ReactionSystem, { amounts }: EquilibriumSolution, volumeL: number): number {
  const parts = [...system.components, ...system.aqueous];
  return parts.reduce(
    (sum, { charge }, column) => sum + (charge * charge * (amounts[column] ?? 0)) / (2 * volumeL),
    0,
  );
}

function stateOf(
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
    balances: residualsOf(system, problem, solved.amounts, solved.phaseAmounts),
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
  amounts: Float64Array,
  phaseAmounts: Float64Array,
): ComponentBalance[] {
  const { componentCount: n, soluteCount, phaseCount, stoich } = problem;
  return system.components.map(({ id, total }, row) => {
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
      total,
      relativeResidual: scale === 0 ? 0 : Math.abs(sum - (problem.totals[row] ?? 0)) / scale,
    };
  });
}

const REASONS: Readonly<Record<NotConverged['reason'], string>> = {
  'iteration-limit': 'The set of solids did not settle.',
  stalled: 'No step brought the balances closer.',
  infeasible: 'No amounts of the listed species can make up these totals.',
};

function notConverged(
  system: ReactionSystem,
  problem: EquilibriumProblem,
  { status, iterations, amounts, phaseAmounts }: EquilibriumFailure,
): NotConverged {
  return {
    converged: false,
    reason: status,
    message: REASONS[status],
    iterations,
    residuals: residualsOf(system, problem, amounts, phaseAmounts),
  };
}
