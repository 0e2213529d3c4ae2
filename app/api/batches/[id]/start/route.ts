import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { startBatch } from '@/lib/services/batch-making';

export const POST = route(batchEndpoints.start, ({ viewer, params, body }) =>
  startBatch(viewer, params.id, body.version),
);
