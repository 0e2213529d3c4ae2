'use client';

import Link from 'next/link';
import type { Route } from 'next';
import { BOTTLE_STATES, stateChoices } from '@/lib/domain/states';
import { bottleEndpoints } from '@/lib/schemas/bottles';
import type { BottleRow } from '@/lib/schemas/bottles';
import { Amount } from '../ui/amount';
import { ChoiceFilter } from '../ui/choice-filter';
import { EmptyState } from '../ui/empty-state';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';
import { StateMark } from '../ui/state-mark';

/** Bottles of what was made here. */
export function BottleList() {
  return (
    <ListTable<BottleRow>
      endpoint={bottleEndpoints.list}
      label="Bottles"
      searchLabel="Bottle code"
      empty={
        <EmptyState title="No bottle yet">Bottles come here when a checked batch is divided.</EmptyState>
      }
      filters={(state, change) => (
        <ChoiceFilter
          label="State"
          field="state"
          choices={stateChoices(BOTTLE_STATES)}
          anyWords="any"
          state={state}
          change={change}
        />
      )}
      columns={[
        {
          id: 'code',
          header: 'Bottle',
          sortKey: 'code',
          cell: ({ batchId, code, solutionName }) => (
            <Link href={`/batches/${batchId}` as Route} className="font-semibold">
              <span className="font-mono">{code}</span> {solutionName}
            </Link>
          ),
        },
        {
          id: 'volume',
          header: 'Holds',
          sortKey: 'volumeMl',
          isNumeric: true,
          cell: ({ volumeMl }) => <Amount value={volumeMl} unit="mL" />,
        },
        { id: 'for', header: 'For', cell: ({ requestCode }) => requestCode ?? 'the shelf' },
        {
          id: 'useBy',
          header: 'Use by',
          cell: ({ useBy }) => (useBy ? <Moment at={useBy} style="short-day" /> : '–'),
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
