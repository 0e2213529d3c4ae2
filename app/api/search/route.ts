import { route } from '@/lib/http/route';
import { searchEndpoints } from '@/lib/schemas/search';
import { search } from '@/lib/services/search';

export const GET = route(searchEndpoints.search, async ({ viewer, query }) => ({
  hits: await search(viewer, query.text),
}));
