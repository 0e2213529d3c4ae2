import type { Metadata } from 'next';
import { ReviewQueue } from '@/components/reviews/review-queue';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';
import { listReviews } from '@/lib/services/review-cases';

export const metadata: Metadata = { title: 'Reviews' };

export default async function ReviewsPage() {
  const viewer = await pageViewer('review:list');
  const { total } = await listReviews(viewer, {
    page: 1,
    pageSize: 1,
    sort: 'gravity',
    search: '',
    format: 'json',
    state: 'waiting',
  });
  const title =
    total === 0
      ? 'No plan waits for safety'
      : total === 1
        ? '1 plan waits for safety'
        : `${total} plans wait for safety`;
  return (
    <>
      <PageHeader title={title} lead="The gravest first, the oldest of those first." />
      <ReviewQueue />
    </>
  );
}
