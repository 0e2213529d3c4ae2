import { listRoute } from '@/lib/http/list-route';
import { outboxEndpoints } from '@/lib/schemas/outbox';
import { listOutbox } from '@/lib/services/outbox';

export const GET = listRoute(outboxEndpoints.list, ({ viewer, query }) => listOutbox(viewer, query));
