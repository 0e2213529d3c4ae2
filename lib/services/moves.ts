import 'server-only';
import { DomainError } from '@/lib/domain/errors';
import type { JsonObject } from '@/lib/domain/json';
import type { Viewer } from '@/lib/domain/roles';
import {
  BATCH_MOVES,
  BOTTLE_MOVES,
  ORDER_MOVES,
  REQUEST_MOVES,
  REVIEW_MOVES,
  stateWords,
} from '@/lib/domain/states';
import { record } from './record';

const MOVES = {
  request: REQUEST_MOVES,
  review: REVIEW_MOVES,
  batch: BATCH_MOVES,
  bottle: BOTTLE_MOVES,
  order: ORDER_MOVES,
};

/** A row with a state and a version, as all things that move through the house have. */
interface Stateful<S extends string> {
  id: string;
  state: S;
  version: number;
  save(): Promise<unknown>;
}

/**
 * Changes a state and writes the line that tells of it; other changed fields of the row are saved too.
 * @throws DomainError `wrong-state` where that change is not possible
 */
export async function changeState<K extends keyof typeof MOVES, S extends keyof (typeof MOVES)[K] & string>(
  actor: Viewer | null,
  kind: K,
  row: Stateful<S>,
  toState: S,
  about: { readonly label: string; readonly reason?: string | null; readonly detail?: JsonObject },
): Promise<void> {
  const table = MOVES[kind] as unknown as Readonly<Record<string, readonly string[]>>;
  const fromState = row.state;
  if (!table[fromState]?.includes(toState)) {
    throw new DomainError(
      'wrong-state',
      `The ${kind} ${about.label} is ${stateWords(fromState)}; it can't become ${stateWords(toState)}.`,
    );
  }
  row.state = toState;
  row.version += 1;
  await row.save();
  await record(actor, {
    subjectType: kind,
    subjectId: row.id,
    subjectLabel: about.label,
    action: stateWords(toState),
    fromState,
    toState,
    reason: about.reason ?? null,
    detail: about.detail,
  });
}

/**
 * @param current - reads the newer state, when it comes to that
 * @throws DomainError `conflict`, carrying the newer state, where somebody changed it meanwhile
 */
export async function refuseStale(
  row: { version: number },
  version: number,
  current: () => unknown,
): Promise<void> {
  if (row.version === version) return;
  throw new DomainError(
    'conflict',
    'Somebody changed this meanwhile. What you typed is kept; look at the newer state and try again.',
    { data: { current: await current() } },
  );
}
