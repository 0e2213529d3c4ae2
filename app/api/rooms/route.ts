import { route } from '@/lib/http/route';
import { labSessionEndpoints } from '@/lib/schemas/lab-sessions';
import { listRooms } from '@/lib/services/lab-sessions';

export const GET = route(labSessionEndpoints.rooms, async () => ({ items: await listRooms() }));
