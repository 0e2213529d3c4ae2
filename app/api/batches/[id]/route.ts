import { route } from '@/lib/http/route';
import { batchEndpoints } from '@/lib/schemas/batches';
import { getBatch } from '@/lib/services/batches';

export const GET = route(batchEndpoints.read, ({ viewer, params }) => getBatch(viewer, params.id));
