import 'server-only';
import { Op } from 'sequelize';
import type { WhereOptions } from 'sequelize';
import type { Viewer } from '@/lib/domain/roles';
import type { Page } from '@/lib/schemas/list';
import type { RecordEntry, RecordListQuery } from '@/lib/schemas/records';
import { RecordEntryModel } from '@/models/record-entry';
import { contains, pageOfRows } from './lists';
import { firstBrokenLine } from './record';

function present(entry: RecordEntryModel): RecordEntry {
  const {
    seq,
    at,
    actorName,
    subjectType,
    subjectId,
    subjectLabel,
    action,
    fromState,
    toState,
    reason,
    hash,
  } = entry;
  return {
    id: seq,
    at,
    actorName,
    subjectType,
    subjectId,
    subjectLabel,
    action,
    fromState,
    toState,
    reason,
    hash,
  };
}

/** Lines of the record, newest first unless asked otherwise. Times are UTC text, so days compare as text. */
export async function listRecord(_viewer: Viewer, query: RecordListQuery): Promise<Page<RecordEntry>> {
  const conditions: WhereOptions[] = [];
  if (query.subjectType) conditions.push({ subjectType: query.subjectType });
  if (query.subjectId) conditions.push({ subjectId: query.subjectId });
  if (query.from) conditions.push({ at: { [Op.gte]: query.from } });
  if (query.to) conditions.push({ at: { [Op.lt]: `${query.to}T24` } });
  if (query.search) {
    const columns = ['actorName', 'subjectLabel', 'action', 'reason'];
    conditions.push({ [Op.or]: columns.map((column) => contains(column, query.search)) });
  }
  const direction = query.sort === 'at' ? 'ASC' : 'DESC';
  return pageOfRows(
    RecordEntryModel,
    query,
    { where: { [Op.and]: conditions }, order: [['seq', direction]] },
    present,
  );
}

/** The story of one thing, oldest first; part of that thing's own page, so whoever sees it may read it. */
export async function storyOf(subjectType: string, subjectId: string): Promise<RecordEntry[]> {
  const lines = await RecordEntryModel.findAll({
    where: { subjectType, subjectId },
    order: [['seq', 'ASC']],
    limit: 200,
  });
  return lines.map(present);
}

export async function checkRecord(): Promise<{ lines: number; firstBrokenLine: number | null }> {
  return { lines: await RecordEntryModel.count(), firstBrokenLine: await firstBrokenLine() };
}
