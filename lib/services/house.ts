import 'server-only';
import { database } from '@/models/db';

/** @throws whatever the database says where it does not answer */
export async function pingDatabase(): Promise<void> {
  await database().authenticate();
}
