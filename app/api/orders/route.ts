import { listRoute } from '@/lib/http/list-route';
import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { createOrder, listOrders } from '@/lib/services/orders';

export const GET = listRoute(orderEndpoints.list, ({ viewer, query }) => listOrders(viewer, query));
export const POST = route(orderEndpoints.create, ({ viewer, body }) => createOrder(viewer, body));
