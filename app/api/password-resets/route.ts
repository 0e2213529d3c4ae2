import { route } from '@/lib/http/route';
import { accountEndpoints } from '@/lib/schemas/account';
import { askForReset, redeemReset } from '@/lib/services/password-resets';

export const POST = route(accountEndpoints.forgotPassword, async ({ body }) => {
  await askForReset(body.email);
  return undefined;
});

export const PUT = route(accountEndpoints.resetPassword, async ({ body }) => {
  await redeemReset(body.token, body.password);
  return undefined;
});
