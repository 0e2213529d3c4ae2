import 'server-only';
import { Op } from 'sequelize';
import type { WhereOptions } from 'sequelize';
import { DomainError } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import type { Bottle, BottleListQuery, BottleRow } from '@/lib/schemas/bottles';
import type { Page } from '@/lib/schemas/list';
import { BatchModel } from '@/models/batch';
import { BottleModel } from '@/models/bottle';
import { RequestModel } from '@/models/request';
import { SolutionModel } from '@/models/solution';
import { batchStops } from './holds';
import { contains, orderOf } from './lists';
import { rowsById } from './lookup';

export async function presentBottles(bottles: readonly BottleModel[]): Promise<Bottle[]> {
  const requests = await rowsById(
    RequestModel,
    bottles.map(({ requestId }) => requestId),
  );
  return bottles.map((bottle) => ({
    id: bottle.id,
    code: bottle.code,
    batchId: bottle.batchId,
    requestId: bottle.requestId,
    requestCode: requests.get(bottle.requestId ?? '')?.code ?? null,
    volumeMl: bottle.volumeMl,
    state: bottle.state,
    placeId: bottle.placeId,
    publicToken: bottle.publicToken,
    isRevoked: bottle.tokenRevokedAt !== null,
    labelPrints: bottle.labelPrints,
    version: bottle.version,
  }));
}

async function presentBottleRows(bottles: readonly BottleModel[]): Promise<BottleRow[]> {
  const batches = await rowsById(
    BatchModel,
    bottles.map(({ batchId }) => batchId),
  );
  const [plain, solutions, stops] = await Promise.all([
    presentBottles(bottles),
    rowsById(
      SolutionModel,
      [...batches.values()].map(({ solutionId }) => solutionId),
    ),
    batchStops([...batches.values()]),
  ]);
  return plain.map((bottle) => {
    const batch = batches.get(bottle.batchId);
    return {
      ...bottle,
      batchCode: batch?.code ?? '',
      solutionName: solutions.get(batch?.solutionId ?? '')?.name ?? '',
      useBy: batch?.useBy?.toISOString() ?? null,
      isHeld: stops.has(bottle.batchId),
    };
  });
}

export async function listBottles(_viewer: Viewer, query: BottleListQuery): Promise<Page<BottleRow>> {
  const conditions: WhereOptions[] = [];
  if (query.state) conditions.push({ state: query.state });
  if (query.requestId) conditions.push({ requestId: query.requestId });
  if (query.batchId) conditions.push({ batchId: query.batchId });
  if (query.search) conditions.push(contains('code', query.search));
  const { rows, count } = await BottleModel.findAndCountAll({
    where: { [Op.and]: conditions },
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await presentBottleRows(rows), total: count, page: query.page, pageSize: query.pageSize };
}

export async function getBottle(_viewer: Viewer, id: string): Promise<BottleRow> {
  const bottle = await BottleModel.findByPk(id);
  if (!bottle) throw new DomainError('not-found', 'There is no such bottle.');
  const [row] = await presentBottleRows([bottle]);
  if (!row) throw new Error(`Bottle ${id} can't be presented`);
  return row;
}
