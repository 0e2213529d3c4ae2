import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { PlannedAmounts, PlannedDemonstrations, PlannedFindings } from '@/components/requests/plan-view';
import { RequestActions } from '@/components/requests/request-actions';
import { Story } from '@/components/records/story';
import { StepStrip } from '@/components/steps/step-strip';
import { Alert } from '@/components/ui/alert';
import { Moment } from '@/components/ui/moment';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { StateMark } from '@/components/ui/state-mark';
import { stateWords } from '@/lib/domain/states';
import type { RequestState } from '@/lib/domain/states';
import { load, pageViewer } from '@/lib/http/page';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import { getRequest } from '@/lib/services/requests';

export const metadata: Metadata = { title: 'Request' };

/** How many of the four steps are behind a request. */
const STEPS_DONE: Readonly<Record<RequestState, number>> = {
  draft: 0,
  asked: 1,
  'in-review': 1,
  returned: 1,
  agreed: 2,
  'in-work': 2,
  ready: 3,
  'handed-over': 4,
  closed: 4,
  withdrawn: 0,
};

export default async function RequestPage({ params }: PageProps<'/requests/[id]'>) {
  const viewer = await pageViewer('request:read');
  const { id } = await params;
  const request = await load(getRequest(viewer, id));
  const plan = request.plan as unknown as RequestPlan | null;
  const review = request.review;
  return (
    <>
      <PageHeader
        title={`${request.code} for ${request.session}`}
        lead={
          <>
            <Moment at={request.startsAt} />; asked by {request.requesterName}; waits for {request.waitsFor}
          </>
        }
        actions={<StateMark state={request.state} />}
      />
      <StepStrip
        done={STEPS_DONE[request.state]}
        now={stateWords(request.state)}
        isStopped={request.decision === 'stop' && request.state === 'in-review'}
        hrefs={[null, review ? (`/reviews/${review.id}` as Route) : null, null, null]}
      />
      {review && review.state !== 'lapsed' && (
        <div className="mb-6">
          <Alert
            tone={
              review.state === 'waiting' ? 'attention' : review.state.startsWith('agreed') ? 'done' : 'stop'
            }
            title={
              review.state === 'waiting'
                ? 'A safety officer must judge this plan'
                : `Safety: ${stateWords(review.state)}`
            }
          >
            {review.decisionText && <p>{review.decisionText}</p>}
            {review.conditions.length > 0 && (
              <ul className="list-disc pl-5">
                {review.conditions.map((line) => (
                  <li key={line}>{line}</li>
                ))}
              </ul>
            )}
            <Link href={`/reviews/${review.id}` as Route}>Open the case</Link>
          </Alert>
        </div>
      )}
      <RequestActions request={request} />
      <Section title="What is asked">
        <ul className="max-w-3xl">
          {request.lines.map((line, index) => (
            <li key={index} className="flex flex-wrap justify-between gap-x-4 border-b py-2">
              <span className="font-semibold">{request.lineNames[index]}</span>
              <span className="font-mono text-soft">
                {line.kind === 'solution'
                  ? `${line.volumePerBenchMl} mL per bench, ${line.spareBenches} to spare`
                  : `shown ${line.performances === 1 ? 'once' : `${line.performances} times`}`}
              </span>
            </li>
          ))}
        </ul>
        {request.note && <p className="mt-3 max-w-[75ch]">“{request.note}”</p>}
      </Section>
      {plan && (
        <>
          <Section title="What was found">
            <PlannedFindings plan={plan} />
          </Section>
          {plan.demonstrations.length > 0 && (
            <Section title="What the demonstrations will do">
              <div className="max-w-3xl">
                <PlannedDemonstrations plan={plan} />
              </div>
            </Section>
          )}
          <Section title="What it takes">
            <PlannedAmounts plan={plan} />
          </Section>
        </>
      )}
      <Section title="What happened">
        <Story entries={request.story} />
      </Section>
    </>
  );
}
