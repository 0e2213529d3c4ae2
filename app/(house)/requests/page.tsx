import type { Metadata } from 'next';
import { RequestList } from '@/components/requests/request-list';
import { LinkButton } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { mayByRole } from '@/lib/domain/policy';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Requests' };

export default async function RequestsPage() {
  const viewer = await pageViewer('request:read');
  const mayAsk = mayByRole(viewer, 'request:create');
  return (
    <>
      <PageHeader
        title="Requests"
        lead="What sessions need, and what each request waits for."
        actions={
          mayAsk ? (
            <LinkButton href="/requests/new" look="primary">
              Ask for a session
            </LinkButton>
          ) : null
        }
      />
      <RequestList startsWithMine={viewer.roles.includes('instructor')} mayAsk={mayAsk} />
    </>
  );
}
