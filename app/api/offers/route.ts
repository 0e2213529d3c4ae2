import { listRoute } from '@/lib/http/list-route';
import { offerEndpoints } from '@/lib/schemas/offers';
import { listOffers } from '@/lib/services/offers';

export const GET = listRoute(offerEndpoints.list, ({ viewer, query }) => listOffers(viewer, query));
