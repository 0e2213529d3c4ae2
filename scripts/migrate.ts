import { syncCatalogue } from '@/lib/services/catalogue-sync';
import { closeDatabase, database } from '@/models/db';
import { migrateUp } from '@/models/migrate';

/** Brings the database to this version, and the catalogue's substances into it. */
async function main(): Promise<void> {
  const done = await migrateUp(database());
  console.log(done.length === 0 ? 'Database is current.' : `Migrated: ${done.join(', ')}`);
  const added = await syncCatalogue();
  if (added > 0) console.log(`Catalogue: ${added} substances added.`);
  await closeDatabase();
}

main().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
