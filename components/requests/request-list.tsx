'use client';

import Link from 'next/link';
import { REQUEST_STATES, stateChoices } from '@/lib/domain/states';
import { requestEndpoints } from '@/lib/schemas/requests';
import type { RequestRow } from '@/lib/schemas/requests';
import { LinkButton } from '../ui/button';
import { ChoiceFilter, WHOSE } from '../ui/choice-filter';
import { EmptyState } from '../ui/empty-state';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';
import { StateMark } from '../ui/state-mark';

export function RequestList({
  startsWithMine,
  mayAsk,
}: {
  readonly startsWithMine: boolean;
  readonly mayAsk: boolean;
}) {
  const whose = startsWithMine ? 'mine' : 'all';
  return (
    <ListTable<RequestRow>
      endpoint={requestEndpoints.list}
      label="Requests"
      searchLabel="Request code"
      defaults={{ whose }}
      empty={
        <EmptyState
          title="No requests yet"
          action={mayAsk ? <LinkButton href="/requests/new">Ask for a session</LinkButton> : null}
        >
          A request says what one session needs: solutions for the benches, and demonstrations.
        </EmptyState>
      }
      filters={(state, change) => (
        <>
          <ChoiceFilter label="Whose" field="whose" choices={WHOSE} state={state} change={change} />
          <ChoiceFilter
            label="State"
            field="state"
            choices={stateChoices(REQUEST_STATES)}
            anyWords="any"
            state={state}
            change={change}
          />
        </>
      )}
      columns={[
        {
          id: 'code',
          header: 'Request',
          sortKey: 'code',
          cell: ({ id, code }) => (
            <Link href={`/requests/${id}`} className="font-mono font-bold">
              {code}
            </Link>
          ),
        },
        { id: 'session', header: 'Session', cell: ({ session }) => session },
        { id: 'starts', header: 'Starts', cell: ({ startsAt }) => <Moment at={startsAt} /> },
        { id: 'who', header: 'Asked by', cell: ({ requesterName }) => requesterName },
        { id: 'state', header: 'State', sortKey: 'state', cell: ({ state }) => <StateMark state={state} /> },
        { id: 'waits', header: 'Waits for', cell: ({ waitsFor }) => waitsFor },
      ]}
    />
  );
}
