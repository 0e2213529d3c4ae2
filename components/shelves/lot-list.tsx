'use client';

import Link from 'next/link';
import type { Route } from 'next';
import { lotEndpoints } from '@/lib/schemas/lots';
import type { LotRow } from '@/lib/schemas/lots';
import type { Place } from '@/lib/schemas/places';
import { Formula } from '../chemistry/formula';
import { Amount } from '../ui/amount';
import { EmptyState } from '../ui/empty-state';
import { Select } from '../ui/inputs';
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
          <Select
            id="lot-show"
            label="Lots"
            value={state.show ?? 'in-stock'}
            onChange={(event) => change({ show: event.target.value })}
            className="w-56"
          >
            {SHOWN.map(([value, words]) => (
              <option key={value} value={value}>
                {words}
              </option>
            ))}
          </Select>
          <Select
            id="lot-place"
            label="Place"
            value={state.placeId ?? ''}
            onChange={(event) => change({ placeId: event.target.value })}
            className="w-56"
          >
            <option value="">anywhere</option>
            {places.map(({ id, name, roomName }) => (
              <option key={id} value={id}>
                {name}, {roomName}
              </option>
            ))}
          </Select>
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
