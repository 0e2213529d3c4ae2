import { route } from '@/lib/http/route';
import { reviewEndpoints } from '@/lib/schemas/reviews';
import { sayInReview } from '@/lib/services/review-decisions';

export const POST = route(reviewEndpoints.say, ({ viewer, params, body }) =>
  sayInReview(viewer, params.id, body.body),
);
