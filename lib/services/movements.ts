import 'server-only';
import { Op } from 'sequelize';
import type { WhereOptions } from 'sequelize';
import { DomainError, invalid } from '@/lib/domain/errors';
import { fromMicro, toMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import type { Page } from '@/lib/schemas/list';
import type { Movement, MovementCreate, MovementListQuery } from '@/lib/schemas/lots';
import { write } from '@/models/db';
import { BatchModel } from '@/models/batch';
import { LotModel } from '@/models/lot';
import { MovementModel } from '@/models/movement';
import { SubstanceModel } from '@/models/substance';
import { UserModel } from '@/models/user';
import { move } from './ledger';
import { contains, orderOf } from './lists';
import { rowsById } from './lookup';
import { record } from './record';

async function presentMovements(rows: readonly MovementModel[]): Promise<Movement[]> {
  const [lots, people, batches] = await Promise.all([
    rowsById(
      LotModel,
      rows.map(({ lotId }) => lotId),
    ),
    rowsById(
      UserModel,
      rows.map(({ actorId }) => actorId),
    ),
    rowsById(
      BatchModel,
      rows.map(({ batchId }) => batchId),
    ),
  ]);
  const substances = await rowsById(
    SubstanceModel,
    [...lots.values()].map(({ substanceId }) => substanceId),
  );
  return rows.map((row) => {
    const lot = lots.get(row.lotId);
    if (!lot) throw new Error(`Movement ${row.id} lost its lot`);
    return {
      id: row.id,
      lotId: lot.id,
      lotCode: lot.code,
      substanceName: substances.get(lot.substanceId)?.name ?? lot.substanceId,
      kind: row.kind,
      amount: fromMicro(row.amountMicro),
      balanceAfter: fromMicro(row.balanceAfterMicro),
      unit: lot.unit,
      actorName: people.get(row.actorId)?.name ?? '',
      reason: row.reason,
      batchId: row.batchId,
      batchCode: batches.get(row.batchId ?? '')?.code ?? null,
      at: row.createdAt.toISOString(),
    };
  });
}

/** Lines of the stock ledger. */
export async function listMovements(_viewer: Viewer, query: MovementListQuery): Promise<Page<Movement>> {
  const conditions: WhereOptions[] = [];
  if (query.lotId) conditions.push({ lotId: query.lotId });
  if (query.batchId) conditions.push({ batchId: query.batchId });
  if (query.kind) conditions.push({ kind: query.kind });
  if (query.search) {
    const lots = await LotModel.findAll({
      where: { [Op.or]: [contains('code', query.search), contains('substanceId', query.search)] },
      attributes: ['id'],
      limit: 500,
    });
    conditions.push({ [Op.or]: [contains('reason', query.search), { lotId: lots.map(({ id }) => id) }] });
  }
  const { rows, count } = await MovementModel.findAndCountAll({
    where: { [Op.and]: conditions },
    order: orderOf(query.sort, { at: 'createdAt', amount: 'amountMicro' }),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await presentMovements(rows), total: count, page: query.page, pageSize: query.pageSize };
}

/** By how much a line written by hand changes the balance, in millionths. */
function changeOf(lot: LotModel, line: MovementCreate): number {
  const micro = toMicro(line.amount);
  if (line.kind === 'counted') return micro - lot.balanceMicro;
  return line.kind === 'discarded' ? -micro : micro;
}

/**
 * Writes a line of the ledger by hand. A count that finds what the ledger says writes nothing down but the record.
 * @throws DomainError `not-enough` where less is there, `invalid` where nothing would change
 */
export async function createMovement(viewer: Viewer, line: MovementCreate): Promise<Movement> {
  return write(async () => {
    const lot = await LotModel.findByPk(line.lotId);
    if (!lot) throw invalid([{ pointer: '#/lotId', detail: 'There is no such lot.' }]);
    const amountMicro = changeOf(lot, line);
    if (amountMicro === 0)
      throw invalid([{ pointer: '#/amount', detail: 'The ledger already says so; nothing was changed.' }]);
    const kind = line.kind === 'counted' ? 'corrected' : line.kind;
    const row = await move(viewer, { lotId: lot.id, kind, amountMicro, reason: line.reason });
    await record(viewer, {
      subjectType: 'lot',
      subjectId: lot.id,
      subjectLabel: lot.code,
      action:
        line.kind === 'counted' ? 'counted' : line.kind === 'discarded' ? 'partly discarded' : 'put back',
      reason: line.reason,
      detail: { amountMicro, unit: lot.unit },
    });
    const [presented] = await presentMovements([row]);
    if (!presented) throw new DomainError('not-found', 'The line was not found again.');
    return presented;
  });
}
