'use client';

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import type { Route } from 'next';
import { useCallback } from 'react';
import type { Endpoint } from '@/lib/schemas/endpoint';
import type { Page } from '@/lib/schemas/list';
import { addressOf, callApi } from './api';
import type { CallInput } from './api';

export type ListState = Readonly<Record<string, string>>;

/** Page, sort, search and filters of a list, kept in the address so that a view can be shared and gone back to. */
export function useListState(): [ListState, (change: ListState) => void] {
  const params = useSearchParams();
  const pathname = usePathname();
  const router = useRouter();
  const state: ListState = Object.fromEntries(params.entries());
  const change = useCallback(
    (next: ListState) => {
      const merged = new URLSearchParams(params);
      for (const [key, value] of Object.entries({ page: '', ...next })) {
        if (value === '') merged.delete(key);
        else merged.set(key, value);
      }
      router.replace(`${pathname}${merged.size > 0 ? `?${merged.toString()}` : ''}` as Route, {
        scroll: false,
      });
    },
    [params, pathname, router],
  );
  return [state, change];
}

/** One page of a list; the last one stays in view while the next is fetched. */
export function useList<Row>(endpoint: Endpoint, state: ListState) {
  return useQuery({
    queryKey: [endpoint.path, 'list', state],
    queryFn: ({ signal }) =>
      callApi(endpoint, {
        query: state,
        signal,
      } as unknown as CallInput<Endpoint>) as Promise<unknown> as Promise<Page<Row>>,
    placeholderData: keepPreviousData,
  });
}

/** Where the whole list, as filtered, is downloaded as a spreadsheet. */
export function exportAddress(endpoint: Endpoint, state: ListState): string {
  return addressOf(endpoint.path, undefined, { ...state, page: undefined, format: 'xlsx' });
}
