import type { Metadata } from 'next';
import { formatISO } from 'date-fns';
import { SessionList } from '@/components/sessions/session-list';
import { LinkButton } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { mayByRole } from '@/lib/domain/policy';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Sessions' };

export default async function SessionsPage() {
  const viewer = await pageViewer('lab-session:read');
  return (
    <>
      <PageHeader
        title="Sessions"
        lead="The next first, each with what it still waits for."
        actions={
          mayByRole(viewer, 'lab-session:create') ? (
            <LinkButton href="/sessions/new" look="primary">
              Make a session
            </LinkButton>
          ) : null
        }
      />
      <SessionList
        today={formatISO(new Date(), { representation: 'date' })}
        startsWithMine={viewer.roles.includes('instructor')}
      />
    </>
  );
}
