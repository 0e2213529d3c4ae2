import { listRoute } from '@/lib/http/list-route';
import { shortageEndpoints } from '@/lib/schemas/shortages';
import { listShortages } from '@/lib/services/shortages';

export const GET = listRoute(shortageEndpoints.list, ({ viewer, query }) => listShortages(viewer, query));
