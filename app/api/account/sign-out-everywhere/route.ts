import { route } from '@/lib/http/route';
import { clearedCookie } from '@/lib/http/session-cookie';
import { accountEndpoints } from '@/lib/schemas/account';
import { signOutEverywhere } from '@/lib/services/accounts';

export const POST = route(accountEndpoints.signOutEverywhere, async ({ viewer }) => {
  await signOutEverywhere(viewer);
  return new Response(null, { status: 204, headers: { 'set-cookie': clearedCookie() } });
});
