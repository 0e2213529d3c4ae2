'use client';

import { useQuery } from '@tanstack/react-query';
import { callApi } from '@/lib/client/api';
import { recordEndpoints } from '@/lib/schemas/records';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';

/** Reads the whole chain when asked and says whether it holds. */
export function ChainState() {
  const { data, error, isFetching, refetch } = useQuery({
    queryKey: ['record-check'],
    queryFn: ({ signal }) => callApi(recordEndpoints.check, { signal }),
    enabled: false,
  });
  return (
    <div className="mb-6 flex flex-wrap items-center gap-4">
      <Button isBusy={isFetching} busyText="Checking every line …" onClick={() => void refetch()}>
        Check the chain
      </Button>
      {error && <Alert tone="stop" title={error.message} />}
      {data?.firstBrokenLine === null && <Alert tone="done" title={`All ${data.lines} lines fit`} />}
      {typeof data?.firstBrokenLine === 'number' && (
        <Alert
          tone="stop"
          title={`Line ${data.firstBrokenLine} does not fit the chain: it or one before it was altered`}
        />
      )}
    </div>
  );
}
