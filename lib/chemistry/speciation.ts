import { lnGamma } from './activity';
import { speciationNotes } from './notes';
import { buildSystem, gasId, molarMassOf } from './reaction-system';
import type { ReactionSystem, SystemReaction } from './reaction-system';
import type { EquilibriumProblem, EquilibriumSolution } from './solver/problem';
import { solveEquilibrium } from './solver/solve';
import { GAS_CONSTANT, KELVIN_AT_0C } from './temperature';
import type { ComponentBalance, EquilibriumOutcome, EquilibriumState, GasState, NotConverged, SolidState, SpeciationInput, SpeciesState } from './types';

const LN10 = Math.LN10;
const PASCAL_PER_BAR = 1e5;
const LITRES_PER_M3 = 1000;
/** The ionic strength and the composition that follows from it must agree to this. */
const STRENGTH_AGREES = 1e-12;
const MOST_ROUNDS = 60;

/**
 * What is dissolved, solid and gaseous at equilibrium.
 *
 * Activity coefficients depend on the composition through the ionic strength alone, so the outer problem is
 * one number: I = G(I), solved by the secant method from the ideal answer.
 *
 * @returns the state, or why there is none; never a state that is not converged
 * @throws RangeError for a volume that is not positive or an amount that is not finite or negative (but H+)
 */
export function speciate(input: SpeciationInput): EquilibriumOutcome {
  checkInput(input);
  const system = buildSystem(input);
  const problem = problemOf(system, input);
  let strength = 0;
  let previous: { readonly strength: number; readonly gap: number } | null = null;
  let iterations = 0;
  for (let round = 0; round < MOST_ROUNDS; round += 1) {
    const solved = solveEquilibrium(withActivity(problem, system, input, strength));
    iterations += solved.iterations;
    if (solved.status !== 'converged') return notConverged(system, input, problem, solved.status, iterations, solved);
    if (input.activity === 'ideal') return stateOf(system, input, solved, 0, iterations);
    const gap = ionicStrengthOf(system, solved, input.volumeL) - strength;
    if (Math.abs(gap) <= STRENGTH_AGREES * Math.max(strength, 1e-9)) return stateOf(system, input, solved, strength, iterations);
    const slope: number = previous === null ? 0 : (gap - previous.gap) / (strength - previous.strength);
    const secant = slope < -0.05 && slope > -20 ? strength - gap / slope : strength + gap;
    previous = { strength, gap };
    strength = Math.max(secant, strength / 10, 0);
    if (strength === previous.strength) strength += gap;
  }
  return {
    converged: false,
    reason: 'iteration-limit',
    message: 'The activity coefficients and the composition did not come to agree.',
    iterations,
    residuals: [],
  };
}

function checkInput({ volumeL, amounts, headspace }: SpeciationInput): void {
  if (!(volumeL > 0) || !Number.isFinite(volumeL)) throw new RangeError('The volume must be positive');
  for (const [id, amount] of Object.entries(amounts)) {
    if (!Number.isFinite(amount) || (amount < 0 && id !== 'H+')) throw new RangeError(`The amount of ${id} must be finite and not negative`);
  }
  if (headspace.kind === 'sealed' && !(headspace.volumeL > 0)) throw new RangeError('The headspace must be positive');
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

/** The problem at ionic strength zero. */
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
  for (const { gas, lnPressure } of openGases) columns.push({ stoich: gas.stoich, lnK: gas.logK * LN10 - lnPressure });
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
  };
}

function gammaOf(part: { readonly charge: number; readonly ionSizePm: number | null }, input: SpeciationInput, strength: number): number {
  return lnGamma(input.activity, part.charge, part.ionSizePm, strength, input.temperatureC);
}

/** The same problem with the activity coefficients of an ionic strength in its constants. */
function withActivity(problem: EquilibriumProblem, system: ReactionSystem, input: SpeciationInput, strength: number): EquilibriumProblem {
  if (input.activity === 'ideal' || strength === 0) return problem;
  const lnK = Float64Array.from(problem.lnK);
  [...system.components, ...system.aqueous].forEach((part, column) => {
    lnK[column] = (lnK[column] ?? 0) - gammaOf(part, input, strength);
  });
  return { ...problem, lnK };
}

/** I = ½ Σ c z², mol/L. */
function ionicStrengthOf(system: ReactionSystem, { amounts }: EquilibriumSolution, volumeL: number): number {
  const parts = [...system.components, ...system.aqueous];
  return parts.reduce((sum, { charge }, column) => sum + (charge * charge * (amounts[column] ?? 0)) / (2 * volumeL), 0);
}

function stateOf(system: ReactionSystem, input: SpeciationInput, solved: EquilibriumSolution, gammaStrength: number, iterations: number): EquilibriumState {
  const { components, aqueous, solids } = system;
  const parts = [...components.map(({ id, charge, ionSizePm }) => ({ id, charge, ionSizePm })), ...aqueous.map(({ species, charge, ionSizePm }) => ({ id: species, charge, ionSizePm }))];
  const species: SpeciesState[] = parts.map((part, column) => {
    const molarity = (solved.amounts[column] ?? 0) / input.volumeL;
    const gamma = Math.exp(gammaOf(part, input, gammaStrength));
    return { id: part.id, phase: 'aq', molarity, gamma, activity: molarity * gamma };
  });
  const solidStates: SolidState[] = solids.map(({ species: id }, index) => {
    const moles = solved.phaseAmounts[index] ?? 0;
    const mass = molarMassOf(id);
    return { id, moles, grams: mass === null ? null : moles * mass, saturationIndex: (solved.lnSaturation[index] ?? 0) / LN10 };
  });
  const hydrogen = components.findIndex(({ id }) => id === 'H+');
  const pH = hydrogen >= 0 ? -(solved.lnActivity[hydrogen] ?? 0) / LN10 : input.pH;
  const state = {
    converged: true as const,
    iterations,
    activity: input.activity,
    temperatureC: input.temperatureC,
    pH,
    ionicStrength: ionicStrengthOf(system, solved, input.volumeL),
    species: species.sort((a, b) => b.molarity - a.molarity),
    solids: solidStates.sort((a, b) => b.moles - a.moles || b.saturationIndex - a.saturationIndex),
    gases: gasStates(system, input, solved),
    balances: balancesOf(system, input, solved),
    chargeImbalance: parts.reduce((sum, { charge }, column) => sum + (charge * (solved.amounts[column] ?? 0)) / input.volumeL, 0),
  };
  return { ...state, notes: speciationNotes(system, input, state) };
}

function gasStates(system: ReactionSystem, input: SpeciationInput, { lnActivity, amounts }: EquilibriumSolution): GasState[] {
  const { components, aqueous } = system;
  const rowOf = new Map(components.map(({ id }, row) => [id, row]));
  return system.gases.map((gas: SystemReaction, index) => {
    let ln = gas.logK * LN10;
    for (const [id, coefficient] of Object.entries(gas.stoich)) {
      const row = rowOf.get(id);
      if (row !== undefined) ln += coefficient * (lnActivity[row] ?? 0);
    }
    const moles = input.headspace.kind === 'sealed' ? (amounts[components.length + aqueous.length + index] ?? 0) : 0;
    return { id: gas.species, partialPressureBar: Math.exp(ln), moles };
  });
}

/** Each component's total against what the answer holds of it; for a held one, what the answer holds. */
function balancesOf(system: ReactionSystem, input: SpeciationInput, solved: EquilibriumSolution): ComponentBalance[] {
  const problem = problemOf(system, input);
  return residualsOf(system, problem, solved.amounts, solved.phaseAmounts);
}

function residualsOf(system: ReactionSystem, problem: EquilibriumProblem, amounts: Float64Array, phaseAmounts: Float64Array): ComponentBalance[] {
  const { componentCount: n, soluteCount, phaseCount, stoich } = problem;
  return system.components.map(({ id, total }, row) => {
    let sum = 0;
    let scale = Math.abs(problem.totals[row] ?? 0);
    for (let column = 0; column < soluteCount + phaseCount; column += 1) {
      const amount = column < soluteCount ? (amounts[column] ?? 0) : (phaseAmounts[column - soluteCount] ?? 0);
      const part = (stoich[column * n + row] ?? 0) * amount;
      sum += part;
      scale = Math.max(scale, Math.abs(part));
    }
    return { component: id, total, relativeResidual: scale === 0 ? 0 : Math.abs(sum - (problem.totals[row] ?? 0)) / scale };
  });
}

const REASONS: Readonly<Record<NotConverged['reason'], string>> = {
  'iteration-limit': 'The set of solids did not settle.',
  stalled: 'No step brought the balances closer.',
  infeasible: 'No amounts of the listed species can make up these totals.',
};

function notConverged(
  system: ReactionSystem,
  input: SpeciationInput,
  problem: EquilibriumProblem,
  reason: NotConverged['reason'],
  iterations: number,
  last: { readonly amounts: Float64Array; readonly phaseAmounts: Float64Array },
): NotConverged {
  return { converged: false, reason, message: REASONS[reason], iterations, residuals: residualsOf(system, problem, last.amounts, last.phaseAmounts) };
}
