import { listRoute } from '@/lib/http/list-route';
import { substanceEndpoints } from '@/lib/schemas/substances';
import { listSubstances } from '@/lib/services/substances';

export const GET = listRoute(substanceEndpoints.list, ({ viewer, query }) => listSubstances(viewer, query));
