import type { Metadata } from 'next';
import { OutgoingList } from '@/components/outgoing/outgoing-list';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Outgoing' };

export default async function OutgoingPage() {
  await pageViewer('outbox:read');
  return (
    <>
      <PageHeader
        title="What goes out"
        lead="Letters and orders wait here until the service outside has taken them. After eight failures a message is given up, and a person decides."
      />
      <OutgoingList />
    </>
  );
}
