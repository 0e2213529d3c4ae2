import type { Solute } from '../chemistry/types';
import { speciate } from '../chemistry/speciation';
import { componentAmounts } from '../chemistry/mixing';
import { findSubstance } from '../chemistry/substances';
import { classifySolution } from '../hazards/classification/classify-solution';
import { screenPolicy } from '../hazards/policy-gates';
import { previewMix } from '../hazards/preview';
import { decide, screenNeighbours, screenSolutions, sortFindings } from '../hazards/screen';
import type { BottleContent, Finding, MixPreview } from '../hazards/types';
import { solutionNeeds } from './request-need';
import type {
  PlannedDemonstration,
  PlannedSession,
  PlannedSolution,
  PlannedSubstance,
  RequestPlan,
} from './request-plan-types';

/** A recipe as the plan needs it. */
export interface RecipeInPlan {
  readonly id: string;
  readonly name: string;
  readonly shelfLifeDays: number;
  readonly solutes: readonly Solute[];
}

export type LineInPlan =
  | {
      readonly kind: 'solution';
      readonly solution: RecipeInPlan;
      readonly volumePerBenchMl: number;
      readonly spareBenches: number;
    }
  | {
      readonly kind: 'demonstration';
      readonly id: string;
      readonly name: string;
      readonly outcomeWanted: string | null;
      readonly vesselMl: number;
      readonly performances: number;
      readonly portions: readonly { readonly solution: RecipeInPlan; readonly volumeMl: number }[];
    };

export interface RequestToPlan {
  readonly session: PlannedSession;
  readonly lines: readonly LineInPlan[];
  /** Bottles that other requests put into the same room at the same time. */
  readonly neighbours: readonly BottleContent[];
}

const TEMPERATURE_C = 25;

/**
 * The computed answer to a request: deterministic, and plain JSON. The same input gives the same plan, so its
 * hash tells whether anything that was judged has changed.
 * @throws RangeError for an unknown substance or a volume that is not positive
 */
export function planRequest({ session, lines, neighbours }: RequestToPlan): RequestPlan {
  const recipes = recipesOf(lines);
  const needs = solutionNeeds(
    lines.map((line) =>
      line.kind === 'solution'
        ? {
            kind: 'solution',
            solutionId: line.solution.id,
            volumePerBenchMl: line.volumePerBenchMl,
            spareBenches: line.spareBenches,
          }
        : {
            kind: 'demonstration',
            demonstrationId: line.id,
            performances: line.performances,
            portions: line.portions.map(({ solution, volumeMl }) => ({ solutionId: solution.id, volumeMl })),
          },
    ),
    session.benches,
  );
  const solutions = needs.flatMap(({ solutionId, volumeMl }) => {
    const recipe = recipes.get(solutionId);
    return recipe ? [plannedSolution(recipe, volumeMl)] : [];
  });
  const demonstrations = lines.flatMap((line) =>
    line.kind === 'demonstration' ? [plannedDemonstration(line, session)] : [],
  );
  const own: BottleContent[] = solutions.map(({ name, volumeMl, solutes }) => ({
    label: name,
    volumeMl,
    solutes: plainSolutes(solutes),
  }));
  const findings = sortFindings([
    ...demonstrations.flatMap((demonstration) => mixFindings(demonstration)),
    ...screenSolutions(own, session.room),
    ...screenNeighbours([...own, ...neighbours], session.room).filter(({ concerns }) =>
      concerns.some((label) => own.some((bottle) => bottle.label === label)),
    ),
    ...screenPolicy(own),
  ]);
  return {
    session,
    solutions,
    demonstrations,
    substances: substancesOf(solutions),
    findings,
    decision: decide(findings),
  };
}

function recipesOf(lines: readonly LineInPlan[]): Map<string, RecipeInPlan> {
  const all = lines.flatMap((line) =>
    line.kind === 'solution' ? [line.solution] : line.portions.map(({ solution }) => solution),
  );
  return new Map(all.map((recipe) => [recipe.id, recipe]));
}

function plainSolutes(solutes: readonly Solute[]): Solute[] {
  return solutes.map(({ substance, molarity }) => ({ substance, molarity }));
}

function plannedSolution(
  { id, name, solutes, shelfLifeDays }: RecipeInPlan,
  volumeMl: number,
): PlannedSolution {
  const state = speciate({
    volumeL: 1,
    amounts: componentAmounts({ label: name, solutes, volumeMl: 1000 }),
    reactions: 'catalogue',
    pH: null,
    suppress: [],
    activity: 'davies',
    temperatureC: TEMPERATURE_C,
    headspace: { kind: 'none' },
  });
  return {
    solutionId: id,
    name,
    volumeMl,
    shelfLifeDays,
    solutes: solutes.map(({ substance, molarity }) => {
      const known = findSubstance(substance);
      return { substance, molarity, name: known?.name ?? substance, formula: known?.formula ?? '' };
    }),
    classification: classifySolution({ solutes, pH: state.converged ? state.pH : null }),
  };
}

function plannedDemonstration(
  line: Extract<LineInPlan, { kind: 'demonstration' }>,
  session: PlannedSession,
): PlannedDemonstration {
  const outcome = previewMix({
    portions: line.portions.map(({ solution, volumeMl }) => ({
      label: solution.name,
      volumeMl,
      solutes: plainSolutes(solution.solutes),
    })),
    activity: 'davies',
    temperatureC: TEMPERATURE_C,
    room: session.room,
  });
  const mix: MixPreview | null = 'converged' in outcome ? null : outcome;
  return {
    demonstrationId: line.id,
    name: line.name,
    outcomeWanted: line.outcomeWanted,
    vesselMl: line.vesselMl,
    performances: line.performances,
    portions: line.portions.map(({ solution, volumeMl }) => ({
      solutionId: solution.id,
      label: solution.name,
      volumeMl,
    })),
    mix,
  };
}

/** Findings of a mix; policy is told once for the whole request. A mix that can't be computed is for a person. */
function mixFindings({ name, mix, portions, vesselMl }: PlannedDemonstration): Finding[] {
  const labels = portions.map(({ label }) => label);
  const found: Finding[] = mix
    ? mix.findings
        .filter(({ scope }) => scope !== 'policy')
        .map((finding) => ({ ...finding, title: `${name}: ${finding.title}` }))
    : [];
  if (!mix) {
    found.push(
      houseFinding(
        'no-equilibrium',
        'review',
        `${name}: no equilibrium was found`,
        'The computation did not converge, so nothing is predicted for this mix. Unknown is not safe.',
        labels,
      ),
    );
  }
  const volumeMl = portions.reduce((sum, portion) => sum + portion.volumeMl, 0);
  if (volumeMl > vesselMl) {
    found.push(
      houseFinding(
        'overfull',
        'caution',
        `${name}: the vessel overflows`,
        `${volumeMl} mL are poured into a vessel of ${vesselMl} mL.`,
        labels,
      ),
    );
  }
  return found;
}

function houseFinding(
  rule: string,
  severity: Finding['severity'],
  title: string,
  reason: string,
  concerns: readonly string[],
): Finding {
  return {
    rule,
    severity,
    scope: 'mix',
    title,
    reason,
    mustNot: null,
    gas: null,
    precautions: [],
    alternative: null,
    source: 'House rule',
    concerns,
  };
}

/** Grams of pure substance for all solutions, by substance. */
function substancesOf(solutions: readonly PlannedSolution[]): PlannedSubstance[] {
  const grams = new Map<string, number>();
  for (const { solutes, volumeMl } of solutions) {
    for (const { substance, molarity } of solutes) {
      const known = findSubstance(substance);
      if (known)
        grams.set(
          known.id,
          (grams.get(known.id) ?? 0) + (molarity * volumeMl * known.molarMassGPerMol) / 1000,
        );
    }
  }
  return [...grams].map(([substance, mass]) => {
    const known = findSubstance(substance);
    return { substance, name: known?.name ?? substance, formula: known?.formula ?? '', grams: mass };
  });
}
