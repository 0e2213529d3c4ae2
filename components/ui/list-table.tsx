'use client';

import { createColumnHelper, tableFeatures, useTable } from '@tanstack/react-table';
import { useEffect, useId, useMemo, useRef, useState } from 'react';
import type { ReactNode } from 'react';
import { exportAddress, useList, useListState } from '@/lib/client/lists';
import type { Endpoint } from '@/lib/schemas/endpoint';
import { Alert } from './alert';
import { Button } from './button';
import { classNames } from './class-names';
import { TextInput } from './inputs';
import { Skeleton } from './skeleton';

export interface ListColumnView<Row> {
  readonly id: string;
  readonly header: string;
  readonly cell: (row: Row) => ReactNode;
  /** The name the server sorts by. */
  readonly sortKey?: string;
  readonly isNumeric?: boolean;
}

interface ListTableProps<Row> {
  readonly endpoint: Endpoint;
  /** What the list holds, for those who can't see it. */
  readonly label: string;
  readonly columns: readonly ListColumnView<Row>[];
  readonly searchLabel?: string;
  /** Filters; they read and change the same state. */
  readonly filters?: (
    state: Readonly<Record<string, string>>,
    change: (next: Readonly<Record<string, string>>) => void,
  ) => ReactNode;
  /** State that holds until the reader chooses otherwise. */
  readonly defaults?: Readonly<Record<string, string>>;
  readonly empty: ReactNode;
}

const features = tableFeatures({});
const SEARCH_DELAY_MS = 250;

/** A list that is searched, sorted, filtered and paged on the server. On a phone each row becomes a block. */
export function ListTable<Row extends { id: string | number }>({
  endpoint,
  label,
  columns,
  searchLabel,
  filters,
  defaults,
  empty,
}: ListTableProps<Row>) {
  const [chosen, change] = useListState();
  const state = useMemo(() => ({ ...defaults, ...chosen }), [defaults, chosen]);
  const { data, error, isPending, isFetching, refetch } = useList<Row>(endpoint, state);
  const rows = useMemo(() => data?.items ?? [], [data]);
  const tableColumns = useMemo(() => {
    const helper = createColumnHelper<typeof features, Row>();
    return helper.columns(
      columns.map(({ id, header, cell }) =>
        helper.display({ id, header, cell: ({ row }) => cell(row.original) }),
      ),
    );
  }, [columns]);
  const table = useTable({ features, columns: tableColumns, data: rows });
  const byId = new Map(columns.map((column) => [column.id, column]));
  const isNarrowed = Object.entries(chosen).some(
    ([key, value]) => key !== 'page' && key !== 'sort' && value !== '',
  );

  return (
    <div>
      <div className="no-print mb-3 flex flex-wrap items-end gap-3">
        {searchLabel && (
          <SearchBox
            label={searchLabel}
            value={state.search ?? ''}
            onSearch={(search) => change({ search })}
          />
        )}
        {filters?.(state, change)}
        {endpoint.columns && (
          <a
            href={exportAddress(endpoint, state)}
            className="ml-auto inline-flex min-h-11 items-center px-2"
            download
          >
            Save as spreadsheet
          </a>
        )}
      </div>
      {error && (
        <Alert tone="stop" title="The list could not be read">
          {error.message} <Button onClick={() => void refetch()}>Try again</Button>
        </Alert>
      )}
      {isPending && !error && <Skeleton lines={6} />}
      {data &&
        data.total === 0 &&
        (isNarrowed ? (
          <p className="py-6">Nothing matches. Search for less, or take a filter off.</p>
        ) : (
          empty
        ))}
      {data && data.total > 0 && (
        <table
          aria-label={label}
          aria-busy={isFetching}
          className={classNames('w-full border-collapse max-md:block', isFetching && 'opacity-70')}
        >
          <thead className="max-md:sr-only">
            {table.getHeaderGroups().map((group) => (
              <tr key={group.id} className="border-b-2 border-line text-left">
                {group.headers.map((header) => (
                  <HeaderCell
                    key={header.id}
                    column={byId.get(header.column.id)}
                    sort={state.sort}
                    onSort={(sort) => change({ sort })}
                  />
                ))}
              </tr>
            ))}
          </thead>
          <tbody className="max-md:block">
            {table.getRowModel().rows.map((row) => (
              <tr key={row.original.id} className="border-b hover:bg-raised max-md:block max-md:py-3">
                {row.getAllCells().map((cell) => {
                  const column = byId.get(cell.column.id);
                  return (
                    <td
                      key={cell.id}
                      className={classNames(
                        'py-2.5 pr-4 align-top max-md:flex max-md:gap-3 max-md:py-0.5',
                        column?.isNumeric && 'md:text-right md:font-mono',
                      )}
                    >
                      <span aria-hidden className="hidden w-28 shrink-0 text-sm text-soft max-md:block">
                        {column?.header}
                      </span>
                      <span className="min-w-0">
                        <table.FlexRender cell={cell} />
                      </span>
                    </td>
                  );
                })}
              </tr>
            ))}
          </tbody>
        </table>
      )}
      {data && data.total > 0 && (
        <Pager
          page={data.page}
          pageSize={data.pageSize}
          total={data.total}
          onPage={(page) => change({ page: String(page) })}
        />
      )}
    </div>
  );
}

function HeaderCell<Row>({
  column,
  sort,
  onSort,
}: {
  readonly column: ListColumnView<Row> | undefined;
  readonly sort: string | undefined;
  readonly onSort: (sort: string) => void;
}) {
  if (!column) return null;
  const { header, sortKey, isNumeric } = column;
  const direction =
    sortKey === undefined
      ? undefined
      : sort === sortKey
        ? 'ascending'
        : sort === `-${sortKey}`
          ? 'descending'
          : 'none';
  return (
    <th
      scope="col"
      aria-sort={direction}
      className={classNames('py-1 pr-4 text-sm font-semibold', isNumeric && 'text-right')}
    >
      {sortKey ? (
        <button
          type="button"
          className="inline-flex min-h-9 items-center gap-1 underline-offset-4 hover:underline"
          onClick={() => onSort(direction === 'ascending' ? `-${sortKey}` : sortKey)}
        >
          {header}
          <span aria-hidden>{direction === 'ascending' ? '↑' : direction === 'descending' ? '↓' : '↕'}</span>
        </button>
      ) : (
        header
      )}
    </th>
  );
}

/** Waits until typing rests before it asks the server. Whoever follows a link meanwhile is not called back. */
function SearchBox({
  label,
  value,
  onSearch,
}: {
  readonly label: string;
  readonly value: string;
  readonly onSearch: (text: string) => void;
}) {
  const id = useId();
  const [text, setText] = useState(value);
  const [asked, setAsked] = useState(value);
  const [seen, setSeen] = useState(value);
  // The address changed otherwise than by this box: with the Back button, say.
  if (value !== seen) {
    setSeen(value);
    if (value !== asked) {
      setAsked(value);
      setText(value);
    }
  }

  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const search = useRef(onSearch);
  useEffect(() => {
    search.current = onSearch;
  }, [onSearch]);
  useEffect(() => {
    const stop = (event: MouseEvent) => {
      const opensElsewhere = event.ctrlKey || event.metaKey || event.shiftKey;
      if (!opensElsewhere && event.target instanceof Element && event.target.closest('a[href]'))
        clearTimeout(timer.current);
    };
    document.addEventListener('click', stop, true);
    return () => {
      document.removeEventListener('click', stop, true);
      clearTimeout(timer.current);
    };
  }, []);

  const change = (typed: string) => {
    setText(typed);
    clearTimeout(timer.current);
    timer.current = setTimeout(() => {
      setAsked(typed);
      search.current(typed);
    }, SEARCH_DELAY_MS);
  };
  return (
    <TextInput
      id={id}
      label={label}
      type="search"
      value={text}
      onChange={(event) => change(event.target.value)}
      className="w-full sm:w-80"
    />
  );
}

function Pager({
  page,
  pageSize,
  total,
  onPage,
}: {
  readonly page: number;
  readonly pageSize: number;
  readonly total: number;
  readonly onPage: (page: number) => void;
}) {
  const last = Math.max(1, Math.ceil(total / pageSize));
  const from = (page - 1) * pageSize + 1;
  return (
    <nav
      aria-label="Pages"
      className="no-print mt-3 flex flex-wrap items-center justify-between gap-3 text-sm"
    >
      <span>
        {from} to {Math.min(page * pageSize, total)} of {total}
      </span>
      {last > 1 && (
        <span className="flex items-center gap-2">
          <Button disabled={page <= 1} onClick={() => onPage(page - 1)}>
            Previous page
          </Button>
          <span>
            Page {page} of {last}
          </span>
          <Button disabled={page >= last} onClick={() => onPage(page + 1)}>
            Next page
          </Button>
        </span>
      )}
    </nav>
  );
}
