import 'server-only';
import { Op } from 'sequelize';
import { log } from '@/lib/config/log';
import { DomainError } from '@/lib/domain/errors';
import type { JsonObject } from '@/lib/domain/json';
import type { Viewer } from '@/lib/domain/roles';
import type { OutboxChannel } from '@/lib/domain/states';
import type { OutboxItem, OutboxListQuery } from '@/lib/schemas/outbox';
import type { Page } from '@/lib/schemas/list';
import { afterCommit, currentTransaction, write } from '@/models/db';
import { OutboxMessageModel } from '@/models/outbox-message';
import { contains, orderOf, pageOfRows } from './lists';
import { PermanentFailure } from './outside/failure';
import { sendLetter } from './outside/mail';
import type { Letter } from './outside/mail';
import { record } from './record';
import { deliverOrder } from './supplier-delivery';

/**
 * What goes outside waits here. It is written in the same transaction as the change it tells of, and sent
 * afterwards; a service that is down or slow delays it and nothing else.
 */

const FIRST_WAIT_SECONDS = 5;
const LONGEST_WAIT_SECONDS = 3600;
/** Ten tries in the first hour and a half, then one an hour: given up after about a day. */
const MAX_ATTEMPTS = 34;
const AT_ONCE = 20;

interface Outgoing {
  readonly channel: OutboxChannel;
  /** The same key is sent once, however often it is asked for. */
  readonly dedupeKey: string;
  readonly payload: JsonObject;
  readonly subjectType?: string;
  readonly subjectId?: string;
}

/** @throws TypeError outside a write */
export async function enqueue(message: Outgoing): Promise<void> {
  if (!currentTransaction()) throw new TypeError('enqueue() belongs inside write()');
  await OutboxMessageModel.findOrCreate({
    where: { dedupeKey: message.dedupeKey },
    defaults: { ...message, state: 'waiting', nextAttemptAt: new Date() },
  });
  sendSoon();
}

/** Queues a letter. */
export async function enqueueLetter(
  dedupeKey: string,
  letter: Letter,
  subject?: { type: string; id: string },
): Promise<void> {
  await enqueue({
    channel: 'mail',
    dedupeKey,
    payload: letter as unknown as JsonObject,
    subjectType: subject?.type,
    subjectId: subject?.id,
  });
}

async function deliver(message: OutboxMessageModel): Promise<void> {
  if (message.channel === 'mail') await sendLetter(message.payload as unknown as Letter, message.id);
  else await deliverOrder(message.payload, message.id);
}

/** Kept on the global object: the server loads this module once for its start and once for its routes. */
const shared = globalThis as typeof globalThis & {
  benchwrightOutbox?: { isServing: boolean; round?: Promise<number> };
};
const outbox = (shared.benchwrightOutbox ??= { isServing: false });

/** Sends from now on, at once after each change and every few seconds. Scripts only fill the outbox. */
export async function serveOutbox(everyMs: number): Promise<void> {
  outbox.isServing = true;
  setInterval(drainQuietly, everyMs).unref();
  await drainOutbox();
}

function drainQuietly(): void {
  drainOutbox().catch((error: unknown) => log().error({ err: error }, 'outbox'));
}

function sendSoon(): void {
  if (outbox.isServing) afterCommit(drainQuietly);
}

/** Sends what is due; one round at a time. @returns how many were sent */
export function drainOutbox(): Promise<number> {
  outbox.round ??= drainRound().finally(() => {
    outbox.round = undefined;
  });
  return outbox.round;
}

async function drainRound(): Promise<number> {
  let sent = 0;
  for (;;) {
    const due = await OutboxMessageModel.findAll({
      where: { state: 'waiting', nextAttemptAt: { [Op.lte]: new Date() } },
      order: [['nextAttemptAt', 'ASC']],
      limit: AT_ONCE,
    });
    if (due.length === 0) return sent;
    for (const message of due) sent += (await attempt(message)) ? 1 : 0;
  }
}

async function attempt(message: OutboxMessageModel): Promise<boolean> {
  try {
    await deliver(message);
  } catch (error) {
    const attempts = message.attempts + 1;
    const waitSeconds = Math.min(FIRST_WAIT_SECONDS * 2 ** message.attempts, LONGEST_WAIT_SECONDS);
    const lastError = error instanceof Error ? error.message : String(error);
    log().warn(
      { outbox: message.id, channel: message.channel, attempts, reason: lastError },
      'outgoing message failed',
    );
    await write(() =>
      message.update({
        attempts,
        lastError: lastError.slice(0, 500),
        state: attempts >= MAX_ATTEMPTS || error instanceof PermanentFailure ? 'dead' : 'waiting',
        nextAttemptAt: new Date(Date.now() + waitSeconds * 1000),
      }),
    );
    return false;
  }
  await write(() =>
    message.update({ state: 'sent', sentAt: new Date(), attempts: message.attempts + 1, lastError: null }),
  );
  return true;
}

function present(message: OutboxMessageModel): OutboxItem {
  const { id, channel, state, attempts, lastError, subjectType, subjectId } = message;
  const payload = message.payload as { to?: string; subject?: string; orderCode?: string };
  return {
    id,
    channel,
    state,
    attempts,
    lastError,
    subjectType,
    subjectId,
    summary:
      channel === 'mail'
        ? `${payload.subject ?? 'letter'} → ${payload.to ?? ''}`
        : `Order ${payload.orderCode ?? ''}`,
    nextAttemptAt: message.nextAttemptAt.toISOString(),
    sentAt: message.sentAt?.toISOString() ?? null,
  };
}

export async function listOutbox(_viewer: Viewer, query: OutboxListQuery): Promise<Page<OutboxItem>> {
  const where = {
    ...(query.state ? { state: query.state } : {}),
    ...(query.search ? contains('dedupeKey', query.search) : {}),
  };
  return pageOfRows(OutboxMessageModel, query, { where, order: orderOf(query.sort) }, present);
}

/** Puts a message that was given up, or is waiting for its next try, first in line. */
export async function resend(viewer: Viewer, id: string): Promise<OutboxItem> {
  const item = await write(async () => {
    const message = await OutboxMessageModel.findByPk(id);
    if (!message) throw new DomainError('not-found', 'There is no such message.');
    if (message.state === 'sent') throw new DomainError('wrong-state', 'It was already sent.');
    await message.update({ state: 'waiting', attempts: 0, nextAttemptAt: new Date() });
    await record(viewer, {
      subjectType: 'outgoing',
      subjectId: id,
      subjectLabel: message.dedupeKey,
      action: 'sent again',
    });
    sendSoon();
    return present(message);
  });
  return item;
}
