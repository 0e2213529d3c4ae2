import { route } from '@/lib/http/route';
import { sessionCookie } from '@/lib/http/session-cookie';
import { accountEndpoints } from '@/lib/schemas/account';
import { changePassword } from '@/lib/services/accounts';

export const POST = route(accountEndpoints.changePassword, async ({ viewer, body }) => {
  const sessionVersion = await changePassword(viewer, body.currentPassword, body.newPassword);
  const cookie = await sessionCookie({ userId: viewer.id, sessionVersion });
  return new Response(null, { status: 204, headers: { 'set-cookie': cookie } });
});
