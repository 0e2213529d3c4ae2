import { route } from '@/lib/http/route';
import { lotEndpoints } from '@/lib/schemas/lots';
import { setLotHold } from '@/lib/services/lots';

export const POST = route(lotEndpoints.lift, ({ viewer, params, body }) =>
  setLotHold(viewer, params.id, false, body),
);
