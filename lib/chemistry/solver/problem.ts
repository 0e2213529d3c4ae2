/**
 * An equilibrium to be found, as bare numbers. All columns are formed from the same n components:
 * first `solutes` columns whose amount is exp(lnK + ν·x), the first n of them the components themselves;
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
  /** ln of the amount constant by column: for solutes volume and activity coefficient are already in it. */
  readonly lnK: Float64Array;
  /** mol of each component. */
  readonly totals: Float64Array;
  /** By phase: true where it stands for a held activity that gives or takes any amount. */
  readonly isReservoir: readonly boolean[];
}

export interface EquilibriumSolution {
  readonly status: 'converged';
  readonly iterations: number;
  /** x: ln activity of each component. */
  readonly lnActivity: Float64Array;
  /** mol of each solute. */
  readonly amounts: Float64Array;
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
