import { listRoute } from '@/lib/http/list-route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { listShortages } from '@/lib/services/shortages';

export const GET = listRoute(orderEndpoints.shortages, ({ viewer, query }) => listShortages(viewer, query));
