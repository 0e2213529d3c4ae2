import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { submitOrder } from '@/lib/services/orders';

export const POST = route(orderEndpoints.submit, ({ viewer, params, body }) =>
  submitOrder(viewer, params.id, body),
);
