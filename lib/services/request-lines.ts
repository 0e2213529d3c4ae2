import 'server-only';
import { invalid } from '@/lib/domain/errors';
import type { LineInPlan, RecipeInPlan } from '@/lib/planning/request-plan';
import type { RequestLineInput } from '@/lib/schemas/requests';
import { DemonstrationModel } from '@/models/demonstration';
import { DemonstrationPortionModel } from '@/models/demonstration-portion';
import { RequestLineModel } from '@/models/request-line';
import { SolutionModel } from '@/models/solution';
import { SolutionSoluteModel } from '@/models/solution-solute';

async function recipesById(ids: readonly string[]): Promise<Map<string, RecipeInPlan>> {
  const [solutions, solutes] = await Promise.all([
    SolutionModel.findAll({ where: { id: [...ids] } }),
    SolutionSoluteModel.findAll({ where: { solutionId: [...ids] }, order: [['position', 'ASC']] }),
  ]);
  return new Map(
    solutions.map(({ id, name, shelfLifeDays }) => [
      id,
      {
        id,
        name,
        shelfLifeDays,
        solutes: solutes
          .filter(({ solutionId }) => solutionId === id)
          .map(({ substanceId, molarity }) => ({ substance: substanceId, molarity })),
      },
    ]),
  );
}

/** @throws DomainError `invalid` for each line that names an unknown recipe or demonstration */
export async function resolveLines(lines: readonly RequestLineInput[]): Promise<LineInPlan[]> {
  const demonstrationIds = lines.flatMap((line) =>
    line.kind === 'demonstration' ? [line.demonstrationId] : [],
  );
  const [demonstrations, portions] = await Promise.all([
    DemonstrationModel.findAll({ where: { id: demonstrationIds } }),
    DemonstrationPortionModel.findAll({
      where: { demonstrationId: demonstrationIds },
      order: [['position', 'ASC']],
    }),
  ]);
  const recipes = await recipesById([
    ...lines.flatMap((line) => (line.kind === 'solution' ? [line.solutionId] : [])),
    ...portions.map(({ solutionId }) => solutionId),
  ]);
  const byId = new Map(demonstrations.map((demonstration) => [demonstration.id, demonstration]));
  const errors: { pointer: string; detail: string }[] = [];
  const resolved = lines.flatMap((line, index): LineInPlan[] => {
    if (line.kind === 'solution') {
      const solution = recipes.get(line.solutionId);
      if (!solution)
        errors.push({ pointer: `#/lines/${index}/solutionId`, detail: 'There is no such solution.' });
      return solution
        ? [
            {
              kind: 'solution',
              solution,
              volumePerBenchMl: line.volumePerBenchMl,
              spareBenches: line.spareBenches,
            },
          ]
        : [];
    }
    const demonstration = byId.get(line.demonstrationId);
    if (!demonstration) {
      errors.push({ pointer: `#/lines/${index}/demonstrationId`, detail: 'There is no such demonstration.' });
      return [];
    }
    const own = portions.filter(({ demonstrationId }) => demonstrationId === demonstration.id);
    return [
      {
        kind: 'demonstration',
        id: demonstration.id,
        name: demonstration.name,
        outcomeWanted: demonstration.outcomeWanted,
        vesselMl: demonstration.vesselMl,
        performances: line.performances,
        portions: own.flatMap(({ solutionId, volumeMl }) => {
          const solution = recipes.get(solutionId);
          return solution ? [{ solution, volumeMl }] : [];
        }),
      },
    ];
  });
  if (errors.length > 0) throw invalid(errors);
  return resolved;
}

export async function linesOf(requestIds: readonly string[]): Promise<Map<string, RequestLineInput[]>> {
  const rows = await RequestLineModel.findAll({
    where: { requestId: [...requestIds] },
    order: [['position', 'ASC']],
  });
  const byRequest = new Map<string, RequestLineInput[]>(requestIds.map((id) => [id, []]));
  for (const row of rows) {
    const line: RequestLineInput =
      row.kind === 'solution'
        ? {
            kind: 'solution',
            solutionId: row.solutionId ?? '',
            volumePerBenchMl: row.volumePerBenchMl ?? 0,
            spareBenches: row.spareBenches,
          }
        : {
            kind: 'demonstration',
            demonstrationId: row.demonstrationId ?? '',
            performances: row.performances ?? 1,
          };
    byRequest.get(row.requestId)?.push(line);
  }
  return byRequest;
}

/** A line as the need for volumes is counted from. */
export function plainLine(line: LineInPlan) {
  return line.kind === 'solution'
    ? {
        kind: 'solution' as const,
        solutionId: line.solution.id,
        volumePerBenchMl: line.volumePerBenchMl,
        spareBenches: line.spareBenches,
      }
    : {
        kind: 'demonstration' as const,
        demonstrationId: line.id,
        performances: line.performances,
        portions: line.portions.map(({ solution, volumeMl }) => ({ solutionId: solution.id, volumeMl })),
      };
}
