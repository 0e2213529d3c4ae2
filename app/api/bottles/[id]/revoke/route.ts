import { route } from '@/lib/http/route';
import { bottleEndpoints } from '@/lib/schemas/bottles';
import { revokeBottle } from '@/lib/services/bottles';

export const POST = route(bottleEndpoints.revoke, ({ viewer, params, body }) =>
  revokeBottle(viewer, params.id, body),
);
