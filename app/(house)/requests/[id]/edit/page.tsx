import type { Metadata } from 'next';
import { format } from 'date-fns';
import { redirect } from 'next/navigation';
import { RequestForm } from '@/components/requests/request-form';
import { Alert } from '@/components/ui/alert';
import { PageHeader } from '@/components/ui/page-header';
import { load, pageViewer } from '@/lib/http/page';
import { getLabSession } from '@/lib/services/lab-sessions';
import { getRequest } from '@/lib/services/requests';

export const metadata: Metadata = { title: 'Change a request' };

export default async function EditRequestPage({ params }: PageProps<'/requests/[id]/edit'>) {
  const viewer = await pageViewer('request:update');
  const { id } = await params;
  const request = await load(getRequest(viewer, id));
  if (!request.mayChange) redirect(`/requests/${id}`);
  const session = await load(getLabSession(viewer, request.sessionId));
  const words = `${format(new Date(session.startsAt), 'EEE d MMM, HH:mm')} – ${session.course} ${session.title} (${session.benches} benches)`;
  return (
    <>
      <PageHeader title={`Change ${request.code}`} />
      {(request.state === 'in-review' || request.state === 'agreed') && (
        <div className="mb-6">
          <Alert tone="attention" title="A changed plan is judged again">
            What was agreed holds for the plan as it was.
          </Alert>
        </div>
      )}
      <RequestForm
        sessions={[{ id: session.id, words, benches: session.benches }]}
        sessionId={session.id}
        request={request}
      />
    </>
  );
}
