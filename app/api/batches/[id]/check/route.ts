import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { checkBatch } from '@/lib/services/batch-making';

export const POST = route(batchEndpoints.check, ({ viewer, params, body }) =>
  checkBatch(viewer, params.id, body),
);
