import { clearedCookie, sessionCookie } from '@/lib/http/session-cookie';
import { route } from '@/lib/http/route';
import { accountEndpoints } from '@/lib/schemas/account';
import { signIn } from '@/lib/services/accounts';
import type { Viewer } from '@/lib/domain/roles';

function userOf({ id, name, email, roles }: Viewer) {
  return { id, name, email, roles };
}

export const GET = route(accountEndpoints.whoAmI, async ({ viewer }) => ({
  user: viewer ? { ...userOf(viewer), roles: [...viewer.roles] } : null,
}));

export const POST = route(accountEndpoints.signIn, async ({ body }) => {
  const { viewer, sessionVersion } = await signIn(body.email, body.password);
  return Response.json(
    { user: userOf(viewer) },
    {
      headers: {
        'set-cookie': await sessionCookie({ userId: viewer.id, sessionVersion }),
        'cache-control': 'no-store',
      },
    },
  );
});

export const DELETE = route(
  accountEndpoints.signOut,
  async () => new Response(null, { status: 204, headers: { 'set-cookie': clearedCookie() } }),
);
