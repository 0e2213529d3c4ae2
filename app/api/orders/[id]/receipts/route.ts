import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { receivePacks } from '@/lib/services/receiving';

export const POST = route(orderEndpoints.receive, ({ viewer, params, body }) =>
  receivePacks(viewer, params.id, body),
);
