import { route } from '@/lib/http/route';
import { mixEndpoints } from '@/lib/schemas/mixes';
import { computeSpeciation } from '@/lib/services/mixes';

export const POST = route(mixEndpoints.speciation, async ({ body }) =>
  Response.json(computeSpeciation(body)),
);
