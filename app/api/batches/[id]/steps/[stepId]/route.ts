import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { tickStep } from '@/lib/services/batch-making';

export const PUT = route(batchEndpoints.tick, ({ viewer, params, body }) =>
  tickStep(viewer, params.id, params.stepId, body.isDone),
);
