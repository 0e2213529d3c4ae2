import { route } from '@/lib/http/route';
import { substanceEndpoints } from '@/lib/schemas/substances';
import { holdSubstance } from '@/lib/services/substances';

export const POST = route(substanceEndpoints.hold, ({ viewer, params, body }) =>
  holdSubstance(viewer, params.id, body),
);
