import { route } from '@/lib/http/route';
import { bottleEndpoints } from '@/lib/schemas/bottles';
import { getBottle } from '@/lib/services/bottle-rows';

export const GET = route(bottleEndpoints.read, ({ viewer, params }) => getBottle(viewer, params.id));
