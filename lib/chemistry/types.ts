/** Shapes shared by the computing core. Field names of results are those of the HTTP interface. */

export type Phase = 'aq' | 's' | 'g' | 'l';
export type ActivityModel = 'ideal' | 'davies' | 'extended-debye-huckel';

/** Formation of one species from components; `logK` is log10 of the formation constant at 25 °C, I = 0. */
export interface Reaction {
  readonly species: string;
  readonly phase: Phase;
  /** Signed coefficients of the components; `H2O` is allowed and has activity 1. */
  readonly stoich: Readonly<Record<string, number>>;
  readonly logK: number;
}

export type Headspace =
  | { readonly kind: 'none' }
  | { readonly kind: 'sealed'; readonly volumeL: number }
  | { readonly kind: 'open'; readonly partialPressuresBar: Readonly<Record<string, number>> };

export interface SpeciationInput {
  readonly volumeL: number;
  /** mol of each component; only `H+` may be negative (proton condition). */
  readonly amounts: Readonly<Record<string, number>>;
  readonly reactions: 'catalogue' | readonly Reaction[];
  readonly pH: number | null;
  readonly suppress: readonly string[];
  readonly activity: ActivityModel;
  readonly temperatureC: number;
  readonly headspace: Headspace;
}

export interface SpeciesState {
  readonly id: string;
  readonly phase: 'aq';
  readonly molarity: number;
  readonly gamma: number;
  readonly activity: number;
}
export interface SolidState {
  readonly id: string;
  readonly moles: number;
  /** null where the molar mass is unknown (a species name that is no formula). */
  readonly grams: number | null;
  readonly saturationIndex: number;
}
export interface GasState {
  readonly id: string;
  readonly partialPressureBar: number;
  readonly moles: number;
}
export interface ComponentBalance {
  readonly component: string;
  readonly total: number;
  readonly relativeResidual: number;
}
export interface Note {
  readonly code: string;
  readonly message: string;
}

/** One converged equilibrium; species largest first, every candidate solid listed. */
export interface EquilibriumState {
  readonly converged: true;
  readonly iterations: number;
  readonly activity: ActivityModel;
  readonly temperatureC: number;
  readonly pH: number | null;
  readonly ionicStrength: number;
  readonly species: readonly SpeciesState[];
  readonly solids: readonly SolidState[];
  readonly gases: readonly GasState[];
  readonly balances: readonly ComponentBalance[];
  readonly chargeImbalance: number;
  readonly notes: readonly Note[];
}

/** Typed failure: the reader gets residuals, never a concentration that is not converged. */
export interface NotConverged {
  readonly converged: false;
  readonly reason: 'iteration-limit' | 'stalled' | 'infeasible';
  readonly message: string;
  readonly iterations: number;
  readonly residuals: readonly ComponentBalance[];
}
export type EquilibriumOutcome = EquilibriumState | NotConverged;

/** A catalogue substance as the computing core sees it. */
export interface Substance {
  readonly id: string;
  readonly name: string;
  readonly cas: string;
  /** Empty for what has none, such as starch; the molar mass is then NaN. */
  readonly formula: string;
  readonly molarMassGPerMol: number;
  readonly form: 'solid' | 'liquid or solution';
  readonly assayPercent: number | null;
  readonly densityGPerMl: number | null;
  /** Amounts of master components per formula unit; null: outside the equilibrium model. */
  readonly releases: Readonly<Record<string, number>> | null;
}

export interface Solute {
  /** Catalogue id or CAS number. */
  readonly substance: string;
  readonly molarity: number;
}
export interface Portion {
  readonly label: string;
  readonly solutes: readonly Solute[];
  readonly volumeMl: number;
}
export interface MixInput {
  /** In order of pouring. */
  readonly portions: readonly Portion[];
  readonly activity: ActivityModel;
  readonly temperatureC: number;
}
export interface DilutedSolute {
  /** As asked for (id or CAS number). */
  readonly substance: string;
  readonly name: string;
  readonly molarity: number;
}
export interface MixStep {
  readonly afterPortion: string;
  readonly volumeMl: number;
  /** mol of each component in the vessel after this pour. */
  readonly amounts: Readonly<Record<string, number>>;
  readonly equilibrium: EquilibriumState;
}
export interface Appearance {
  readonly solution: { readonly hex: string; readonly words: string };
  readonly solids: readonly {
    readonly id: string;
    readonly name: string;
    readonly hex: string;
    readonly grams: number;
  }[];
}
export interface Mix {
  readonly converged: true;
  readonly finalVolumeMl: number;
  readonly volumeBasis: 'volumes-add' | 'mass-and-density';
  readonly diluted: readonly DilutedSolute[];
  readonly steps: readonly MixStep[];
  readonly equilibrium: EquilibriumState;
  readonly appearance: Appearance;
}
export type MixOutcome = Mix | (NotConverged & { readonly afterPortion: string });
