import { listRoute } from '@/lib/http/list-route';
import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { createBatch } from '@/lib/services/batch-planning';
import { listBatches } from '@/lib/services/batches';

export const GET = listRoute(batchEndpoints.list, ({ viewer, query }) => listBatches(viewer, query));
export const POST = route(batchEndpoints.create, ({ viewer, body, idempotencyKey }) =>
  createBatch(viewer, body, idempotencyKey),
);
