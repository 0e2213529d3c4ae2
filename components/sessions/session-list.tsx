'use client';

import Link from 'next/link';
import { labSessionEndpoints } from '@/lib/schemas/lab-sessions';
import type { LabSession } from '@/lib/schemas/lab-sessions';
import { ChoiceFilter, WHOSE } from '../ui/choice-filter';
import { EmptyState } from '../ui/empty-state';
import { TextInput } from '../ui/inputs';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';
import { StateMark } from '../ui/state-mark';

export function SessionList({
  today,
  startsWithMine,
}: {
  readonly today: string;
  readonly startsWithMine: boolean;
}) {
  const whose = startsWithMine ? 'mine' : 'all';
  return (
    <ListTable<LabSession>
      endpoint={labSessionEndpoints.list}
      label="Sessions"
      searchLabel="Course or title"
      defaults={{ from: today, whose }}
      empty={
        <EmptyState title="No sessions here">
          Sessions are the bench hours of a course. Make one, or look at earlier days.
        </EmptyState>
      }
      filters={(state, change) => (
        <>
          <ChoiceFilter label="Whose" field="whose" choices={WHOSE} state={state} change={change} />
          <TextInput
            id="session-from"
            label="From"
            type="date"
            value={state.from ?? today}
            onChange={(event) => change({ from: event.target.value })}
            className="w-44"
          />
        </>
      )}
      columns={[
        {
          id: 'starts',
          header: 'When',
          sortKey: 'startsAt',
          cell: ({ startsAt }) => <Moment at={startsAt} />,
        },
        {
          id: 'title',
          header: 'Session',
          sortKey: 'title',
          cell: ({ id, course, title, isCancelled }) => (
            <>
              <Link href={`/sessions/${id}`} className="font-semibold">
                {course} {title}
              </Link>
              {isCancelled && ' (cancelled)'}
            </>
          ),
        },
        { id: 'room', header: 'Room', cell: ({ roomName }) => roomName },
        { id: 'benches', header: 'Benches', isNumeric: true, cell: ({ benches }) => benches },
        { id: 'who', header: 'Instructor', cell: ({ instructorName }) => instructorName },
        {
          id: 'requests',
          header: 'Asked for',
          cell: ({ id, requests, isCancelled }) =>
            requests.length === 0 ? (
              isCancelled ? null : (
                <Link href={`/requests/new?session=${id}`}>nothing yet</Link>
              )
            ) : (
              <span className="flex flex-wrap gap-2">
                {requests.map((request) => (
                  <Link key={request.id} href={`/requests/${request.id}`} className="no-underline">
                    <StateMark
                      state={request.state}
                      words={`${request.code} ${request.state.replaceAll('-', ' ')}`}
                    />
                  </Link>
                ))}
              </span>
            ),
        },
      ]}
    />
  );
}
