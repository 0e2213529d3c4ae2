import { queryOptions } from '@tanstack/react-query';
import { batchEndpoints } from '@/lib/schemas/batches';
import { callApi } from './api';

export const batchKeys = {
  all: ['batches'] as const,
  lists: () => [batchEndpoints.list.path, 'list'] as const,
  detail: (id: string) => ['batches', 'detail', id] as const,
};

/** A batch with its sheet. */
export function batchQuery(id: string) {
  return queryOptions({
    queryKey: batchKeys.detail(id),
    queryFn: ({ signal }) => callApi(batchEndpoints.read, { params: { id }, signal }),
  });
}
