import { route } from '@/lib/http/route';
import { demonstrationEndpoints } from '@/lib/schemas/demonstrations';
import { getDemonstration, updateDemonstration } from '@/lib/services/demonstrations';

export const GET = route(demonstrationEndpoints.read, ({ viewer, params }) =>
  getDemonstration(viewer, params.id),
);
export const PATCH = route(demonstrationEndpoints.update, ({ viewer, params, body }) =>
  updateDemonstration(viewer, params.id, body),
);
