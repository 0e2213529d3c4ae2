import { listRoute } from '@/lib/http/list-route';
import { substanceEndpoints } from '@/lib/schemas/substances';
import { listSpecies } from '@/lib/services/substances';

export const GET = listRoute(substanceEndpoints.species, async ({ viewer, query }) =>
  listSpecies(viewer, query),
);
