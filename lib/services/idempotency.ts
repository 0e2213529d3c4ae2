import 'server-only';
import { DomainError } from '@/lib/domain/errors';
import type { JsonObject } from '@/lib/domain/json';
import { write } from '@/models/db';
import { IdempotencyKeyModel } from '@/models/idempotency-key';

/**
 * Does work once per key: its effects and its answer are kept in one transaction, so a call that is
 * sent twice finds the first answer. A failed call keeps nothing and may be sent again.
 * @throws DomainError `conflict` where the same key comes with another content
 */
export async function once<T>(
  call: {
    readonly userId: string;
    readonly endpoint: string;
    readonly key: string;
    readonly requestHash: string;
  },
  work: () => Promise<T>,
): Promise<T> {
  return write(async () => {
    const { userId, endpoint, key, requestHash } = call;
    const before = await IdempotencyKeyModel.findOne({ where: { userId, endpoint, key } });
    if (before) {
      if (before.requestHash !== requestHash) {
        throw new DomainError('conflict', 'This key was already used for another content.');
      }
      return before.responseBody.result as T;
    }
    const result = await work();
    const responseBody: JsonObject = { result };
    await IdempotencyKeyModel.create({
      userId,
      endpoint,
      key,
      requestHash,
      responseStatus: 200,
      responseBody,
    });
    return result;
  });
}
