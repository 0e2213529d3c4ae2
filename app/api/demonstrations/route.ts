import { listRoute } from '@/lib/http/list-route';
import { route } from '@/lib/http/route';
import { demonstrationEndpoints } from '@/lib/schemas/demonstrations';
import { createDemonstration, listDemonstrations } from '@/lib/services/demonstrations';

export const GET = listRoute(demonstrationEndpoints.list, ({ viewer, query }) =>
  listDemonstrations(viewer, query),
);
export const POST = route(demonstrationEndpoints.create, ({ viewer, body }) =>
  createDemonstration(viewer, body),
);
