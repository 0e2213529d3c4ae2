import { route } from '@/lib/http/route';
import { requestEndpoints } from '@/lib/schemas/requests';
import { getRequest, updateRequest } from '@/lib/services/requests';

export const GET = route(requestEndpoints.read, ({ viewer, params }) => getRequest(viewer, params.id));
export const PATCH = route(requestEndpoints.update, ({ viewer, params, body }) =>
  updateRequest(viewer, params.id, body),
);
