import { route } from '@/lib/http/route';
import { outboxEndpoints } from '@/lib/schemas/outbox';
import { resend } from '@/lib/services/outbox';

export const POST = route(outboxEndpoints.resend, ({ viewer, params }) => resend(viewer, params.id));
