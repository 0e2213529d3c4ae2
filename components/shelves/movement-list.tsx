'use client';

import Link from 'next/link';
import type { Route } from 'next';
import { useMemo } from 'react';
import { MOVEMENT_KINDS, stateWords } from '@/lib/domain/states';
import { movementEndpoints } from '@/lib/schemas/lots';
import type { Movement } from '@/lib/schemas/lots';
import { EmptyState } from '../ui/empty-state';
import { Select } from '../ui/inputs';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';

const signed = (amount: number, unit: string) => `${amount < 0 ? '−' : '+'}${Math.abs(amount)}\u202f${unit}`;

/** The stock ledger, of one lot or of all. Its lines are never changed. */
export function MovementList({ lotId }: { readonly lotId?: string }) {
  const defaults = useMemo(() => (lotId ? { lotId } : undefined), [lotId]);
  return (
    <ListTable<Movement>
      endpoint={movementEndpoints.list}
      label="Ledger"
      searchLabel={lotId ? undefined : 'Lot, substance or reason'}
      defaults={defaults}
      empty={
        <EmptyState title="No line yet">
          A line is written whenever something comes in or is taken.
        </EmptyState>
      }
      filters={(state, change) => (
        <Select
          id="movement-kind"
          label="What"
          value={state.kind ?? ''}
          onChange={(event) => change({ kind: event.target.value })}
          className="w-44"
        >
          <option value="">anything</option>
          {MOVEMENT_KINDS.map((kind) => (
            <option key={kind} value={kind}>
              {stateWords(kind)}
            </option>
          ))}
        </Select>
      )}
      columns={[
        { id: 'at', header: 'When', sortKey: 'at', cell: ({ at }) => <Moment at={at} /> },
        ...(lotId
          ? []
          : [
              {
                id: 'lot',
                header: 'Lot',
                cell: ({ lotId: id, lotCode, substanceName }: Movement) => (
                  <Link href={`/shelves/lots/${id}` as Route}>
                    <span className="font-mono">{lotCode}</span> {substanceName}
                  </Link>
                ),
              },
            ]),
        { id: 'kind', header: 'What', cell: ({ kind }) => stateWords(kind) },
        {
          id: 'amount',
          header: 'Amount',
          sortKey: 'amount',
          isNumeric: true,
          cell: ({ amount, unit }) => <span className="whitespace-nowrap">{signed(amount, unit)}</span>,
        },
        {
          id: 'after',
          header: 'Left after',
          isNumeric: true,
          cell: ({ balanceAfter, unit }) => (
            <span className="whitespace-nowrap">{`${balanceAfter}\u202f${unit}`}</span>
          ),
        },
        { id: 'who', header: 'Who', cell: ({ actorName }) => actorName },
        {
          id: 'why',
          header: 'Why',
          cell: ({ reason, batchId, batchCode }) =>
            batchId && batchCode ? (
              <Link href={`/batches/${batchId}` as Route}>{reason ?? batchCode}</Link>
            ) : (
              (reason ?? '')
            ),
        },
      ]}
    />
  );
}
