/** A linear program with whole-number variables, to be minimised. */
export interface ProgramVariable {
  /** Whole numbers from `low` to `high`. */
  readonly low: number;
  readonly high: number;
}

/** A sum Σ coefficient × variable; variables by their index. */
export type LinearSum = readonly (readonly [coefficient: number, variable: number])[];

export interface ProgramRow {
  readonly sum: LinearSum;
  readonly sense: '>=' | '<=';
  readonly bound: number;
}

export interface IntegerProgram {
  readonly variables: readonly ProgramVariable[];
  readonly objective: LinearSum;
  readonly rows: readonly ProgramRow[];
}

export type ProgramAnswer =
  | {
      readonly status: 'optimal' | 'stopped-early';
      readonly values: readonly number[];
      /** (objective − proven bound) / objective; 0 when proven optimal. */
      readonly gap: number;
    }
  | { readonly status: 'infeasible' }
  | { readonly status: 'unsolved' };

/** Any solver will do; it is passed in so that the plan itself stays free of loading and of clocks. */
export type SolveProgram = (program: IntegerProgram, timeLimitSeconds: number) => Promise<ProgramAnswer>;

function sumText(sum: LinearSum): string {
  const terms = sum.filter(([coefficient]) => coefficient !== 0);
  if (terms.length === 0) return '0 x0';
  return terms
    .map(([coefficient, variable]) => `${coefficient < 0 ? '-' : '+'} ${Math.abs(coefficient)} x${variable}`)
    .join(' ');
}

/** The program in CPLEX LP format, which most solvers read. */
export function programText({ variables, objective, rows }: IntegerProgram): string {
  const constraints = rows.map(({ sum, sense, bound }, i) => ` r${i}: ${sumText(sum)} ${sense} ${bound}`);
  const bounds = variables.map(({ low, high }, i) => ` ${low} <= x${i} <= ${high}`);
  return [
    'Minimize',
    ` cost: ${sumText(objective)}`,
    'Subject To',
    ...constraints,
    'Bounds',
    ...bounds,
    'General',
    ` ${variables.map((_, i) => `x${i}`).join(' ')}`,
    'End',
    '',
  ].join('\n');
}
