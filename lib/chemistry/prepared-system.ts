import { notConverged, stateOf } from './equilibrium-state';
import { checkInput } from './input-checks';
import { buildSystem } from './reaction-system';
import type { ReactionSystem } from './reaction-system';
import type { EquilibriumChange, EquilibriumResponse, EquilibriumSolution } from './solver/problem';
import { EquilibriumSolver } from './solver/solve';
import { systemProblem } from './system-problem';
import type { MixturePoint, SystemProblem } from './system-problem';
import type { EquilibriumState, NotConverged, SpeciationInput } from './types';

/** One solved point, read without building its whole state. */
export interface SolvedPoint {
  readonly converged: true;
  readonly point: MixturePoint;
  readonly solution: EquilibriumSolution;
  readonly prepared: PreparedSystem;
}

/**
 * The same components and reactions solved at one point after another, each from its neighbour.
 * A component that is absent at first may not come in later, nor the other way round.
 */
export class PreparedSystem {
  readonly system: ReactionSystem;
  /** Column of each dissolved species. */
  readonly columnOf: ReadonlyMap<string, number>;
  private readonly numbers: SystemProblem;
  private readonly solver: EquilibriumSolver;

  /** @throws RangeError for an input that `speciate` would refuse */
  constructor(private readonly input: SpeciationInput) {
    checkInput(input);
    this.system = buildSystem(input);
    this.numbers = systemProblem(this.system, input);
    this.solver = new EquilibriumSolver(this.numbers.problem);
    const ids = [
      ...this.system.components.map(({ id }) => id),
      ...this.system.aqueous.map(({ species }) => species),
    ];
    this.columnOf = new Map(ids.map((id, column) => [id, column]));
  }

  solve(point: MixturePoint): SolvedPoint | NotConverged {
    this.numbers.moveTo(point);
    const solution = this.solver.solve();
    if (solution.status === 'converged') return { converged: true, point, solution, prepared: this };
    return notConverged(this.system, this.numbers.problem, point, solution);
  }

  /** The whole state of a point that this system solved. */
  stateOf({ point, solution }: SolvedPoint): EquilibriumState {
    this.numbers.moveTo(point);
    return stateOf(this.system, this.numbers.problem, { ...this.input, ...point }, solution);
  }

  /**
   * How the last solved point follows a small change.
   * @param amounts - d mol by component
   * @param lnVolume - d ln volume
   * @param lnK - d ln K by species; of H+ that of its held activity, which is −ln 10 d pH
   * @returns null where it is singular
   */
  respond(change: {
    readonly amounts?: Readonly<Record<string, number>>;
    readonly lnVolume?: number;
    readonly lnK?: Readonly<Record<string, number>>;
  }): EquilibriumResponse | null {
    const { problem, dissolvedCount } = this.numbers;
    const { components, aqueous, solids } = this.system;
    const lnVolume = change.lnVolume ?? 0;
    const lnK = new Float64Array(problem.lnK.length);
    lnK.fill(lnVolume, 0, dissolvedCount);
    const formed = [
      ...aqueous,
      ...(problem.soluteCount > dissolvedCount ? this.system.gases : []),
      ...solids,
    ];
    formed.forEach(({ species }, index) => {
      const column = components.length + index;
      lnK[column] = (lnK[column] ?? 0) + (change.lnK?.[species] ?? 0);
    });
    if (this.input.pH !== null) lnK[lnK.length - 1] = -(change.lnK?.['H+'] ?? 0);
    const full: EquilibriumChange = {
      lnK,
      totals: Float64Array.from(components, ({ id }) =>
        id === 'H+' && this.input.pH !== null ? 0 : (change.amounts?.[id] ?? 0),
      ),
      lnStrengthPerMol: -lnVolume,
    };
    return this.solver.respond(full);
  }
}
