import { listRoute } from '@/lib/http/list-route';
import { needEndpoints } from '@/lib/schemas/needs';
import { listNeeds } from '@/lib/services/needs';

export const GET = listRoute(needEndpoints.list, ({ viewer, query }) => listNeeds(viewer, query));
