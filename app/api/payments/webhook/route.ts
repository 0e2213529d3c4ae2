import { readBytes } from '@/lib/http/body';
import { route } from '@/lib/http/route';
import { paymentEndpoints } from '@/lib/schemas/payments';
import { receivePaymentEvent } from '@/lib/services/payments';

export const POST = route(paymentEndpoints.webhook, async ({ request }) => {
  const payload = (await readBytes(request)).toString('utf8');
  await receivePaymentEvent(payload, request.headers.get('stripe-signature') ?? '');
  return { received: true };
});
