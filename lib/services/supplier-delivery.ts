import 'server-only';
import type { JsonObject } from '@/lib/domain/json';
import { DomainError } from '@/lib/domain/errors';

/** Sends one order to its supplier's ordering service. */
export async function deliverOrder(_payload: JsonObject, _key: string): Promise<void> {
  throw new DomainError('unavailable', 'The ordering service is not connected yet.');
}
