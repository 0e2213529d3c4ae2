'use client';

import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { batchKeys } from '@/lib/client/batches';
import type { Batch } from '@/lib/schemas/batches';
import { bottleEndpoints } from '@/lib/schemas/bottles';
import type { Bottle } from '@/lib/schemas/bottles';
import { Alert } from '../ui/alert';
import { Amount } from '../ui/amount';
import { Button } from '../ui/button';
import { ReasonDialog } from '../ui/reason-dialog';
import { StateMark } from '../ui/state-mark';

/** The bottles of a batch, and handing them over request by request. */
export function BottleTable({ batch, mayWrite }: { readonly batch: Batch; readonly mayWrite: boolean }) {
  const requests = batch.requests.filter(({ id }) =>
    batch.bottles.some((bottle) => bottle.requestId === id && isHere(bottle)),
  );
  return (
    <div className="grid gap-4">
      <table className="w-full border-collapse max-md:block" aria-label="Bottles">
        <thead className="max-md:sr-only">
          <tr className="border-b-2 border-line text-left text-sm">
            <th scope="col" className="py-1 pr-4">
              Bottle
            </th>
            <th scope="col" className="py-1 pr-4">
              Holds
            </th>
            <th scope="col" className="py-1 pr-4">
              For
            </th>
            <th scope="col" className="py-1 pr-4">
              State
            </th>
            {mayWrite && (
              <th scope="col" className="no-print py-1">
                What next
              </th>
            )}
          </tr>
        </thead>
        <tbody className="max-md:block">
          {batch.bottles.map((bottle) => (
            <tr
              key={bottle.id}
              className="border-b align-middle max-md:flex max-md:flex-wrap max-md:items-center max-md:gap-x-2 max-md:py-1"
            >
              <th scope="row" className="py-2 pr-4 text-left font-mono">
                {bottle.code}
              </th>
              <td className="py-2 pr-4">
                <Amount value={bottle.volumeMl} unit="mL" />
              </td>
              <td className="py-2 pr-4">{bottle.requestCode ?? 'the shelf'}</td>
              <td className="py-2 pr-4">
                <StateMark state={bottle.state} />
                {bottle.isRevoked && <span className="block text-sm text-soft">address revoked</span>}
              </td>
              {mayWrite && (
                <td className="no-print py-1">
                  <BottleActions bottle={bottle} />
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
      {mayWrite &&
        requests.map(({ id, code, session }) => (
          <HandOver
            key={id}
            batchId={batch.id}
            requestId={id}
            code={code}
            session={session}
            bottles={batch.bottles.filter((bottle) => bottle.requestId === id && isHere(bottle))}
          />
        ))}
    </div>
  );
}

const isHere = ({ state }: Bottle) => state === 'filled' || state === 'returned';

function useRefresh(batchId: string) {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: batchKeys.detail(batchId) });
}

function BottleActions({ bottle }: { readonly bottle: Bottle }) {
  const refresh = useRefresh(bottle.batchId);
  const change = (state: 'returned' | 'discarded') => async (reason: string) => {
    await callApi(bottleEndpoints.change, {
      params: { id: bottle.id },
      body: { state, reason, version: bottle.version },
    });
    await refresh();
  };
  const revoke = async (reason: string) => {
    await callApi(bottleEndpoints.revoke, {
      params: { id: bottle.id },
      body: { reason, version: bottle.version },
    });
    await refresh();
  };
  return (
    <div className="flex flex-wrap gap-1">
      {bottle.state === 'handed-over' && (
        <ReasonDialog
          label="Take back"
          title={`Take back ${bottle.code}`}
          description="It stands in the prep room again and may be handed over once more."
          onConfirm={change('returned')}
        />
      )}
      {bottle.state !== 'discarded' && (
        <ReasonDialog
          label="Discard"
          look="danger"
          title={`Discard ${bottle.code}`}
          description="What was in it is gone. A request that relied on it goes back into work."
          onConfirm={change('discarded')}
        />
      )}
      {!bottle.isRevoked && (
        <ReasonDialog
          label="Revoke address"
          look="plain"
          title={`Revoke the address of ${bottle.code}`}
          description="Scanning the label says from then on only that it is no longer valid. This can't be undone."
          onConfirm={revoke}
        />
      )}
    </div>
  );
}

interface HandOverProps {
  readonly batchId: string;
  readonly requestId: string;
  readonly code: string;
  readonly session: string;
  readonly bottles: readonly Bottle[];
}

function HandOver({ batchId, requestId, code, session, bottles }: HandOverProps) {
  const refresh = useRefresh(batchId);
  const [key, setKey] = useState(newIdempotencyKey);
  const [problem, setProblem] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const handOver = async () => {
    setBusy(true);
    setProblem(null);
    try {
      const body = { requestId, bottleIds: bottles.map(({ id }) => id) };
      const { requestState } = await callApi(bottleEndpoints.handOver, { body, idempotencyKey: key });
      toast(
        requestState === 'handed-over'
          ? `${code} is handed over`
          : 'Handed over; other bottles of this request are still here',
      );
      await refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error.message);
      if (error.status !== 0) setKey(newIdempotencyKey());
    } finally {
      setBusy(false);
    }
  };
  return (
    <div className="no-print grid gap-2">
      {problem && <Alert tone="stop" title={problem} />}
      <p className="flex flex-wrap items-center gap-3">
        <Button look="primary" isBusy={isBusy} busyText="Handing over …" onClick={() => void handOver()}>
          Hand over to {code}
        </Button>
        <span className="text-soft">
          {bottles.map(({ code: bottleCode }) => bottleCode).join(', ')} for {session}
        </span>
      </p>
    </div>
  );
}
