import 'server-only';
import { createHash } from 'node:crypto';
import { Op } from 'sequelize';
import type { JsonObject } from '@/lib/domain/json';
import type { Viewer } from '@/lib/domain/roles';
import { currentTransaction } from '@/models/db';
import { RecordEntryModel } from '@/models/record-entry';

/** What happened to a thing. `fromState` and `toState` where it was a change of state. */
export interface Entry {
  readonly subjectType: string;
  readonly subjectId: string;
  readonly subjectLabel: string;
  readonly action: string;
  readonly fromState?: string | null;
  readonly toState?: string | null;
  readonly reason?: string | null;
  readonly detail?: JsonObject;
}

/** The hash that starts the chain. */
export const GENESIS = '0'.repeat(64);

/** JSON with sorted keys, so that equal content gives equal text. */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_key, node: unknown) =>
    node && typeof node === 'object' && !Array.isArray(node)
      ? Object.fromEntries(Object.entries(node).sort(([a], [b]) => (a < b ? -1 : 1)))
      : node,
  );
}

type Hashed = Pick<
  RecordEntryModel,
  | 'at'
  | 'actorId'
  | 'actorName'
  | 'subjectType'
  | 'subjectId'
  | 'subjectLabel'
  | 'action'
  | 'fromState'
  | 'toState'
  | 'reason'
  | 'detail'
  | 'previousHash'
>;

/** SHA-256 over every field of a line and the hash of the line before. */
export function hashEntry(entry: Hashed): string {
  const {
    at,
    actorId,
    actorName,
    subjectType,
    subjectId,
    subjectLabel,
    action,
    fromState,
    toState,
    reason,
    detail,
    previousHash,
  } = entry;
  const fields = {
    at,
    actorId,
    actorName,
    subjectType,
    subjectId,
    subjectLabel,
    action,
    fromState,
    toState,
    reason,
    detail,
    previousHash,
  };
  return createHash('sha256').update(canonicalJson(fields)).digest('hex');
}

/**
 * Writes one line to the append-only record, chained to the line before.
 * @throws TypeError outside a write: a change and its line are kept together or not at all
 */
export async function record(actor: Pick<Viewer, 'id' | 'name'> | null, entry: Entry): Promise<void> {
  if (!currentTransaction()) throw new TypeError('record() belongs inside write()');
  const last = await RecordEntryModel.findOne({ order: [['seq', 'DESC']], attributes: ['hash'] });
  const line: Hashed = {
    at: new Date().toISOString(),
    actorId: actor?.id ?? null,
    actorName: actor?.name ?? 'system',
    subjectType: entry.subjectType,
    subjectId: entry.subjectId,
    subjectLabel: entry.subjectLabel,
    action: entry.action,
    fromState: entry.fromState ?? null,
    toState: entry.toState ?? null,
    reason: entry.reason ?? null,
    detail: entry.detail ?? {},
    previousHash: last?.hash ?? GENESIS,
  };
  await RecordEntryModel.create({ ...line, hash: hashEntry(line) });
}

/** @returns the number of the first line that does not fit the chain, or null where all fit */
export async function firstBrokenLine(): Promise<number | null> {
  let previousHash = GENESIS;
  let after = 0;
  for (;;) {
    const lines = await RecordEntryModel.findAll({
      where: { seq: { [Op.gt]: after } },
      order: [['seq', 'ASC']],
      limit: 2000,
    });
    if (lines.length === 0) return null;
    for (const line of lines) {
      if (line.previousHash !== previousHash || hashEntry(line) !== line.hash) return line.seq;
      previousHash = line.hash;
      after = line.seq;
    }
  }
}
