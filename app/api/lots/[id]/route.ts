import { route } from '@/lib/http/route';
import { lotEndpoints } from '@/lib/schemas/lots';
import { getLot, updateLot } from '@/lib/services/lots';

export const GET = route(lotEndpoints.read, ({ viewer, params }) => getLot(viewer, params.id));
export const PATCH = route(lotEndpoints.update, ({ viewer, params, body }) =>
  updateLot(viewer, params.id, body),
);
