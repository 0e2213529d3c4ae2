import { route } from '@/lib/http/route';
import { solutionEndpoints } from '@/lib/schemas/solutions';
import { getSolution, updateSolution } from '@/lib/services/solutions';

export const GET = route(solutionEndpoints.read, ({ viewer, params }) => getSolution(viewer, params.id));
export const PATCH = route(solutionEndpoints.update, ({ viewer, params, body }) =>
  updateSolution(viewer, params.id, body),
);
