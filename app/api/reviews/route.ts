import { listRoute } from '@/lib/http/list-route';
import { reviewEndpoints } from '@/lib/schemas/reviews';
import { listReviews } from '@/lib/services/review-cases';

export const GET = listRoute(reviewEndpoints.list, ({ viewer, query }) => listReviews(viewer, query));
