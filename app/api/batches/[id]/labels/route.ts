import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { labelsOfBatch } from '@/lib/services/bottle-labels';

export const GET = route(batchEndpoints.labels, ({ viewer, params }) => labelsOfBatch(viewer, params.id));
