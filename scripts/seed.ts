import { environment } from '@/lib/config/env';
import { seedDemo } from '@/seeders/demo';
import { closeDatabase } from '@/models/db';

async function main(): Promise<void> {
  if (environment().APP_MODE === 'production') throw new Error('The demo is not for production');
  console.log(
    (await seedDemo()) ? 'Larkmoor College moved in.' : 'Somebody lives here already; nothing was seeded.',
  );
  await closeDatabase();
}

main().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
