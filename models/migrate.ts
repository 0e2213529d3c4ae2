import type { QueryInterface, Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { ALL_MIGRATIONS } from '@/migrations/all-migrations';
import { prepareFile } from './sqlite';

/** The migrations of this version against a database. */
export function migrator(database: Sequelize): Umzug<QueryInterface> {
  const context = database.getQueryInterface();
  return new Umzug({
    migrations: ALL_MIGRATIONS.map(({ name, up, down }) => ({
      name,
      up: () => up(context),
      down: () => down(context),
    })),
    context,
    storage: new SequelizeStorage({ sequelize: database }),
    logger: undefined,
  });
}

/** @returns the names of the migrations that ran */
export async function migrateUp(database: Sequelize): Promise<string[]> {
  await prepareFile(database);
  return (await migrator(database).up()).map(({ name }) => name);
}
