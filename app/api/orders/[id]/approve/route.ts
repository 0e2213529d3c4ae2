import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { approveOrder } from '@/lib/services/order-approval';

export const POST = route(orderEndpoints.approve, ({ viewer, params, body }) =>
  approveOrder(viewer, params.id, body),
);
