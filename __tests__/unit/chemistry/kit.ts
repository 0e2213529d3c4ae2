import { speciate } from '@/lib/chemistry/speciation';
import type { EquilibriumState, Reaction, SpeciationInput } from '@/lib/chemistry/types';

/** A bare ideal litre at 25 °C, with what a test changes. */
export function litre(change: Partial<SpeciationInput> = {}): SpeciationInput {
  return {
    volumeL: 1,
    amounts: {},
    reactions: 'catalogue',
    pH: null,
    suppress: [],
    activity: 'ideal',
    temperatureC: 25,
    headspace: { kind: 'none' },
    ...change,
  };
}

/** @throws Error where it does not converge */
export function solved(input: SpeciationInput): EquilibriumState {
  const outcome = speciate(input);
  if (!outcome.converged) throw new Error(`${outcome.reason}: ${outcome.message}`);
  return outcome;
}

export function molarity(state: EquilibriumState, id: string): number {
  return state.species.find((species) => species.id === id)?.molarity ?? NaN;
}

export function solidMoles(state: EquilibriumState, id: string): number {
  return state.solids.find((solid) => solid.id === id)?.moles ?? NaN;
}

/** A dissolved species from its components, with K rather than log K. */
export function complex(species: string, stoich: Readonly<Record<string, number>>, k: number): Reaction {
  return { species, phase: 'aq', stoich, logK: Math.log10(k) };
}

export function solid(
  species: string,
  stoich: Readonly<Record<string, number>>,
  solubilityProduct: number,
): Reaction {
  return { species, phase: 's', stoich, logK: -Math.log10(solubilityProduct) };
}

export const WATER: Reaction = { species: 'OH-', phase: 'aq', stoich: { 'H+': -1 }, logK: -14 };
