import { openApiDocument } from '@/lib/http/openapi';
import { route } from '@/lib/http/route';
import { houseEndpoints } from '@/lib/schemas/house';

export const GET = route(houseEndpoints.openapi, async () => openApiDocument());
