import 'server-only';
import Stripe from 'stripe';
import { environment } from '@/lib/config/env';
import { DomainError } from '@/lib/domain/errors';

const ANSWER_WITHIN_MS = 10_000;

function client(): Stripe {
  const { STRIPE_SECRET_KEY, STRIPE_API_BASE } = environment();
  if (!STRIPE_SECRET_KEY)
    throw new DomainError('unavailable', 'No payment service is set (STRIPE_SECRET_KEY).');
  const base = STRIPE_API_BASE ? new URL(STRIPE_API_BASE) : null;
  return new Stripe(STRIPE_SECRET_KEY, {
    maxNetworkRetries: 0,
    timeout: ANSWER_WITHIN_MS,
    telemetry: false,
    ...(base
      ? {
          host: base.hostname,
          port: Number(base.port),
          protocol: base.protocol === 'https:' ? ('https' as const) : ('http' as const),
        }
      : {}),
  });
}

export type PaymentOutcome =
  | { readonly status: 'succeeded'; readonly reference: string }
  | { readonly status: 'failed'; readonly reference: string | null; readonly failure: string };

/**
 * Pays an amount at once. The same key pays once, however often it is sent.
 * @throws DomainError `unavailable` where it is not known whether the money moved; asking again with the same key tells
 */
export async function payNow(input: {
  readonly amountMinor: number;
  readonly currency: string;
  readonly description: string;
  readonly paymentId: string;
}): Promise<PaymentOutcome> {
  try {
    const intent = await client().paymentIntents.create(
      {
        amount: input.amountMinor,
        currency: input.currency.toLowerCase(),
        confirm: true,
        payment_method: 'pm_card_visa',
        description: input.description,
        metadata: { payment: input.paymentId },
      },
      { idempotencyKey: input.paymentId },
    );
    if (intent.status === 'succeeded') return { status: 'succeeded', reference: intent.id };
    return {
      status: 'failed',
      reference: intent.id,
      failure: `The payment is ${intent.status?.replaceAll('_', ' ') ?? 'in an unknown state'}.`,
    };
  } catch (error) {
    if (error instanceof Stripe.errors.StripeCardError)
      return { status: 'failed', reference: error.payment_intent?.id ?? null, failure: error.message };
    if (error instanceof DomainError) throw error;
    throw new DomainError(
      'unavailable',
      'The payment service did not answer sensibly. Pay again later: it is never paid twice.',
      { cause: error },
    );
  }
}

/** An event of the payment service, its signature and time checked. @throws DomainError `forbidden` where they are wrong */
export async function readPaymentEvent(payload: string, signature: string): Promise<Stripe.Event> {
  const { STRIPE_WEBHOOK_SECRET } = environment();
  if (!STRIPE_WEBHOOK_SECRET)
    throw new DomainError('unavailable', 'No webhook secret is set (STRIPE_WEBHOOK_SECRET).');
  try {
    return await client().webhooks.constructEventAsync(payload, signature, STRIPE_WEBHOOK_SECRET);
  } catch (cause) {
    throw new DomainError('forbidden', 'The signature does not fit.', { cause });
  }
}
