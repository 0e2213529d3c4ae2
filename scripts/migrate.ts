import { closeDatabase, database } from '@/models/db';
import { migrateUp } from '@/models/migrate';

async function main(): Promise<void> {
  const done = await migrateUp(database());
  console.log(done.length === 0 ? 'Database is current.' : `Migrated: ${done.join(', ')}`);
  await closeDatabase();
}

main().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
