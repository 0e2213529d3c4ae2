import { listRoute } from '@/lib/http/list-route';
import { route } from '@/lib/http/route';
import { requestEndpoints } from '@/lib/schemas/requests';
import { listRequests } from '@/lib/services/request-list';
import { createRequest } from '@/lib/services/requests';

export const GET = listRoute(requestEndpoints.list, ({ viewer, query }) => listRequests(viewer, query));
export const POST = route(requestEndpoints.create, ({ viewer, body }) => createRequest(viewer, body));
