import { buildSystem } from '@/lib/chemistry/reaction-system';
import type { EquilibriumProblem } from '@/lib/chemistry/solver/problem';
import { systemProblem } from '@/lib/chemistry/system-problem';
import type { Reaction, SpeciationInput } from '@/lib/chemistry/types';

const PLAIN: Omit<SpeciationInput, 'amounts' | 'reactions'> = {
  volumeL: 1,
  pH: null,
  suppress: [],
  activity: 'ideal',
  temperatureC: 25,
  headspace: { kind: 'none' },
};

/** Two components, one complex. */
export const SMALLEST: SpeciationInput = {
  ...PLAIN,
  amounts: { 'Ag+': 0.02, 'CN-': 0.05 },
  reactions: [{ species: 'Ag(CN)2-', phase: 'aq', stoich: { 'Ag+': 1, 'CN-': 2 }, logK: 20.48 }],
};

/**
 * A mixture of the catalogue cut to a given size: the first dissolved species that its components form, and the
 * first solids.
 */
function cut(
  amounts: Readonly<Record<string, number>>,
  speciesCount: number,
  solidCount: number,
): SpeciationInput {
  const full = buildSystem({ ...PLAIN, amounts, reactions: 'catalogue' });
  const formedCount = speciesCount - full.components.length;
  const plain = ({ species, phase, stoich, logK }: Reaction): Reaction => ({ species, phase, stoich, logK });
  const reactions = [...full.aqueous.slice(0, formedCount), ...full.solids.slice(0, solidCount)].map(plain);
  const input: SpeciationInput = {
    ...PLAIN,
    amounts: { ...amounts, 'H+': amounts['H+'] ?? 0 },
    activity: 'davies',
    reactions,
  };
  const found = buildSystem(input);
  if (found.aqueous.length !== formedCount || found.solids.length !== solidCount) {
    throw new RangeError(
      `The catalogue gives ${found.aqueous.length} species and ${found.solids.length} solids`,
    );
  }
  return input;
}

/** 12 components, 45 dissolved species (the components among them), 6 solids that may form. */
export const REALISTIC: SpeciationInput = cut(
  {
    'H+': -0.01,
    'Cu+2': 0.02,
    'Zn+2': 0.01,
    'Ca+2': 0.005,
    NH3: 0.3,
    'SO4-2': 0.03,
    'CO3-2': 0.004,
    'CH3COO-': 0.05,
    'Cl-': 0.06,
    'Na+': 0.12,
    'NO3-': 0.02,
    'K+': 0.01,
  },
  45,
  6,
);

/** 30 components, 150 dissolved species (the components among them), 25 solids that may form. */
export const LARGE: SpeciationInput = cut(
  {
    'H+': 0.2,
    ...Object.fromEntries(
      [
        'Cu+2',
        'Zn+2',
        'Ca+2',
        'Mg+2',
        'Ni+2',
        'Co+2',
        'Mn+2',
        'Cd+2',
        'Pb+2',
        'Al+3',
        'Fe+3',
        'Ag+',
        'Ba+2',
      ].map((id, index) => [id, 0.002 + 0.001 * index]),
    ),
    ...Object.fromEntries(
      [
        'NH3',
        'SO4-2',
        'CO3-2',
        'CH3COO-',
        'Cl-',
        'Br-',
        'PO4-3',
        'C2O4-2',
        'F-',
        'SCN-',
        'S2O3-2',
        'CrO4-2',
        'EDTA-4',
      ].map((id, index) => [id, 0.01 + 0.004 * index]),
    ),
    'Na+': 0.6,
    'K+': 0.3,
    'NO3-': 0.4,
  },
  150,
  25,
);

/** The numbers the solver gets. */
export function problemOf(input: SpeciationInput): EquilibriumProblem {
  return systemProblem(buildSystem(input), input).problem;
}
