import { route } from '@/lib/http/route';
import { substanceEndpoints } from '@/lib/schemas/substances';
import { getSubstance } from '@/lib/services/substances';

export const GET = route(substanceEndpoints.read, ({ viewer, params }) => getSubstance(viewer, params.id));
