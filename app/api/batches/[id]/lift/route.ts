import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { setBatchHold } from '@/lib/services/batch-making';

export const POST = route(batchEndpoints.lift, ({ viewer, params, body }) =>
  setBatchHold(viewer, params.id, false, body),
);
