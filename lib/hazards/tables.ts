import gasData from './data/gases.json';
import groupData from './data/groups.json';
import policyData from './data/policy.json';
import ruleData from './data/rules.json';
import substanceData from './data/substances.json';
import type { GasLimit, Severity } from './types';

/** What must hold for a rule to fire; an absent condition always holds. */
export interface RuleConditions {
  readonly pHBelow?: number;
  readonly pHAbove?: number;
  /** Strength as poured, mol/L, of the strongest member of `ofGroup`, or of the rule's first group. */
  readonly strongerThanMolarity?: number;
  readonly weakerThanMolarity?: number;
  readonly ofGroup?: string;
  readonly hotterThanC?: number;
  readonly coolerThanC?: number;
  readonly form?: string;
  readonly order?: 'water-into-acid';
  readonly standing?: 'fresh' | 'over-an-hour' | 'over-half-a-year';
}

export interface GasStoichiometry {
  /** mol of each reactant in the balanced reaction; only amounts, no procedure. */
  readonly consumes: Readonly<Record<string, number>>;
  readonly limiting: string;
  readonly gives: Readonly<Record<string, number>>;
}

export interface HazardRule {
  readonly id: string;
  readonly groups: readonly string[];
  readonly severity: Severity;
  readonly kinds: readonly string[];
  readonly conditions: RuleConditions;
  readonly reason: string;
  readonly mustNot: string;
  readonly precautions: readonly string[];
  readonly alternative: string | null;
  readonly source: string;
  /** True where the source is known from memory only. */
  readonly isDraft: boolean;
  readonly variant?: string;
  /** The gas comes over minutes to hours: its worst case is judged by the room alone and raises to `controlled` at most. */
  readonly isSlow?: boolean;
  readonly gas?: readonly GasStoichiometry[];
}

export interface ReactiveGroup {
  readonly id: string;
  readonly name: string;
  readonly definition: string;
  /** Species ids whose amount stands for the group's. */
  readonly limiting: readonly string[];
}

export interface NamedLimit extends GasLimit {
  readonly kind: 'short-term' | 'idlh' | 'aegl-2' | 'aegl-3';
}
export interface Gas {
  readonly id: string;
  readonly name: string;
  readonly molarMassGPerMol: number;
  readonly limits: readonly NamedLimit[];
  /** Concentration in water over that in air at 25 °C, of the neutral form. */
  readonly aqueousOverGas: number | null;
  readonly henrySource: string | null;
  readonly pKa: number | null;
  readonly note: string | null;
}

export interface PolicyGate {
  readonly id: string;
  readonly trigger: string;
  readonly approval: string;
  readonly usualLimit: string;
  readonly substitution: string;
  readonly basis: string;
}

export interface SpecificLimit {
  readonly class: string;
  readonly min: number;
  readonly max?: number;
}
export interface SubstanceHazards {
  readonly id: string;
  readonly groups: readonly string[];
  readonly storageGroup: string;
  readonly classes: readonly string[];
  /** By route: mg/kg or mg/L, or a category such as `cat3`. */
  readonly acuteToxicity: Readonly<Record<string, number | string | undefined>> | null;
  readonly specificLimits: readonly SpecificLimit[];
  readonly mFactors: { readonly m_acute?: number; readonly m_chronic?: number } | null;
  readonly euh: readonly string[];
  readonly restricted: boolean;
  readonly waste: string;
  readonly unNumber: string | null;
  readonly source: string;
}

export const HAZARD_RULES = ruleData.rules as unknown as readonly HazardRule[];
export const GROUPS = groupData.groups as readonly ReactiveGroup[];
export const INHERITS: Readonly<Record<string, readonly string[]>> = groupData.inherits;
export const GASES = gasData.gases as unknown as readonly Gas[];
export const POLICY_GATES = policyData.gates as readonly PolicyGate[];
export const SUBSTANCE_HAZARDS = substanceData.substances as unknown as readonly SubstanceHazards[];

const hazardsById = new Map(SUBSTANCE_HAZARDS.map((entry) => [entry.id, entry]));
const gasById = new Map(GASES.map((gas) => [gas.id, gas]));
const groupById = new Map(GROUPS.map((group) => [group.id, group]));

export function findSubstanceHazards(id: string): SubstanceHazards | null {
  return hazardsById.get(id) ?? null;
}
export function findGas(id: string): Gas | null {
  return gasById.get(id) ?? null;
}
export function groupName(id: string): string {
  return groupById.get(id)?.name ?? id;
}
