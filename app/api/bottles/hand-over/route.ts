import { route } from '@/lib/http/route';
import { bottleEndpoints } from '@/lib/schemas/bottles';
import { handOver } from '@/lib/services/bottles';

export const POST = route(bottleEndpoints.handOver, ({ viewer, body }) => handOver(viewer, body));
