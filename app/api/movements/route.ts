import { listRoute } from '@/lib/http/list-route';
import { route } from '@/lib/http/route';
import { movementEndpoints } from '@/lib/schemas/lots';
import { createMovement, listMovements } from '@/lib/services/movements';

export const GET = listRoute(movementEndpoints.list, ({ viewer, query }) => listMovements(viewer, query));
export const POST = route(movementEndpoints.create, ({ viewer, body }) => createMovement(viewer, body));
