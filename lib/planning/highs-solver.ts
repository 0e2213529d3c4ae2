import type { Highs } from 'highs';
import type { IntegerProgram, ProgramAnswer, SolveProgram } from './integer-program';
import { programText } from './integer-program';

let loading: Promise<Highs> | null = null;

/** The solver is a few megabytes of WebAssembly: loaded once, when first asked for. */
async function loadHighs(): Promise<Highs> {
  loading ??= import('highs').then((module) => module.default());
  return loading;
}

function answer(highs: Highs, program: IntegerProgram, timeLimitSeconds: number): ProgramAnswer {
  return highs.withModel({ format: 'lp', data: programText(program) }, (model): ProgramAnswer => {
    model.options.set({
      output_flag: false,
      random_seed: 0,
      mip_rel_gap: 0,
      mip_abs_gap: 0,
      mip_feasibility_tolerance: 1e-9,
      primal_feasibility_tolerance: 1e-9,
      time_limit: timeLimitSeconds,
    });
    model.run();
    const { modelStatus, solutionStatus } = highs.constants;
    const status = model.getModelStatus();
    if (status === modelStatus.infeasible) return { status: 'infeasible' };
    if (model.info.get('primal_solution_status') !== solutionStatus.feasible) return { status: 'unsolved' };
    const { colValue } = model.getSolution();
    const values = program.variables.map((_, i) =>
      Math.round(colValue[model.getColByName(`x${i}`)] ?? Number.NaN),
    );
    if (values.some(Number.isNaN)) return { status: 'unsolved' };
    if (status === modelStatus.optimal) return { status: 'optimal', values, gap: 0 };
    return { status: 'stopped-early', values, gap: Number(model.info.get('mip_gap')) };
  });
}

/** Solves with HiGHS, a branch-and-cut solver compiled to WebAssembly. It blocks its thread while it solves. */
export const solveWithHighs: SolveProgram = async (program, timeLimitSeconds) =>
  answer(await loadHighs(), program, timeLimitSeconds);
