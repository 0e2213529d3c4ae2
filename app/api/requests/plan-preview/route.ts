import { route } from '@/lib/http/route';
import { requestEndpoints } from '@/lib/schemas/requests';
import { previewPlan } from '@/lib/services/requests';

export const POST = route(requestEndpoints.previewPlan, async ({ viewer, body }) =>
  Response.json(await previewPlan(viewer, body)),
);
