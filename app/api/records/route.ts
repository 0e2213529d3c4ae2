import { listRoute } from '@/lib/http/list-route';
import { recordEndpoints } from '@/lib/schemas/records';
import { listRecord } from '@/lib/services/records';

export const GET = listRoute(recordEndpoints.list, ({ viewer, query }) => listRecord(viewer, query));
