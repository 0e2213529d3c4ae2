import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { refuseOrder } from '@/lib/services/order-approval';

export const POST = route(orderEndpoints.refuse, ({ viewer, params, body }) =>
  refuseOrder(viewer, params.id, body),
);
