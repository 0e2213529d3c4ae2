import { route } from '@/lib/http/route';
import { reviewEndpoints } from '@/lib/schemas/reviews';
import { getReview } from '@/lib/services/review-cases';

export const GET = route(reviewEndpoints.read, ({ viewer, params }) => getReview(viewer, params.id));
