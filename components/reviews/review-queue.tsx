'use client';

import Link from 'next/link';
import { REVIEW_STATES, stateChoices, stateWords } from '@/lib/domain/states';
import { reviewEndpoints } from '@/lib/schemas/reviews';
import type { ReviewRow } from '@/lib/schemas/reviews';
import { ChoiceFilter } from '../ui/choice-filter';
import { EmptyState } from '../ui/empty-state';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';
import { StateMark } from '../ui/state-mark';

const WAITING = { state: 'waiting' };

export function ReviewQueue() {
  return (
    <ListTable<ReviewRow>
      endpoint={reviewEndpoints.list}
      label="Reviews"
      searchLabel="Request code"
      defaults={WAITING}
      empty={
        <EmptyState title="Nothing waits">A plan comes here when a finding says review or stop.</EmptyState>
      }
      filters={(state, change) => (
        <ChoiceFilter
          label="State"
          field="state"
          choices={stateChoices(REVIEW_STATES)}
          state={state}
          change={change}
        />
      )}
      columns={[
        {
          id: 'request',
          header: 'Request',
          cell: ({ id, requestCode, headline }) => (
            <Link href={`/reviews/${id}`} className="font-semibold">
              {requestCode}: {headline}
            </Link>
          ),
        },
        {
          id: 'found',
          header: 'Found',
          sortKey: 'gravity',
          cell: ({ decision }) => <StateMark state={decision} />,
        },
        { id: 'asked', header: 'Asked by', cell: ({ requesterName }) => requesterName },
        { id: 'session', header: 'Session', cell: ({ session }) => session },
        { id: 'starts', header: 'Starts', cell: ({ startsAt }) => <Moment at={startsAt} /> },
        {
          id: 'opened',
          header: 'Waiting since',
          sortKey: 'openedAt',
          cell: ({ openedAt }) => <Moment at={openedAt} />,
        },
        {
          id: 'state',
          header: 'State',
          sortKey: 'state',
          cell: ({ state, reviewerName }) =>
            reviewerName ? `${stateWords(state)} by ${reviewerName}` : <StateMark state={state} />,
        },
      ]}
    />
  );
}
