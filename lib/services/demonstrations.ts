import 'server-only';
import { DomainError, invalid } from '@/lib/domain/errors';
import { authorise } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type {
  Demonstration,
  DemonstrationCreate,
  DemonstrationListQuery,
  DemonstrationPatch,
} from '@/lib/schemas/demonstrations';
import type { Page } from '@/lib/schemas/list';
import { write } from '@/models/db';
import { DemonstrationModel } from '@/models/demonstration';
import { DemonstrationPortionModel } from '@/models/demonstration-portion';
import { SolutionModel } from '@/models/solution';
import { contains, orderOf } from './lists';
import { refuseStale } from './moves';
import { record } from './record';
import { recomputeRequestsShowing } from './request-changes';
import { presentSolutions } from './solutions';

/** Rows with their portions in order of pouring. */
export async function presentDemonstrations(rows: readonly DemonstrationModel[]): Promise<Demonstration[]> {
  const portions = await DemonstrationPortionModel.findAll({
    where: { demonstrationId: rows.map(({ id }) => id) },
    order: [['position', 'ASC']],
  });
  const solutions = await SolutionModel.findAll({
    where: { id: portions.map(({ solutionId }) => solutionId) },
  });
  const byId = new Map((await presentSolutions(solutions)).map((solution) => [solution.id, solution]));
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    ownerId: row.ownerId,
    outcomeWanted: row.outcomeWanted,
    vesselMl: row.vesselMl,
    isArchived: row.archivedAt !== null,
    version: row.version,
    portions: portions
      .filter(({ demonstrationId }) => demonstrationId === row.id)
      .map(({ solutionId, volumeMl }) => {
        const solution = byId.get(solutionId);
        return {
          solutionId,
          volumeMl,
          label: solution?.name ?? '',
          solutes: (solution?.solutes ?? []).map(({ substance, molarity }) => ({ substance, molarity })),
        };
      }),
  }));
}

async function presentOne(row: DemonstrationModel): Promise<Demonstration> {
  const [demonstration] = await presentDemonstrations([row]);
  if (!demonstration) throw new Error('A demonstration can be presented');
  return demonstration;
}

export async function listDemonstrations(
  _viewer: Viewer,
  query: DemonstrationListQuery,
): Promise<Page<Demonstration>> {
  const { rows, count } = await DemonstrationModel.findAndCountAll({
    where: { archivedAt: null, ...(query.search ? contains('name', query.search) : {}) },
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return {
    items: await presentDemonstrations(rows),
    total: count,
    page: query.page,
    pageSize: query.pageSize,
  };
}

export async function getDemonstration(_viewer: Viewer, id: string): Promise<Demonstration> {
  const row = await DemonstrationModel.findByPk(id);
  if (!row) throw new DomainError('not-found', 'There is no such demonstration.');
  return presentOne(row);
}

/** @throws DomainError `invalid` for each portion of an unknown solution */
async function requireSolutions(portions: DemonstrationCreate['portions']): Promise<void> {
  const known = new Set(
    (
      await SolutionModel.findAll({
        where: { id: portions.map(({ solutionId }) => solutionId) },
        attributes: ['id'],
      })
    ).map(({ id }) => id),
  );
  const errors = portions.flatMap(({ solutionId }, index) =>
    known.has(solutionId)
      ? []
      : [{ pointer: `#/portions/${index}/solutionId`, detail: 'There is no such solution.' }],
  );
  if (errors.length > 0) throw invalid(errors);
}

async function savePortions(
  demonstrationId: string,
  portions: DemonstrationCreate['portions'],
): Promise<void> {
  await DemonstrationPortionModel.destroy({ where: { demonstrationId } });
  await DemonstrationPortionModel.bulkCreate(
    portions.map((portion, position) => ({ demonstrationId, position, ...portion })),
  );
}

export async function createDemonstration(
  viewer: Viewer,
  input: DemonstrationCreate,
): Promise<Demonstration> {
  const { portions, ...rest } = input;
  return write(async () => {
    await requireSolutions(portions);
    const row = await DemonstrationModel.create({ ...rest, ownerId: viewer.id });
    await savePortions(row.id, portions);
    await record(viewer, {
      subjectType: 'demonstration',
      subjectId: row.id,
      subjectLabel: row.name,
      action: 'created',
    });
    return presentOne(row);
  });
}

export async function updateDemonstration(
  viewer: Viewer,
  id: string,
  patch: DemonstrationPatch,
): Promise<Demonstration> {
  const { portions, isArchived, version, ...rest } = patch;
  return write(async () => {
    const row = await DemonstrationModel.findByPk(id);
    if (!row) throw new DomainError('not-found', 'There is no such demonstration.');
    authorise(viewer, 'recipe:update', { ownerId: row.ownerId }, 'It is the demonstration of somebody else.');
    await refuseStale(row, version, () => presentOne(row));
    await requireSolutions(portions);
    await row.update({
      ...rest,
      archivedAt: isArchived ? (row.archivedAt ?? new Date()) : null,
      version: version + 1,
    });
    await savePortions(row.id, portions);
    await record(viewer, {
      subjectType: 'demonstration',
      subjectId: row.id,
      subjectLabel: row.name,
      action: isArchived ? 'archived' : 'changed',
    });
    await recomputeRequestsShowing(viewer, row.id, row.name);
    return presentOne(row);
  });
}
