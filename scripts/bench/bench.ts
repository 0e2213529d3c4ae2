import { writeFileSync } from 'node:fs';
import { FamilySolver } from '@/lib/chemistry/family';
import type { MixtureFamily } from '@/lib/chemistry/family';
import { speciate } from '@/lib/chemistry/speciation';
import { EquilibriumSolver, solveEquilibrium } from '@/lib/chemistry/solver/solve';
import type { SpeciationInput } from '@/lib/chemistry/types';
import { LARGE, problemOf, REALISTIC, SMALLEST } from './cases';
import { arithmeticFloor } from './floor';
import { benchmarkTables } from './tables';
import { benchMixture, strainedSystem, SystemSource } from './random-systems';

/**
 * Prints one JSON line per case, what the computing core takes against the arithmetic floor of this machine, and
 * writes them as tables to docs/benchmark.md.
 */

interface Times {
  readonly medianUs: number;
  readonly p95Us: number;
}

/** Where the tables go, from the root of the project. */
const TABLES = 'docs/benchmark.md';
const WARM_UP_MS = 500;
const SAMPLES = 400;
/** A sample runs at least this long, so that the clock does not matter. */
const SAMPLE_US = 100;

let used = 0;

/** Times several tasks in turn, sample by sample, so that what else the machine does falls on all of them alike. */
function timesOf<Name extends string>(tasks: Readonly<Record<Name, () => number>>): Record<Name, Times> {
  const names = Object.keys(tasks) as Name[];
  const perSample = new Map(names.map((name) => [name, runsPerSample(tasks[name])]));
  const samples = new Map(names.map((name) => [name, [] as number[]]));
  for (let sample = 0; sample < SAMPLES; sample += 1) {
    for (const name of names) {
      const runs = perSample.get(name) ?? 1;
      const from = performance.now();
      for (let run = 0; run < runs; run += 1) used += tasks[name]();
      samples.get(name)?.push(((performance.now() - from) * 1000) / runs);
    }
  }
  return Object.fromEntries(names.map((name) => [name, summary(samples.get(name) ?? [])])) as Record<
    Name,
    Times
  >;
}

function runsPerSample(task: () => number): number {
  const start = performance.now();
  let runs = 0;
  while (performance.now() - start < WARM_UP_MS) {
    used += task();
    runs += 1;
  }
  return Math.max(1, Math.ceil(SAMPLE_US / ((1000 * WARM_UP_MS) / runs)));
}

function summary(samples: number[]): Times {
  samples.sort((a, b) => a - b);
  const at = (share: number) =>
    Number((samples[Math.floor(share * (samples.length - 1))] ?? NaN).toPrecision(4));
  return { medianUs: at(0.5), p95Us: at(0.95) };
}

type Line = Readonly<Record<string, unknown>>;
const lines: Line[] = [];

function print(line: Line): void {
  lines.push(line);
  console.log(JSON.stringify(line));
}

function oneSystem(name: string, input: SpeciationInput): void {
  const problem = problemOf(input);
  const answer = speciate(input);
  if (!answer.converged) throw new Error(`${name} did not converge`);
  const moved = { ...problem, totals: problem.totals.slice() };
  const movedSolver = new EquilibriumSolver(moved);
  let count = 0;
  const { floor, cold, warm, whole } = timesOf({
    floor: arithmeticFloor(problem.soluteCount, problem.componentCount),
    cold: () => solveEquilibrium(problem).iterations,
    warm: () => {
      count += 1;
      moved.totals[1] = (problem.totals[1] ?? 0) * (1 + 0.002 * (count % 2));
      return movedSolver.solve().iterations;
    },
    whole: () => speciate(input).iterations,
  });
  print({
    case: name,
    components: problem.componentCount,
    species: problem.soluteCount,
    solids: problem.phaseCount,
    iterations: answer.iterations,
    residual: Math.max(...answer.balances.map(({ relativeResidual }) => relativeResidual)),
    floor,
    cold,
    coldOverFloor: Number((cold.medianUs / floor.medianUs).toPrecision(3)),
    warm,
    warmOverFloor: Number((warm.medianUs / floor.medianUs).toPrecision(3)),
    wholeAnswer: whole,
  });
}

const SWEEP_POINTS = 500;

function sweepCase(): void {
  const { volumeL, amounts, pH, ...settings } = REALISTIC;
  const ammonia = amounts.NH3 ?? 0;
  const family: MixtureFamily = {
    settings,
    at: (x) => ({ volumeL: volumeL * (1 + x), amounts: { ...amounts, NH3: ammonia * (0.01 + 2 * x) }, pH }),
  };
  const samples: number[] = [];
  let failed = 0;
  for (let run = 0; run < 40; run += 1) {
    const solver = new FamilySolver(family);
    const from = performance.now();
    for (let index = 0; index < SWEEP_POINTS; index += 1) {
      const point = solver.solve(index / SWEEP_POINTS);
      if (!point.converged) failed += 1;
    }
    samples.push((performance.now() - from) * 1000);
  }
  const { medianUs, p95Us } = summary(samples);
  print({
    case: 'sweep of the realistic mix',
    points: SWEEP_POINTS,
    medianMs: medianUs / 1000,
    p95Ms: p95Us / 1000,
    failed,
  });
}

function randomCase(name: string, make: (source: SystemSource) => SpeciationInput, count: number): void {
  const source = new SystemSource(1);
  const samples: number[] = [];
  let converged = 0;
  let iterations = 0;
  let residual = 0;
  for (let system = 0; system < count; system += 1) {
    const input = make(source);
    const from = performance.now();
    const answer = speciate(input);
    samples.push((performance.now() - from) * 1000);
    iterations += answer.iterations;
    if (!answer.converged) continue;
    converged += 1;
    residual = Math.max(residual, ...answer.balances.map(({ relativeResidual }) => relativeResidual));
  }
  print({
    case: name,
    systems: count,
    converged,
    meanIterations: Number((iterations / count).toPrecision(3)),
    residual,
    wholeAnswer: summary(samples),
  });
}

oneSystem('2 components, 1 complex', SMALLEST);
oneSystem('realistic mix', REALISTIC);
oneSystem('realistic mix, ideal', { ...REALISTIC, activity: 'ideal' });
oneSystem('large', LARGE);
sweepCase();
randomCase('random bench mixtures', benchMixture, 10_000);
randomCase('random strained systems', strainedSystem, 10_000);
writeFileSync(TABLES, benchmarkTables(lines));
if (!Number.isFinite(used)) throw new Error('A timed task gave no number');
