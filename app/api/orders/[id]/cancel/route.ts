import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { cancelOrder } from '@/lib/services/order-sending';

export const POST = route(orderEndpoints.cancel, ({ viewer, params, body }) =>
  cancelOrder(viewer, params.id, body),
);
