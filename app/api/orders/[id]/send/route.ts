import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { sendOrder } from '@/lib/services/order-sending';

export const POST = route(orderEndpoints.send, ({ viewer, params, body }) =>
  sendOrder(viewer, params.id, body),
);
