import 'server-only';
import { environment } from '@/lib/config/env';
import { log } from '@/lib/config/log';
import { serveOutbox } from './outbox';

const OUTBOX_EVERY_MS = 5000;

/** Checks the environment, then starts what goes on by itself. */
export async function startHousekeeping(): Promise<void> {
  environment();
  await serveOutbox(OUTBOX_EVERY_MS).catch((error: unknown) => log().error({ err: error }, 'outbox'));
}
