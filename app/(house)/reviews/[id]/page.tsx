import type { Metadata } from 'next';
import { CaseReport } from '@/components/reviews/case-report';
import { DecisionBar } from '@/components/reviews/decision-bar';
import { Conversation } from '@/components/reviews/conversation';
import { PageHeader } from '@/components/ui/page-header';
import { Moment } from '@/components/ui/moment';
import { StateMark } from '@/components/ui/state-mark';
import { mayByRole } from '@/lib/domain/policy';
import { load, pageViewer } from '@/lib/http/page';
import { getReview } from '@/lib/services/review-cases';

export const metadata: Metadata = { title: 'Review' };

export default async function ReviewPage({ params }: PageProps<'/reviews/[id]'>) {
  const viewer = await pageViewer('review:read');
  const { id } = await params;
  const review = await load(getReview(viewer, id));
  return (
    <>
      <PageHeader
        title={`May ${review.requestCode} be done here?`}
        lead={
          <>
            {review.session}, <Moment at={review.startsAt} />; asked by {review.requesterName}
          </>
        }
        actions={<StateMark state={review.state} />}
      />
      <CaseReport review={review} />
      <Conversation review={review} />
      {mayByRole(viewer, 'review:decide') && <DecisionBar review={review} />}
    </>
  );
}
