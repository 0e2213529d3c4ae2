import type { Metadata } from 'next';
import { SessionForm } from '@/components/sessions/session-form';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';
import { listRooms } from '@/lib/services/lab-sessions';

export const metadata: Metadata = { title: 'Make a session' };

export default async function NewSessionPage() {
  await pageViewer('lab-session:create');
  return (
    <>
      <PageHeader title="Make a session" lead="A course in a room at an hour, with so many benches." />
      <SessionForm rooms={await listRooms()} session={null} />
    </>
  );
}
