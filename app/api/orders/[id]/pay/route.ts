import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { payOrder } from '@/lib/services/payments';

export const POST = route(orderEndpoints.pay, ({ viewer, params, body }) =>
  payOrder(viewer, params.id, body),
);
