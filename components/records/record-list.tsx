'use client';

import { recordEndpoints } from '@/lib/schemas/records';
import type { RecordEntry } from '@/lib/schemas/records';
import { TextInput } from '../ui/inputs';
import { ChoiceFilter } from '../ui/choice-filter';
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
].map((kind) => [kind, kind] as const);

export function RecordList() {
  return (
    <ListTable<RecordEntry>
      endpoint={recordEndpoints.list}
      label="Record"
      searchLabel="Person, thing, action or reason"
      empty="Nothing has been recorded yet."
      filters={(state, change) => (
        <>
          <ChoiceFilter
            label="Kind"
            field="subjectType"
            choices={KINDS}
            anyWords="any"
            state={state}
            change={change}
          />
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
