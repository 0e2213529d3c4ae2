import { listRoute } from '@/lib/http/list-route';
import { route } from '@/lib/http/route';
import { solutionEndpoints } from '@/lib/schemas/solutions';
import { createSolution, listSolutions } from '@/lib/services/solutions';

export const GET = listRoute(solutionEndpoints.list, ({ viewer, query }) => listSolutions(viewer, query));
export const POST = route(solutionEndpoints.create, ({ viewer, body }) => createSolution(viewer, body));
