import { route } from '@/lib/http/route';
import { mixEndpoints } from '@/lib/schemas/mixes';
import { computePreview } from '@/lib/services/mixes';

export const POST = route(mixEndpoints.preview, async ({ body }) => Response.json(computePreview(body)));
