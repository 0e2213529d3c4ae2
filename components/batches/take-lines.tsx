'use client';

import Link from 'next/link';
import type { Route } from 'next';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { useBatchChange } from '@/lib/client/use-batch';
import { batchEndpoints } from '@/lib/schemas/batches';
import type { Batch } from '@/lib/schemas/batches';
import type { BatchTake } from '@/lib/schemas/batch-sheets';
import { Formula } from '../chemistry/formula';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { classNames } from '../ui/class-names';
import { NumberInput, TextInput } from '../ui/inputs';

/** What to take, from which lot, how much, and the field for what was really taken. */
export function TakeLines({
  batch,
  mayWrite,
  maySeeStock,
}: {
  readonly batch: Batch;
  readonly mayWrite: boolean;
  readonly maySeeStock: boolean;
}) {
  return (
    <ol>
      {batch.takes.map((take) => (
        <li
          key={take.id}
          className="grid break-inside-avoid gap-x-6 gap-y-2 border-b border-line py-3 first:pt-0 md:grid-cols-[1.5rem_1.4fr_1fr_1.3fr] print:grid-cols-[1.5rem_1.4fr_1fr_1.3fr]"
        >
          <span className="font-mono text-soft max-md:sr-only print:not-sr-only">{take.position}</span>
          <TakeIdentity take={take} maySeeStock={maySeeStock} />
          <div>
            <p className="font-mono text-xl font-bold">{take.targetText}</p>
            <p className="font-mono text-sm text-soft">allowed {take.rangeText}</p>
            {take.measuredWith && <p className="text-sm">{take.measuredWith}</p>}
          </div>
          <TakeEntry key={take.version} batch={batch} take={take} mayWrite={mayWrite} />
        </li>
      ))}
    </ol>
  );
}

function TakeIdentity({ take, maySeeStock }: { readonly take: BatchTake; readonly maySeeStock: boolean }) {
  return (
    <div className="min-w-0">
      <p className="font-semibold">
        {take.name} <span className="font-normal">{take.formula && <Formula id={take.formula} />}</span>
      </p>
      <p>
        Lot{' '}
        {maySeeStock ? (
          <Link href={`/shelves/lots/${take.lotId}` as Route} className="font-mono">
            {take.lotCode}
          </Link>
        ) : (
          <span className="font-mono">{take.lotCode}</span>
        )}
        , {take.place}
      </p>
      <p className="text-sm text-soft">{take.note}</p>
      {take.lotHeldReason && <p className="font-semibold text-signal">▲ {take.lotHeldReason}</p>}
    </div>
  );
}

const VERDICTS = {
  within: { mark: '✓', words: 'within what is allowed', look: 'text-verdigris' },
  explain: { mark: '◆', words: 'outside what is allowed, explained', look: 'text-amber' },
  remake: { mark: '▲', words: 'far outside what is allowed', look: 'text-signal' },
} as const;

function TakeEntry({
  batch,
  take,
  mayWrite,
}: {
  readonly batch: Batch;
  readonly take: BatchTake;
  readonly mayWrite: boolean;
}) {
  const change = useBatchChange(batch.id);
  const [amount, setAmount] = useState(take.actual === null ? '' : String(take.actual));
  const [explanation, setExplanation] = useState(take.explanation ?? '');
  const [key, setKey] = useState(newIdempotencyKey);
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const errorOf = (field: string) => problem?.errors.find(({ pointer }) => pointer === `#/${field}`)?.detail;
  const isEditable = mayWrite && batch.state === 'making';
  const needsExplanation = errorOf('explanation') !== undefined || explanation !== '';

  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    try {
      const body = { amount, explanation, version: take.version };
      await change(() =>
        callApi(batchEndpoints.take, {
          params: { id: batch.id, takeId: take.id },
          body,
          idempotencyKey: key,
        }),
      );
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
      if (error.status !== 0) setKey(newIdempotencyKey());
    } finally {
      setBusy(false);
    }
  };

  const entered = take.verdict && (
    <p className={classNames('text-sm font-semibold', VERDICTS[take.verdict].look)}>
      {VERDICTS[take.verdict].mark} <span className="font-mono">{`${take.actual} ${take.unit}`}</span> taken,{' '}
      {VERDICTS[take.verdict].words}
      {take.enteredBy && (
        <span className="block font-normal text-soft">{`entered by ${take.enteredBy}`}</span>
      )}
      {take.explanation && <span className="block font-normal text-soft">“{take.explanation}”</span>}
    </p>
  );

  if (!isEditable) {
    return (
      <div>
        {entered || (
          <p className="text-soft print:hidden">
            {batch.state === 'planned' ? 'Entered when it is made' : 'Nothing entered'}
          </p>
        )}
        {take.actual === null && (
          <p className="mt-1 hidden border-b border-line pt-5 text-sm print:block">Taken, {take.unit}</p>
        )}
      </div>
    );
  }
  return (
    <form onSubmit={(event) => void save(event)} noValidate className="grid gap-2">
      <div className="flex items-end gap-2">
        <NumberInput
          id={`take-${take.id}`}
          label={`Taken, line ${take.position}`}
          unit={take.unit}
          value={amount}
          onChange={(event) => setAmount(event.target.value)}
          error={errorOf('amount')}
          className="w-44"
        />
        <Button
          type="submit"
          isBusy={isBusy}
          busyText="Saving …"
          className="no-print"
          aria-label={`Save line ${take.position}`}
        >
          Save
        </Button>
      </div>
      {needsExplanation && (
        <TextInput
          id={`why-${take.id}`}
          label={`Explanation, line ${take.position}`}
          value={explanation}
          onChange={(event) => setExplanation(event.target.value)}
          error={errorOf('explanation')}
        />
      )}
      {problem && problem.errors.length === 0 && <Alert tone="stop" title={problem.message} />}
      {entered}
    </form>
  );
}
