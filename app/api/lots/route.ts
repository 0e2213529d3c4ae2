import { listRoute } from '@/lib/http/list-route';
import { route } from '@/lib/http/route';
import { lotEndpoints } from '@/lib/schemas/lots';
import { listLots } from '@/lib/services/lot-rows';
import { createLot } from '@/lib/services/lots';

export const GET = listRoute(lotEndpoints.list, ({ viewer, query }) => listLots(viewer, query));
export const POST = route(lotEndpoints.create, ({ viewer, body }) => createLot(viewer, body));
