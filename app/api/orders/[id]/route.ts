import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { getOrder, updateOrder } from '@/lib/services/orders';

export const GET = route(orderEndpoints.read, ({ viewer, params }) => getOrder(viewer, params.id));
export const PATCH = route(orderEndpoints.update, ({ viewer, params, body }) =>
  updateOrder(viewer, params.id, body),
);
