import { route } from '@/lib/http/route';
import { labSessionEndpoints } from '@/lib/schemas/lab-sessions';
import { getLabSession, updateLabSession } from '@/lib/services/lab-sessions';

export const GET = route(labSessionEndpoints.read, ({ viewer, params }) => getLabSession(viewer, params.id));
export const PATCH = route(labSessionEndpoints.update, ({ viewer, params, body }) =>
  updateLabSession(viewer, params.id, body),
);
