import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { bottleBatch } from '@/lib/services/bottles';

export const POST = route(batchEndpoints.bottle, ({ viewer, params, body }) =>
  bottleBatch(viewer, params.id, body),
);
