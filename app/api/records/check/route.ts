import { route } from '@/lib/http/route';
import { recordEndpoints } from '@/lib/schemas/records';
import { checkRecord } from '@/lib/services/records';

export const GET = route(recordEndpoints.check, () => checkRecord());
