import { route } from '@/lib/http/route';
import { reviewEndpoints } from '@/lib/schemas/reviews';
import { decideReview } from '@/lib/services/review-decisions';

export const POST = route(reviewEndpoints.decide, ({ viewer, params, body }) =>
  decideReview(viewer, params.id, body),
);
