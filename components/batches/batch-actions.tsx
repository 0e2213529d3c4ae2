'use client';

import type { Route } from 'next';
import { useState } from 'react';
import { ApiProblem, callApi } from '@/lib/client/api';
import { useBatchChange } from '@/lib/client/use-batch';
import { batchEndpoints } from '@/lib/schemas/batches';
import type { Batch } from '@/lib/schemas/batches';
import { Alert } from '../ui/alert';
import { Button, LinkButton } from '../ui/button';
import { ReasonDialog } from '../ui/reason-dialog';
import { StateMark } from '../ui/state-mark';

interface BatchActionsProps {
  readonly batch: Batch;
  readonly mayWrite: boolean;
  readonly mayHold: boolean;
  readonly onStart: () => Promise<unknown>;
}

/** What can be done with the batch as a whole. */
export function BatchActions({ batch, mayWrite, mayHold, onStart }: BatchActionsProps) {
  const change = useBatchChange(batch.id);
  const [problem, setProblem] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const isOver = batch.state === 'discarded' || batch.state === 'spent';
  const call = (name: 'hold' | 'lift' | 'discard') => (reason: string) =>
    change(() =>
      callApi(batchEndpoints[name], { params: { id: batch.id }, body: { reason, version: batch.version } }),
    );

  const start = async () => {
    setBusy(true);
    setProblem(null);
    try {
      await onStart();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error.message);
    } finally {
      setBusy(false);
    }
  };

  return (
    <div className="no-print mb-4 grid gap-3">
      {problem && <Alert tone="stop" title={problem} />}
      <div className="flex flex-wrap items-center gap-2">
        <StateMark state={batch.state} />
        {mayWrite && batch.state === 'planned' && (
          <Button look="primary" isBusy={isBusy} busyText="Starting …" onClick={() => void start()}>
            Start making
          </Button>
        )}
        <Button onClick={() => window.print()}>Print this sheet</Button>
        {mayWrite && batch.bottles.length > 0 && (
          <LinkButton href={`/batches/${batch.id}/labels` as Route}>Labels</LinkButton>
        )}
        {mayHold && !isOver && batch.heldReason === null && (
          <ReasonDialog
            label="Put on hold"
            title={`Put ${batch.code} on hold`}
            description="Nothing of it may be entered, bottled or handed over until the hold is lifted."
            look="danger"
            onConfirm={call('hold')}
          />
        )}
        {mayHold && batch.heldReason !== null && (
          <ReasonDialog
            label="Lift the hold"
            title={`Lift the hold on ${batch.code}`}
            description="It may be used again. A hold on a lot is lifted on the lot's own page."
            onConfirm={call('lift')}
          />
        )}
        {mayWrite && !isOver && (
          <ReasonDialog
            label="Discard this batch"
            title={`Discard ${batch.code}`}
            description="Its bottles are discarded with it. What was taken from the shelves stays taken."
            look="danger"
            onConfirm={call('discard')}
          />
        )}
      </div>
    </div>
  );
}
