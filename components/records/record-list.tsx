'use client';

import { recordEndpoints } from '@/lib/schemas/records';
import type { RecordEntry } from '@/lib/schemas/records';
import { Select, TextInput } from '../ui/inputs';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';

const KINDS = [
  'request',
  'review',
  'batch',
  'bottle',
  'lot',
  'order',
  'payment',
  'substance',
  'user',
  'session',
  'outgoing',
];

export function RecordList() {
  return (
    <ListTable<RecordEntry>
      endpoint={recordEndpoints.list}
      label="Record"
      searchLabel="Person, thing, action or reason"
      empty="Nothing has been recorded yet."
      filters={(state, change) => (
        <>
          <Select
            id="record-kind"
            label="Kind"
            value={state.subjectType ?? ''}
            onChange={(event) => change({ subjectType: event.target.value })}
            className="w-40"
          >
            <option value="">all</option>
            {KINDS.map((kind) => (
              <option key={kind}>{kind}</option>
            ))}
          </Select>
          <TextInput
            id="record-from"
            label="From"
            type="date"
            value={state.from ?? ''}
            onChange={(event) => change({ from: event.target.value })}
            className="w-44"
          />
          <TextInput
            id="record-to"
            label="To"
            type="date"
            value={state.to ?? ''}
            onChange={(event) => change({ to: event.target.value })}
            className="w-44"
          />
        </>
      )}
      columns={[
        { id: 'id', header: 'Line', isNumeric: true, cell: ({ id }) => id },
        { id: 'at', header: 'When', sortKey: 'at', cell: ({ at }) => <Moment at={at} /> },
        { id: 'who', header: 'Who', cell: ({ actorName }) => actorName },
        {
          id: 'what',
          header: 'What',
          cell: ({ subjectType, subjectLabel }) => `${subjectType} ${subjectLabel}`,
        },
        {
          id: 'action',
          header: 'Done',
          cell: ({ action, fromState }) =>
            fromState ? `${fromState.replaceAll('-', ' ')} → ${action}` : action,
        },
        { id: 'reason', header: 'Reason', cell: ({ reason }) => reason ?? '' },
        {
          id: 'hash',
          header: 'Hash',
          cell: ({ hash }) => (
            <code title={hash} className="font-mono text-sm">
              {hash.slice(0, 10)}
            </code>
          ),
        },
      ]}
    />
  );
}
