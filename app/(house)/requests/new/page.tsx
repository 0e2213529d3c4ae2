import type { Metadata } from 'next';
import { RequestForm } from '@/components/requests/request-form';
import { StepStrip } from '@/components/steps/step-strip';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';
import { sessionChoices } from '@/lib/services/session-choices';

export const metadata: Metadata = { title: 'Ask for a session' };

export default async function NewRequestPage({ searchParams }: PageProps<'/requests/new'>) {
  const viewer = await pageViewer('request:create');
  const { session } = await searchParams;
  const sessions = await sessionChoices(viewer);
  return (
    <>
      <PageHeader
        title="What does the session need?"
        lead="Solutions for every bench, and demonstrations. What they will do is worked out beside them."
      />
      <StepStrip done={0} now="being written" />
      {sessions.length === 0 ? (
        <EmptyState
          title="You have no session ahead"
          action={<LinkButton href="/sessions/new">Make a session</LinkButton>}
        >
          A request belongs to a session: a course, a room and an hour.
        </EmptyState>
      ) : (
        <RequestForm
          sessions={sessions}
          sessionId={typeof session === 'string' ? session : ''}
          request={null}
        />
      )}
    </>
  );
}
