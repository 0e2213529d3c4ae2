import { listRoute } from '@/lib/http/list-route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { listOffers } from '@/lib/services/offers';

export const GET = listRoute(orderEndpoints.offers, ({ viewer, query }) => listOffers(viewer, query));
