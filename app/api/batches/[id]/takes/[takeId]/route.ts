import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { enterTake } from '@/lib/services/batch-making';

export const PUT = route(batchEndpoints.take, ({ viewer, params, body }) =>
  enterTake(viewer, params.id, params.takeId, body),
);
