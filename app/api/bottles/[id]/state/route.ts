import { route } from '@/lib/http/route';
import { bottleEndpoints } from '@/lib/schemas/bottles';
import { changeBottle } from '@/lib/services/bottles';

export const POST = route(bottleEndpoints.change, ({ viewer, params, body }) =>
  changeBottle(viewer, params.id, body),
);
