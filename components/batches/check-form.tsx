'use client';

import { useState } from 'react';
import type { FormEvent } from 'react';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { useBatchChange } from '@/lib/client/use-batch';
import { batchEndpoints } from '@/lib/schemas/batches';
import type { Batch } from '@/lib/schemas/batches';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { NumberInput, TextInput } from '../ui/inputs';

/** Closes the making: what is open is said before the button is pressed. */
export function CheckForm({ batch }: { readonly batch: Batch }) {
  const change = useBatchChange(batch.id);
  const [volumeMl, setVolumeMl] = useState(String(batch.sheet.makeVolumeMl));
  const [note, setNote] = useState('');
  const [key, setKey] = useState(newIdempotencyKey);
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const errorOf = (field: string) => problem?.errors.find(({ pointer }) => pointer === `#/${field}`)?.detail;

  const check = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    try {
      await change(() =>
        callApi(batchEndpoints.check, {
          params: { id: batch.id },
          body: { volumeMl, note, version: batch.version },
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

  return (
    <form onSubmit={(event) => void check(event)} noValidate className="no-print grid gap-4">
      {batch.missing.length > 0 && (
        <Alert tone="info" title="Before it can be checked">
          <ul className="list-disc pl-5">
            {batch.missing.map((line) => (
              <li key={line}>{line}</li>
            ))}
          </ul>
        </Alert>
      )}
      {problem && problem.errors.length === 0 && <Alert tone="stop" title={problem.message} />}
      <div className="flex flex-wrap items-start gap-4">
        <NumberInput
          id="volume-made"
          label="Volume made"
          unit="mL"
          value={volumeMl}
          onChange={(event) => setVolumeMl(event.target.value)}
          error={errorOf('volumeMl')}
          className="w-44"
        />
        <TextInput
          id="check-note"
          label="Remark (may stay empty)"
          value={note}
          onChange={(event) => setNote(event.target.value)}
          error={errorOf('note')}
          className="min-w-64 flex-1"
        />
      </div>
      <div>
        <Button
          type="submit"
          look="primary"
          disabled={batch.missing.length > 0}
          isBusy={isBusy}
          busyText="Checking …"
        >
          Mark as checked
        </Button>
      </div>
    </form>
  );
}
