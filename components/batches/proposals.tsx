import type { Need } from '@/lib/schemas/needs';
import { Amount } from '../ui/amount';
import { EmptyState } from '../ui/empty-state';
import { Moment } from '../ui/moment';
import { MakeWindows } from './make-windows';
import { PlanDialog } from './plan-dialog';

export interface Proposal {
  readonly solutionId: string;
  readonly solutionName: string;
  readonly makeOn: string;
  readonly notBefore: string;
  readonly notAfter: string;
  readonly volumeMl: number;
  readonly needs: readonly Need[];
}

interface ProposalsProps {
  readonly proposals: readonly Proposal[];
  readonly late: readonly Need[];
  readonly saved: number;
  readonly today: string;
  readonly mayWrite: boolean;
}

/** What is still to be planned, day by day, with the day it is best made on. */
export function Proposals({ proposals, late, saved, today, mayWrite }: ProposalsProps) {
  if (proposals.length === 0 && late.length === 0) {
    return (
      <EmptyState title="Everything agreed is planned">
        What agreed requests need comes here until a batch is planned for it.
      </EmptyState>
    );
  }
  const days = [...new Set(proposals.map(({ makeOn }) => makeOn))];
  return (
    <div className="grid gap-6">
      {saved > 0 && (
        <p>
          {proposals.length} {proposals.length === 1 ? 'batch serves' : 'batches serve'} what{' '}
          {proposals.length + saved} would make one by one: {saved} saved.
        </p>
      )}
      <MakeWindows proposals={proposals} today={today} />
      {days.map((day) => (
        <section key={day} aria-labelledby={`day-${day}`}>
          <h3 id={`day-${day}`} className="border-b-2 border-line pb-1 text-base">
            Make on <Moment at={day} style="day" />
          </h3>
          <ul>
            {proposals
              .filter(({ makeOn }) => makeOn === day)
              .map((proposal) => (
                <ProposalLine
                  key={`${proposal.solutionId}${proposal.makeOn}`}
                  proposal={proposal}
                  mayWrite={mayWrite}
                />
              ))}
          </ul>
        </section>
      ))}
      {late.length > 0 && (
        <section aria-labelledby="too-late">
          <h3 id="too-late" className="border-b-2 border-signal pb-1 text-base text-signal">
            ▲ Too late to make
          </h3>
          <ul>
            {late.map(({ id, solutionName, requestCode, session, startsAt }) => (
              <li key={id} className="border-b py-2">
                <strong>{solutionName}</strong> for {requestCode}, {session}, <Moment at={startsAt} />
              </li>
            ))}
          </ul>
        </section>
      )}
    </div>
  );
}

function ProposalLine({ proposal, mayWrite }: { readonly proposal: Proposal; readonly mayWrite: boolean }) {
  const { solutionName, volumeMl, needs, notBefore, notAfter, makeOn } = proposal;
  return (
    <li className="flex flex-wrap items-center gap-x-5 gap-y-2 border-b py-3">
      <div className="min-w-0 flex-1">
        <p className="font-semibold">
          {solutionName}: <Amount value={volumeMl} unit="mL" />
        </p>
        <p className="text-sm text-soft">
          For {needs.map(({ requestCode, session }) => `${requestCode} (${session})`).join(', ')}. Any day
          from <Moment at={notBefore} style="short-day" /> to <Moment at={notAfter} style="short-day" />.
        </p>
      </div>
      {mayWrite && <PlanDialog solutionName={solutionName} makeOn={makeOn} needs={needs} />}
    </li>
  );
}
