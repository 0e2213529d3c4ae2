import { listRoute } from '@/lib/http/list-route';
import { route } from '@/lib/http/route';
import { userEndpoints } from '@/lib/schemas/users';
import { createUser, listUsers } from '@/lib/services/accounts';

export const GET = listRoute(userEndpoints.list, ({ viewer, query }) => listUsers(viewer, query));
export const POST = route(userEndpoints.create, ({ viewer, body }) => createUser(viewer, body));
