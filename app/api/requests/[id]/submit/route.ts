import { route } from '@/lib/http/route';
import { requestEndpoints } from '@/lib/schemas/requests';
import { submitRequest } from '@/lib/services/requests';

export const POST = route(requestEndpoints.submit, ({ viewer, params, body }) =>
  submitRequest(viewer, params.id, body),
);
