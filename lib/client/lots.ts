import { queryOptions } from '@tanstack/react-query';
import { lotEndpoints, movementEndpoints } from '@/lib/schemas/lots';
import { callApi } from './api';

export const lotKeys = {
  lists: () => [lotEndpoints.list.path, 'list'] as const,
  detail: (id: string) => ['lots', 'detail', id] as const,
  ledger: () => [movementEndpoints.list.path, 'list'] as const,
};

/** A lot with what was made from it. */
export function lotQuery(id: string) {
  return queryOptions({
    queryKey: lotKeys.detail(id),
    queryFn: ({ signal }) => callApi(lotEndpoints.read, { params: { id }, signal }),
  });
}
