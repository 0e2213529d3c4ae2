import { listRoute } from '@/lib/http/list-route';
import { bottleEndpoints } from '@/lib/schemas/bottles';
import { listBottles } from '@/lib/services/bottle-rows';

export const GET = listRoute(bottleEndpoints.list, ({ viewer, query }) => listBottles(viewer, query));
