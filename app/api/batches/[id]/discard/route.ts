import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { discardBatch } from '@/lib/services/batch-making';

export const POST = route(batchEndpoints.discard, ({ viewer, params, body }) =>
  discardBatch(viewer, params.id, body),
);
