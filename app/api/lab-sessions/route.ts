import { listRoute } from '@/lib/http/list-route';
import { route } from '@/lib/http/route';
import { labSessionEndpoints } from '@/lib/schemas/lab-sessions';
import { createLabSession, listLabSessions } from '@/lib/services/lab-sessions';

export const GET = listRoute(labSessionEndpoints.list, ({ viewer, query }) => listLabSessions(viewer, query));
export const POST = route(labSessionEndpoints.create, ({ viewer, body }) => createLabSession(viewer, body));
