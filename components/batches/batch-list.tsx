'use client';

import Link from 'next/link';
import type { Route } from 'next';
import { BATCH_STATES, stateChoices } from '@/lib/domain/states';
import { batchEndpoints } from '@/lib/schemas/batches';
import type { BatchRow } from '@/lib/schemas/batches';
import { Amount } from '../ui/amount';
import { ChoiceFilter } from '../ui/choice-filter';
import { EmptyState } from '../ui/empty-state';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';
import { StateMark } from '../ui/state-mark';

const NEWEST_FIRST = { sort: '-makeOn' };

/** Every batch, the latest first. */
export function BatchList() {
  return (
    <ListTable<BatchRow>
      endpoint={batchEndpoints.list}
      label="Batches"
      searchLabel="Batch code or solution"
      defaults={NEWEST_FIRST}
      empty={<EmptyState title="No batch yet">A batch comes here when it is planned.</EmptyState>}
      filters={(state, change) => (
        <ChoiceFilter
          label="State"
          field="state"
          choices={stateChoices(BATCH_STATES)}
          anyWords="any"
          state={state}
          change={change}
        />
      )}
      columns={[
        {
          id: 'code',
          header: 'Batch',
          sortKey: 'code',
          cell: ({ id, code, solutionName }) => (
            <Link href={`/batches/${id}` as Route} className="font-semibold">
              <span className="font-mono">{code}</span> {solutionName}
            </Link>
          ),
        },
        {
          id: 'volume',
          header: 'Volume',
          sortKey: 'volumeMl',
          isNumeric: true,
          cell: ({ volumeMl }) => <Amount value={volumeMl} unit="mL" />,
        },
        {
          id: 'makeOn',
          header: 'Make on',
          sortKey: 'makeOn',
          cell: ({ makeOn }) => <Moment at={makeOn} style="short-day" />,
        },
        {
          id: 'readyBy',
          header: 'Ready by',
          sortKey: 'readyBy',
          cell: ({ readyBy }) => <Moment at={readyBy} />,
        },
        {
          id: 'for',
          header: 'For',
          cell: ({ requestCodes }) => <span className="font-mono">{requestCodes.join(', ')}</span>,
        },
        {
          id: 'state',
          header: 'State',
          sortKey: 'state',
          cell: ({ state, isHeld }) =>
            isHeld ? <StateMark state="held" words="on hold" /> : <StateMark state={state} />,
        },
      ]}
    />
  );
}
