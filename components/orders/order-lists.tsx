'use client';

import Link from 'next/link';
import { formatMoney, formatNumber } from '@/lib/client/format';
import { ORDER_STATES, stateChoices, stateWords } from '@/lib/domain/states';
import { orderEndpoints } from '@/lib/schemas/orders';
import type { OrderRow } from '@/lib/schemas/orders';
import { shortageEndpoints } from '@/lib/schemas/shortages';
import type { ShortageRow } from '@/lib/schemas/shortages';
import { LinkButton } from '../ui/button';
import { ChoiceFilter } from '../ui/choice-filter';
import { EmptyState } from '../ui/empty-state';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';
import { StateMark } from '../ui/state-mark';

export function OrderList() {
  return (
    <ListTable<OrderRow>
      endpoint={orderEndpoints.list}
      label="Orders"
      searchLabel="Order code"
      empty={
        <EmptyState
          title="No orders yet"
          action={<LinkButton href="/orders/shortages">Look at what is short</LinkButton>}
        >
          An order begins with a shortage: what planned use needs and the shelves lack.
        </EmptyState>
      }
      filters={(state, change) => (
        <ChoiceFilter
          label="State"
          field="state"
          choices={stateChoices(ORDER_STATES)}
          anyWords="any"
          state={state}
          change={change}
        />
      )}
      columns={[
        {
          id: 'code',
          header: 'Order',
          sortKey: 'code',
          cell: ({ id, code }) => (
            <Link href={`/orders/${id}`} className="font-mono font-bold">
              {code}
            </Link>
          ),
        },
        { id: 'supplier', header: 'Supplier', cell: ({ supplierName }) => supplierName },
        {
          id: 'state',
          header: 'State',
          sortKey: 'state',
          cell: ({ state, isPaid }) => (
            <StateMark state={state} words={`${stateWords(state)}${isPaid ? ', paid' : ''}`} />
          ),
        },
        {
          id: 'total',
          header: 'Total',
          isNumeric: true,
          sortKey: 'totalMinor',
          cell: ({ totalMinor, currency }) => formatMoney(totalMinor, currency, 'en-GB'),
        },
        { id: 'by', header: 'Drafted by', cell: ({ draftedByName }) => draftedByName },
        {
          id: 'at',
          header: 'Drafted',
          sortKey: 'createdAt',
          cell: ({ createdAt }) => <Moment at={createdAt} />,
        },
      ]}
    />
  );
}

const STATE_WORDS: Readonly<Record<ShortageRow['state'], string>> = {
  open: 'not ordered',
  'on-order': 'on order',
  covered: 'covered',
};

export function ShortageList() {
  return (
    <ListTable<ShortageRow>
      endpoint={shortageEndpoints.list}
      label="Shortages"
      empty={
        <EmptyState title="Nothing is short">
          A shortage opens when a batch is planned and the shelves don’t hold enough for it.
        </EmptyState>
      }
      filters={(state, change) => (
        <ChoiceFilter
          label="State"
          field="state"
          choices={Object.entries(STATE_WORDS)}
          anyWords="any"
          state={state}
          change={change}
        />
      )}
      columns={[
        {
          id: 'substance',
          header: 'Substance',
          cell: ({ substanceId, substanceName }) => (
            <Link href={`/catalogue/substances/${substanceId}`}>{substanceName}</Link>
          ),
        },
        {
          id: 'amount',
          header: 'Short',
          isNumeric: true,
          cell: ({ amount, unit }) => `${formatNumber(amount)} ${unit}`,
        },
        {
          id: 'needed',
          header: 'Needed on',
          sortKey: 'neededOn',
          cell: ({ neededOn }) => <Moment at={neededOn} style="short-day" />,
        },
        {
          id: 'order-by',
          header: 'Order by',
          sortKey: 'orderBy',
          cell: ({ orderBy }) => <Moment at={orderBy} style="short-day" />,
        },
        {
          id: 'for',
          header: 'For',
          cell: ({ requestId, requestCode }) =>
            requestId ? <Link href={`/requests/${requestId}`}>{requestCode}</Link> : null,
        },
        {
          id: 'state',
          header: 'State',
          sortKey: 'state',
          cell: ({ state }) => <StateMark state={state} words={STATE_WORDS[state]} />,
        },
        {
          id: 'order',
          header: 'Order',
          cell: ({ orderId, orderCode }) =>
            orderId ? <Link href={`/orders/${orderId}`}>{orderCode}</Link> : null,
        },
      ]}
    />
  );
}
