import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { SessionForm } from '@/components/sessions/session-form';
import { LinkButton } from '@/components/ui/button';
import { DefinitionList } from '@/components/ui/definition-list';
import { EmptyState } from '@/components/ui/empty-state';
import { Moment } from '@/components/ui/moment';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { StateMark } from '@/components/ui/state-mark';
import { may } from '@/lib/domain/policy';
import { load, pageViewer } from '@/lib/http/page';
import { getLabSession, listRooms } from '@/lib/services/lab-sessions';

export const metadata: Metadata = { title: 'Session' };

export default async function SessionPage({ params }: PageProps<'/sessions/[id]'>) {
  const viewer = await pageViewer('lab-session:read');
  const { id } = await params;
  const session = await load(getLabSession(viewer, id));
  const mayChange = may(viewer, 'lab-session:update', { ownerId: session.instructorId });
  return (
    <>
      <PageHeader
        title={`${session.course} ${session.title}`}
        lead={<Moment at={session.startsAt} />}
        actions={
          mayChange && !session.isCancelled ? (
            <LinkButton href={`/requests/new?session=${session.id}` as Route} look="primary">
              Ask for this session
            </LinkButton>
          ) : session.isCancelled ? (
            <StateMark state="refused" words="cancelled" />
          ) : null
        }
      />
      <div className="grid gap-8 lg:grid-cols-2">
        <div>
          <Section title="Where and who">
            <DefinitionList
              items={[
                ['Room', session.roomName],
                ['Until', <Moment key="end" at={session.endsAt} style="time" />],
                ['Benches', String(session.benches)],
                ['Instructor', session.instructorName],
              ]}
            />
          </Section>
          <Section title="Requests">
            {session.requests.length === 0 ? (
              <EmptyState title="Nothing is asked for yet">
                Solutions and demonstrations for this session are asked for in a request.
              </EmptyState>
            ) : (
              <ul>
                {session.requests.map((request) => (
                  <li key={request.id} className="flex gap-3 border-b py-2">
                    <Link href={`/requests/${request.id}` as Route} className="font-mono font-bold">
                      {request.code}
                    </Link>
                    <StateMark state={request.state} />
                  </li>
                ))}
              </ul>
            )}
          </Section>
        </div>
        {mayChange && (
          <Section title="Change it">
            <SessionForm rooms={await listRooms()} session={session} />
          </Section>
        )}
      </div>
    </>
  );
}
