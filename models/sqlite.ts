import type { Sequelize } from 'sequelize';

/** Everything that holds for SQLite alone lives in this file. */

/** Write-ahead logging lets readers go on while one writes. Kept in the database file itself. */
export async function prepareFile(database: Sequelize): Promise<void> {
  await database.query('PRAGMA journal_mode = WAL');
}

/** Refuses changes and deletions of a table's rows in the database itself. */
export async function makeAppendOnly(database: Sequelize, table: string): Promise<void> {
  for (const event of ['UPDATE', 'DELETE']) {
    await database.query(
      `CREATE TRIGGER ${table}_no_${event.toLowerCase()} BEFORE ${event} ON ${table} BEGIN SELECT RAISE(ABORT, '${table} is append-only'); END`,
    );
  }
}

/** @returns the problems SQLite finds in the file; empty when it is sound */
export async function integrityProblems(database: Sequelize): Promise<string[]> {
  const [rows] = await database.query('PRAGMA integrity_check');
  const [orphans] = await database.query('PRAGMA foreign_key_check');
  const messages = (rows as { integrity_check: string }[]).map((row) => row.integrity_check);
  return [
    ...messages.filter((message) => message !== 'ok'),
    ...orphans.map((row) => `orphan: ${JSON.stringify(row)}`),
  ];
}

/** Writes a consistent copy of the live database to a new file. */
export async function copyTo(database: Sequelize, file: string): Promise<void> {
  await database.query('VACUUM INTO $file', { bind: { file } });
}

interface Configurable {
  configure(option: 'busyTimeout', milliseconds: number): void;
}

/**
 * Sequelize opens a connection per transaction and offers no hook on it, so the wait for another
 * process's lock is set where connections are handed out.
 */
export function waitForLocks(database: Sequelize, milliseconds: number): void {
  const manager = database.connectionManager;
  const getConnection = manager.getConnection.bind(manager);
  manager.getConnection = async (options) => {
    const connection = await getConnection(options);
    (connection as Configurable).configure('busyTimeout', milliseconds);
    return connection;
  };
}

/** Says where the file is when the first connection is made, not before. */
export function openOnFirstUse(database: Sequelize, file: () => string): void {
  const manager = database.connectionManager;
  const getConnection = manager.getConnection.bind(manager);
  const { options } = database as unknown as { options: { storage?: string } };
  manager.getConnection = async (request) => {
    options.storage ??= file();
    return getConnection(request);
  };
}
