import { z } from 'zod';
import { endpoint } from './endpoint';

export const paymentEndpoints = {
  webhook: endpoint({
    method: 'POST',
    path: '/api/payments/webhook',
    action: 'webhook:receive',
    summary: 'Events of the payment service, signed',
    takes: 'raw',
    response: z.object({ received: z.boolean() }),
  }),
};
