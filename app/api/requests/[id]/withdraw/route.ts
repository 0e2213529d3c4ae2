import { route } from '@/lib/http/route';
import { requestEndpoints } from '@/lib/schemas/requests';
import { withdrawRequest } from '@/lib/services/requests';

export const POST = route(requestEndpoints.withdraw, ({ viewer, params, body }) =>
  withdrawRequest(viewer, params.id, body),
);
