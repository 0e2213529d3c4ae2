'use client';

import Link from 'next/link';
import type { Route } from 'next';
import { lotEndpoints } from '@/lib/schemas/lots';
import type { LotRow } from '@/lib/schemas/lots';
import type { Place } from '@/lib/schemas/places';
import { Formula } from '../chemistry/formula';
import { Amount } from '../ui/amount';
import { ChoiceFilter } from '../ui/choice-filter';
import { EmptyState } from '../ui/empty-state';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';
import { StateMark } from '../ui/state-mark';

const SHOWN = [
  ['in-stock', 'in stock'],
  ['expiring', 'expiring within 30 days'],
  ['expired', 'past their date'],
  ['low', 'of what is low'],
  ['held', 'on hold'],
  ['empty', 'empty'],
  ['all', 'all'],
] as const;

/** Every lot, the first to expire first. */
export function LotList({ places }: { readonly places: readonly Place[] }) {
  return (
    <ListTable<LotRow>
      endpoint={lotEndpoints.list}
      label="Lots"
      searchLabel="Substance, formula, CAS, lot"
      empty={
        <EmptyState title="No lot like this">
          A lot comes here when an order is received, or when it is put on the shelf by hand.
        </EmptyState>
      }
      filters={(state, change) => (
        <>
          <ChoiceFilter label="Lots" field="show" choices={SHOWN} state={state} change={change} />
          <ChoiceFilter
            label="Place"
            field="placeId"
            choices={places.map(({ id, name, roomName }) => [id, `${name}, ${roomName}`] as const)}
            anyWords="anywhere"
            state={state}
            change={change}
          />
        </>
      )}
      columns={[
        {
          id: 'substance',
          header: 'Substance',
          sortKey: 'substance',
          cell: ({ id, substanceName, formula }) => (
            <Link href={`/shelves/lots/${id}` as Route} className="font-semibold">
              {substanceName}{' '}
              {formula && (
                <span className="font-normal text-soft">
                  <Formula id={formula} />
                </span>
              )}
            </Link>
          ),
        },
        {
          id: 'code',
          header: 'Lot',
          sortKey: 'code',
          cell: ({ code, lotNumber }) => (
            <span className="font-mono">
              {code} <span className="text-soft">{lotNumber}</span>
            </span>
          ),
        },
        {
          id: 'balance',
          header: 'Left',
          sortKey: 'balance',
          isNumeric: true,
          cell: ({ balance, unit }) => <Amount value={balance} unit={unit} significant={4} />,
        },
        {
          id: 'assay',
          header: 'Assay',
          isNumeric: true,
          cell: ({ assayPercent }) => (assayPercent === null ? '–' : `${assayPercent} %`),
        },
        { id: 'place', header: 'Place', cell: ({ placeName }) => placeName },
        {
          id: 'expires',
          header: 'Expires',
          sortKey: 'expiresOn',
          cell: ({ expiresOn }) => (expiresOn ? <Moment at={expiresOn} style="short-day" /> : 'does not'),
        },
        {
          id: 'state',
          header: 'State',
          cell: ({ isHeld, isExpired, openedOn }) =>
            isHeld ? (
              <StateMark state="held" words="on hold" />
            ) : isExpired ? (
              <StateMark state="refused" words="past its date" />
            ) : openedOn ? (
              'opened'
            ) : (
              'closed'
            ),
        },
      ]}
    />
  );
}
