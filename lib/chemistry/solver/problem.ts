/** Activity coefficients as functions of the ionic strength alone. */
export interface ActivityLaw {
  /** z² / 2V of each solute: ionic strength, mol/L, per mol of it; 0 for gases. */
  readonly strengthPerMol: Float64Array;
  setVolume(volumeL: number): void;
  /** Writes ln γ of each solute and its derivative by the ionic strength. */
  fill(ionicStrength: number, lnGamma: Float64Array, slope: Float64Array): void;
}

/**
 * An equilibrium to be found, as bare numbers. All columns are formed from the same n components:
 * first `solutes` columns whose amount is exp(lnK + ν·x) / γ, the first n of them the components themselves;
 * then `phases` of unit activity, for which lnK + ν·x ≤ 0.
 */
export interface EquilibriumProblem {
  /** n */
  readonly componentCount: number;
  /** Dissolved species, and gases of a sealed headspace: their amounts follow from the activities. */
  readonly soluteCount: number;
  /** Pure solids, and reservoirs. */
  readonly phaseCount: number;
  /** ν by column: `stoich[column · n + component]`. */
  readonly stoich: Float64Array;
  /** ln of the amount constant by column: for solutes the volume is already in it. May be changed between solves. */
  readonly lnK: Float64Array;
  /** mol of each component. May be changed between solves. */
  readonly totals: Float64Array;
  /** By phase: true where it stands for a held activity that gives or takes any amount. */
  readonly isReservoir: readonly boolean[];
  /** null where every γ is 1. */
  readonly activity: ActivityLaw | null;
}

export interface EquilibriumSolution {
  readonly status: 'converged';
  readonly iterations: number;
  /** x: ln activity of each component. */
  readonly lnActivity: Float64Array;
  /** mol of each solute. */
  readonly amounts: Float64Array;
  /** ln γ of each solute. */
  readonly lnGamma: Float64Array;
  /** mol/L; 0 where every γ is 1. */
  readonly ionicStrength: number;
  /** mol of each phase; of a reservoir what it gave (negative: took). */
  readonly phaseAmounts: Float64Array;
  /** ln(ion activity product / solubility product) of each phase. */
  readonly lnSaturation: Float64Array;
}

export interface EquilibriumFailure {
  readonly status: 'iteration-limit' | 'stalled' | 'infeasible';
  readonly iterations: number;
  readonly amounts: Float64Array;
  readonly phaseAmounts: Float64Array;
}

export type EquilibriumResult = EquilibriumSolution | EquilibriumFailure;

/** A small change of a problem, as a direction. */
export interface EquilibriumChange {
  /** d lnK by column, solutes and phases. */
  readonly lnK: Float64Array;
  /** d total by component, mol. */
  readonly totals: Float64Array;
  /** d ln of the ionic strength per mol: minus that of the volume. */
  readonly lnStrengthPerMol: number;
}

/** How an answer follows such a change while the same solids stay. */
export interface EquilibriumResponse {
  /** d ln amount by solute. */
  readonly lnAmounts: Float64Array;
  /** d ln activity by component. */
  readonly lnActivity: Float64Array;
  /** d mol by phase. */
  readonly phaseAmounts: Float64Array;
}
