'use client';

import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useCallback } from 'react';
import type { Batch } from '@/lib/schemas/batches';
import { ApiProblem } from './api';
import { batchKeys, batchQuery } from './batches';

/** The batch as the page brought it, then as the last answer left it. */
export function useBatch(initial: Batch): Batch {
  return useQuery({ ...batchQuery(initial.id), initialData: initial }).data;
}

/**
 * Keeps the answer of a change as the batch that is shown. Where somebody else was quicker, their batch is fetched
 * and the problem goes on to the caller, whose input stays.
 */
export function useBatchChange(id: string) {
  const client = useQueryClient();
  return useCallback(
    async (call: () => Promise<Batch>): Promise<Batch> => {
      try {
        const batch = await call();
        client.setQueryData(batchKeys.detail(id), batch);
        void client.invalidateQueries({ queryKey: batchKeys.lists() });
        return batch;
      } catch (error) {
        if (error instanceof ApiProblem && error.status === 409)
          void client.invalidateQueries({ queryKey: batchKeys.detail(id) });
        throw error;
      }
    },
    [client, id],
  );
}
