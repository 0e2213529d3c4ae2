import { AsyncLocalStorage } from 'node:async_hooks';
import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { Sequelize, Transaction } from 'sequelize';
import { environment } from '@/lib/config/env';
import { ALL_MODELS } from './all-models';
import { openOnFirstUse, waitForLocks } from './sqlite';

/**
 * The connection, and the only way to write. Sequelize gives every transaction its own SQLite
 * connection; writers that wait for each other inside the database hold the few threads the holder
 * needs to finish. So writers queue here, in the process, and start IMMEDIATE: nobody loses an update.
 */

interface House {
  readonly database: Sequelize;
  /** Which transaction the running work belongs to. */
  readonly contexts: AsyncLocalStorage<Map<string, unknown>>;
  lastWrite: Promise<unknown>;
}
/**
 * Kept on the global object: the server loads this module once for every bundle, and development reloads it. All
 * of them share one connection, one queue and one notion of the running transaction.
 */
const shared = globalThis as typeof globalThis & { benchwrightHouse?: House };

/** Lets a query find the transaction of the work it belongs to without being handed it. */
function transactionContext(contexts: House['contexts']) {
  return {
    get: (key: string) => contexts.getStore()?.get(key),
    set: (key: string, value: unknown) => contexts.getStore()?.set(key, value),
    run: (work: (context: Map<string, unknown>) => unknown) => {
      const context = new Map(contexts.getStore() ?? []);
      contexts.run(context, () => work(context));
      return context;
    },
    bind:
      (work: (...args: unknown[]) => unknown, context = contexts.getStore() ?? new Map<string, unknown>()) =>
      (...args: unknown[]) =>
        contexts.run(context, () => work(...args)),
  };
}

export function dataDirectory(): string {
  return path.resolve(/* turbopackIgnore: true */ environment().DATA_DIR);
}

/** Touches neither disk nor environment: builds load this module too, and tests choose their folder afterwards. */
function open(): House {
  const contexts = new AsyncLocalStorage<Map<string, unknown>>();
  Sequelize.useCLS(transactionContext(contexts));
  const database = new Sequelize({ dialect: 'sqlite', logging: false, retry: { max: 1 } });
  openOnFirstUse(database, fileInDataDirectory);
  waitForLocks(database, 5000);
  return { database, contexts, lastWrite: Promise.resolve() };
}

function fileInDataDirectory(): string {
  const directory = dataDirectory();
  mkdirSync(directory, { recursive: true });
  return path.join(directory, 'benchwright.sqlite');
}

let boundTo: House | undefined;

/** The shared house, with the model classes of this very bundle bound to it. */
function house(): House {
  const current = (shared.benchwrightHouse ??= open());
  if (boundTo !== current) {
    for (const model of ALL_MODELS) model.define(current.database);
    boundTo = current;
  }
  return current;
}

/** Whoever reads through a model must find it bound, also where nothing was written yet. */
house();

/** The database of this process, opened on first use. */
export function database(): Sequelize {
  return house().database;
}

/** Closes the connection, for scripts and tests. */
export async function closeDatabase(): Promise<void> {
  const open = shared.benchwrightHouse;
  if (!open) return;
  shared.benchwrightHouse = undefined;
  await open.lastWrite.catch(() => undefined);
  await open.database.close();
}

/** The transaction that the running work belongs to, if any. */
export function currentTransaction(): Transaction | undefined {
  return shared.benchwrightHouse?.contexts.getStore()?.get('transaction') as Transaction | undefined;
}

/**
 * Runs work in one write transaction: all of it is kept or none. A write inside a write joins it.
 * Every query inside belongs to the transaction without being handed it.
 */
export async function write<T>(work: () => Promise<T>): Promise<T> {
  if (currentTransaction()) return work();
  const open = house();
  const turn = open.lastWrite.then(() =>
    open.database.transaction({ type: Transaction.TYPES.IMMEDIATE }, work),
  );
  open.lastWrite = turn.catch(() => undefined);
  return turn;
}

/** Runs work once the current transaction is kept; at once where there is none. */
export function afterCommit(work: () => void): void {
  const transaction = currentTransaction();
  if (transaction) transaction.afterCommit(() => house().contexts.exit(work));
  else work();
}
