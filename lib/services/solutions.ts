import 'server-only';
import { Op } from 'sequelize';
import { speciate } from '@/lib/chemistry/speciation';
import { componentAmounts } from '@/lib/chemistry/mixing';
import { findSubstance } from '@/lib/chemistry/substances';
import { DomainError, invalid } from '@/lib/domain/errors';
import { authorise } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import { classifySolution } from '@/lib/hazards/classification/classify-solution';
import { adviseRecipe } from '@/lib/planning/recipe-advice';
import type { RecipeAdvice } from '@/lib/planning/recipe-advice';
import type { Page } from '@/lib/schemas/list';
import type {
  Solution,
  SolutionCreate,
  SolutionDetail,
  SolutionListQuery,
  SolutionPatch,
  SolutionPreview,
  SolutionPreviewBody,
} from '@/lib/schemas/solutions';
import { write } from '@/models/db';
import { SolutionModel } from '@/models/solution';
import { SolutionSoluteModel } from '@/models/solution-solute';
import { contains, orderOf } from './lists';
import { refuseStale } from './moves';
import { record } from './record';
import { recomputeRequestsUsing } from './request-changes';

/** A week, where neither the writer nor the catalogue says how long a solution keeps. */
const CAUTIOUS_LIFE_DAYS = 7;

/** Rows with their solutes in order. */
export async function presentSolutions(rows: readonly SolutionModel[]): Promise<Solution[]> {
  const solutes = await SolutionSoluteModel.findAll({
    where: { solutionId: rows.map(({ id }) => id) },
    order: [['position', 'ASC']],
  });
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    ownerId: row.ownerId,
    shelfLifeDays: row.shelfLifeDays,
    storageNote: row.storageNote,
    toleranceClass: row.toleranceClass,
    isArchived: row.archivedAt !== null,
    version: row.version,
    solutes: solutes
      .filter(({ solutionId }) => solutionId === row.id)
      .map(({ substanceId, molarity }) => {
        const substance = findSubstance(substanceId);
        return {
          substance: substanceId,
          name: substance?.name ?? substanceId,
          formula: substance?.formula ?? '',
          molarity,
        };
      }),
  }));
}

async function detail(row: SolutionModel): Promise<SolutionDetail> {
  const [solution] = await presentSolutions([row]);
  if (!solution) throw new Error('A solution can be presented');
  const pH = solutionPh(solution.solutes);
  return {
    ...solution,
    pH,
    classification: classifySolution({ solutes: solution.solutes, pH }),
    questions: adviceOn(solution.solutes).questions,
  };
}

/** pH of a solution as made; null where no equilibrium is found. */
export function solutionPh(
  solutes: readonly { readonly substance: string; readonly molarity: number }[],
): number | null {
  const outcome = speciate({
    volumeL: 1,
    amounts: componentAmounts({ label: 'solution', solutes, volumeMl: 1000 }),
    reactions: 'catalogue',
    pH: null,
    suppress: [],
    activity: 'davies',
    temperatureC: 25,
    headspace: { kind: 'none' },
  });
  return outcome.converged ? outcome.pH : null;
}

/** What the catalogue says of solutes; those it does not know are left out. */
function adviceOn(
  solutes: readonly { readonly substance: string; readonly molarity: number }[],
): RecipeAdvice {
  return adviseRecipe(
    solutes.flatMap(({ substance: id, molarity }) => {
      const substance = findSubstance(id);
      return substance ? [{ substance, molarity }] : [];
    }),
  );
}

/** The label, pH and keeping of a recipe while it is being written; nothing is kept. */
export function previewSolution({ solutes }: SolutionPreviewBody): SolutionPreview {
  const resolved = resolveSolutes(solutes).map(({ substanceId, molarity }) => ({
    substance: substanceId,
    molarity,
  }));
  const pH = solutionPh(resolved);
  return { ...adviceOn(resolved), pH, classification: classifySolution({ solutes: resolved, pH }) };
}

export async function listSolutions(_viewer: Viewer, query: SolutionListQuery): Promise<Page<Solution>> {
  const { rows, count } = await SolutionModel.findAndCountAll({
    where: {
      archivedAt: query.archived === 'yes' ? { [Op.ne]: null } : null,
      ...(query.search ? contains('name', query.search) : {}),
    },
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await presentSolutions(rows), total: count, page: query.page, pageSize: query.pageSize };
}

export async function getSolution(_viewer: Viewer, id: string): Promise<SolutionDetail> {
  const row = await SolutionModel.findByPk(id);
  if (!row) throw new DomainError('not-found', 'There is no such solution.');
  return detail(row);
}

/** Catalogue ids of the solutes. @throws DomainError `invalid` for each that is unknown or stands twice */
function resolveSolutes(solutes: SolutionCreate['solutes']): { substanceId: string; molarity: number }[] {
  const seen = new Set<string>();
  const errors = solutes.flatMap(({ substance }, index) => {
    const pointer = `#/solutes/${index}/substance`;
    const found = findSubstance(substance);
    if (!found) return [{ pointer, detail: 'This substance is not in the catalogue.' }];
    if (!Number.isFinite(found.molarMassGPerMol))
      return [{ pointer, detail: 'It has no molar mass, so it cannot be asked for in mol/L.' }];
    if (seen.has(found.id)) return [{ pointer, detail: 'This substance stands twice.' }];
    seen.add(found.id);
    return [];
  });
  if (errors.length > 0) throw invalid(errors);
  return solutes.map(({ substance, molarity }) => ({
    substanceId: findSubstance(substance)?.id ?? substance,
    molarity,
  }));
}

async function saveSolutes(
  solutionId: string,
  solutes: readonly { substanceId: string; molarity: number }[],
): Promise<void> {
  await SolutionSoluteModel.destroy({ where: { solutionId } });
  await SolutionSoluteModel.bulkCreate(
    solutes.map((solute, position) => ({ solutionId, position, ...solute })),
  );
}

export async function createSolution(viewer: Viewer, input: SolutionCreate): Promise<SolutionDetail> {
  const { solutes, shelfLifeDays, storageNote, ...rest } = input;
  const resolved = resolveSolutes(solutes);
  const advice = adviceOn(solutes);
  const keeping = {
    shelfLifeDays: shelfLifeDays ?? advice.shelfLifeDays ?? CAUTIOUS_LIFE_DAYS,
    storageNote: storageNote === undefined ? advice.storageNote : storageNote,
  };
  return write(async () => {
    const row = await SolutionModel.create({ ...rest, ...keeping, ownerId: viewer.id });
    await saveSolutes(row.id, resolved);
    await record(viewer, {
      subjectType: 'solution',
      subjectId: row.id,
      subjectLabel: row.name,
      action: 'created',
    });
    return detail(row);
  });
}

/** Plans that use the recipe are computed again, and reviews that no longer fit lapse. */
export async function updateSolution(
  viewer: Viewer,
  id: string,
  patch: SolutionPatch,
): Promise<SolutionDetail> {
  const { solutes, isArchived, version, ...rest } = patch;
  const resolved = resolveSolutes(solutes);
  return write(async () => {
    const row = await SolutionModel.findByPk(id);
    if (!row) throw new DomainError('not-found', 'There is no such solution.');
    authorise(viewer, 'recipe:update', { ownerId: row.ownerId }, 'It is the recipe of somebody else.');
    await refuseStale(row, version, () => detail(row));
    await row.update({
      ...rest,
      archivedAt: isArchived ? (row.archivedAt ?? new Date()) : null,
      version: version + 1,
    });
    await saveSolutes(row.id, resolved);
    await record(viewer, {
      subjectType: 'solution',
      subjectId: row.id,
      subjectLabel: row.name,
      action: isArchived ? 'archived' : 'changed',
    });
    await recomputeRequestsUsing(viewer, row.id, row.name);
    return detail(row);
  });
}
