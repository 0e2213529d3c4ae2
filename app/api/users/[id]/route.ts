import { route } from '@/lib/http/route';
import { userEndpoints } from '@/lib/schemas/users';
import { updateUser } from '@/lib/services/accounts';

export const PATCH = route(userEndpoints.update, ({ viewer, params, body }) =>
  updateUser(viewer, params.id, body),
);
