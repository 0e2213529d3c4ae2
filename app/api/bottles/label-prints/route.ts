import { route } from '@/lib/http/route';
import { bottleEndpoints } from '@/lib/schemas/bottles';
import { printLabels } from '@/lib/services/bottles';

export const POST = route(bottleEndpoints.print, ({ viewer, body }) => printLabels(viewer, body));
