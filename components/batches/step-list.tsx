'use client';

import { useState } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi } from '@/lib/client/api';
import { useBatchChange } from '@/lib/client/use-batch';
import { batchEndpoints } from '@/lib/schemas/batches';
import type { Batch } from '@/lib/schemas/batches';
import type { BatchStep } from '@/lib/schemas/batch-sheets';
import { classNames } from '../ui/class-names';

const KINDS: Readonly<Record<BatchStep['kind'], string>> = {
  protection: 'Protect yourself',
  condition: 'Conditions set by safety',
  work: 'Make it',
  check: 'Check it',
};

/** The ordered steps under their headings, each to be ticked. */
export function StepList({ batch, mayWrite }: { readonly batch: Batch; readonly mayWrite: boolean }) {
  const isEditable = mayWrite && batch.state === 'making';
  const groups = (Object.keys(KINDS) as BatchStep['kind'][])
    .map((kind) => ({ kind, steps: batch.steps.filter((step) => step.kind === kind) }))
    .filter(({ steps }) => steps.length > 0);
  return (
    <div className="space-y-5 print:space-y-2">
      {groups.map(({ kind, steps }) => (
        <section key={kind} aria-label={KINDS[kind]}>
          <h3
            className={classNames('mb-1 break-after-avoid text-base', kind === 'condition' && 'text-amber')}
          >
            {KINDS[kind]}
          </h3>
          <ol>
            {steps.map((step, index) => (
              <Step key={step.id} batch={batch} step={step} number={index + 1} isEditable={isEditable} />
            ))}
          </ol>
        </section>
      ))}
    </div>
  );
}

function Step({
  batch,
  step,
  number,
  isEditable,
}: {
  readonly batch: Batch;
  readonly step: BatchStep;
  readonly number: number;
  readonly isEditable: boolean;
}) {
  const change = useBatchChange(batch.id);
  const [isBusy, setBusy] = useState(false);
  const isDone = step.doneAt !== null;

  const tick = async (next: boolean) => {
    setBusy(true);
    try {
      await change(() =>
        callApi(batchEndpoints.tick, { params: { id: batch.id, stepId: step.id }, body: { isDone: next } }),
      );
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      toast.error(error.message);
    } finally {
      setBusy(false);
    }
  };

  return (
    <li className="flex break-inside-avoid items-start gap-3 border-b py-1 print:py-0">
      <span aria-hidden className="w-6 pt-2.5 text-right font-mono text-sm text-soft print:pt-1.5">
        {number}
      </span>
      <input
        id={`step-${step.id}`}
        type="checkbox"
        checked={isDone}
        disabled={!isEditable || isBusy}
        onChange={(event) => void tick(event.target.checked)}
        className="mt-2 size-7 shrink-0 accent-verdigris print:mt-1.5 print:size-4"
      />
      <label
        htmlFor={`step-${step.id}`}
        className={classNames('min-h-11 flex-1 py-2 print:min-h-0 print:py-1', isDone && 'text-soft')}
      >
        {step.text}
      </label>
      {step.doneBy && (
        <span className="hidden py-2 text-sm whitespace-nowrap text-soft sm:block">{step.doneBy}</span>
      )}
    </li>
  );
}
