import { route } from '@/lib/http/route';
import { houseEndpoints } from '@/lib/schemas/house';
import { pingDatabase } from '@/lib/services/house';
import { version } from '@/package.json';

export const GET = route(houseEndpoints.health, async () => {
  await pingDatabase();
  return { ok: true, version };
});
