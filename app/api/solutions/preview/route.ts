import { route } from '@/lib/http/route';
import { solutionEndpoints } from '@/lib/schemas/solutions';
import { previewSolution } from '@/lib/services/solutions';

export const POST = route(solutionEndpoints.preview, ({ body }) => Promise.resolve(previewSolution(body)));
