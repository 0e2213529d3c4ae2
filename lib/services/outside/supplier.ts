import 'server-only';
import { z } from 'zod';
import { environment } from '@/lib/config/env';
import { DomainError } from '@/lib/domain/errors';
import { PermanentFailure } from './failure';

const ANSWER_WITHIN_MS = 8000;
const SAID_AT_MOST = 200;
/** Refusals of the moment, not of the order: time-out, too early, too many calls. */
const TRY_AGAIN: readonly number[] = [408, 425, 429];

const acknowledgementSchema = z.object({
  reference: z.string().min(1).max(80),
  order: z.string(),
  status: z.literal('acknowledged'),
  lines: z.array(
    z.object({
      line: z.string(),
      status: z.enum(['accepted', 'back-ordered', 'price-changed']),
      packs: z.number().int(),
      priceMinor: z.number().int(),
    }),
  ),
});
export type Acknowledgement = z.infer<typeof acknowledgementSchema>;

export interface OutgoingOrder {
  readonly order: string;
  readonly account: string;
  readonly lines: readonly {
    readonly line: string;
    readonly stockNumber: string;
    readonly packs: number;
    readonly priceMinor: number;
  }[];
}

/**
 * Places an order with the ordering service; the same key places it once.
 * @throws PermanentFailure where the service refuses it; DomainError `unavailable` where it does not answer, or not sensibly
 */
export async function placeOrder(order: OutgoingOrder, key: string): Promise<Acknowledgement> {
  const { SUPPLIER_API_BASE, SUPPLIER_API_KEY } = environment();
  if (!SUPPLIER_API_BASE)
    throw new DomainError('unavailable', 'No ordering service is set (SUPPLIER_API_BASE).');
  let response: Response;
  try {
    response = await fetch(new URL('/ordering/orders', SUPPLIER_API_BASE), {
      method: 'POST',
      signal: AbortSignal.timeout(ANSWER_WITHIN_MS),
      headers: {
        'content-type': 'application/json',
        authorization: `Bearer ${SUPPLIER_API_KEY ?? ''}`,
        'idempotency-key': key,
      },
      body: JSON.stringify(order),
    });
  } catch (cause) {
    throw new DomainError('unavailable', 'The ordering service did not answer.', { cause });
  }
  const text = await response.text().catch(() => '');
  if (response.status >= 500 || TRY_AGAIN.includes(response.status))
    throw new DomainError('unavailable', `The ordering service answered ${response.status}.`);
  if (!response.ok) throw new PermanentFailure(`The supplier refused it: ${text.slice(0, SAID_AT_MOST)}`);
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (cause) {
    throw new DomainError('unavailable', 'The ordering service answered something unreadable.', { cause });
  }
  const parsed = acknowledgementSchema.safeParse(value);
  if (!parsed.success || parsed.data.order !== order.order || !answersEveryLine(parsed.data, order))
    throw new DomainError(
      'unavailable',
      'The ordering service answered something that does not fit the order.',
    );
  return parsed.data;
}

function answersEveryLine(answer: Acknowledgement, order: OutgoingOrder): boolean {
  const answered = answer.lines.map(({ line }) => line).sort();
  return (
    answered.join() ===
    order.lines
      .map(({ line }) => line)
      .sort()
      .join()
  );
}
