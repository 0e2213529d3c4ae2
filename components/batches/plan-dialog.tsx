'use client';

import { useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import type { Route } from 'next';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { batchKeys } from '@/lib/client/batches';
import { formatVolume } from '@/lib/client/format';
import { batchEndpoints } from '@/lib/schemas/batches';
import type { Need } from '@/lib/schemas/needs';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { Checkbox, NumberInput, TextInput } from '../ui/inputs';

interface PlanDialogProps {
  readonly solutionName: string;
  readonly makeOn: string;
  readonly needs: readonly Need[];
}

/** Plans one batch for the chosen requests. */
export function PlanDialog({ solutionName, makeOn, needs }: PlanDialogProps) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button look="primary" onClick={() => setOpen(true)} aria-label={`Plan batch of ${solutionName}`}>
        Plan batch
      </Button>
      <Dialog
        title={`Plan ${solutionName}`}
        description="The sheet is worked out from what stands on the shelves now."
        isOpen={isOpen}
        onOpenChange={setOpen}
      >
        <PlanForm makeOn={makeOn} needs={needs} />
      </Dialog>
    </>
  );
}

function PlanForm({ makeOn, needs }: Omit<PlanDialogProps, 'solutionName'>) {
  const router = useRouter();
  const client = useQueryClient();
  const [chosen, setChosen] = useState<ReadonlySet<string>>(
    () => new Set(needs.map(({ requestId }) => requestId)),
  );
  const [day, setDay] = useState(makeOn);
  const [volumeMl, setVolumeMl] = useState('');
  const [key, setKey] = useState(newIdempotencyKey);
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const errorOf = (field: string) =>
    problem?.errors.find(({ pointer }) => pointer.startsWith(`#/${field}`))?.detail;
  const wanted = needs.filter(({ requestId }) => chosen.has(requestId));
  const openMl = wanted.reduce((sum, need) => sum + need.openMl, 0);

  const toggle = (requestId: string) => {
    const next = new Set(chosen);
    if (!next.delete(requestId)) next.add(requestId);
    setChosen(next);
  };

  const plan = async (event: FormEvent) => {
    event.preventDefault();
    const solutionId = needs[0]?.solutionId;
    if (!solutionId) return;
    setBusy(true);
    setProblem(null);
    try {
      const body = { solutionId, requestIds: [...chosen], volumeMl, makeOn: day };
      const batch = await callApi(batchEndpoints.create, { body, idempotencyKey: key });
      void client.invalidateQueries({ queryKey: batchKeys.lists() });
      router.push(`/batches/${batch.id}` as Route);
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
      if (error.status !== 0) setKey(newIdempotencyKey());
      setBusy(false);
    }
  };

  return (
    <form onSubmit={(event) => void plan(event)} noValidate className="grid gap-4">
      {problem && problem.errors.length === 0 && (
        <Alert tone="stop" title={problem.title}>
          {problem.message}
        </Alert>
      )}
      <fieldset>
        <legend className="mb-1 font-semibold">For</legend>
        {needs.map((need) => (
          <Checkbox
            key={need.requestId}
            id={`for-${need.requestId}`}
            label={`${need.requestCode}: ${formatVolume(need.openMl)}`}
            hint={need.session}
            checked={chosen.has(need.requestId)}
            onChange={() => toggle(need.requestId)}
          />
        ))}
        {errorOf('requestIds') && (
          <p role="alert" className="text-sm font-semibold text-signal">
            ▲ {errorOf('requestIds')}
          </p>
        )}
      </fieldset>
      <TextInput
        id="make-on"
        label="Make on"
        type="date"
        value={day}
        onChange={(event) => setDay(event.target.value)}
        error={errorOf('makeOn')}
        className="w-52"
      />
      <NumberInput
        id="plan-volume"
        label="Volume"
        unit="mL"
        hint={`Left blank: what these requests need, ${formatVolume(openMl)}.`}
        value={volumeMl}
        onChange={(event) => setVolumeMl(event.target.value)}
        error={errorOf('volumeMl')}
        className="w-64"
      />
      <div>
        <Button type="submit" look="primary" isBusy={isBusy} busyText="Working it out …">
          Plan this batch
        </Button>
      </div>
    </form>
  );
}
