'use client';

import { useState } from 'react';
import type { FormEvent } from 'react';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { useBatchChange } from '@/lib/client/use-batch';
import { batchEndpoints } from '@/lib/schemas/batches';
import type { Batch } from '@/lib/schemas/batches';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { NumberInput, Select } from '../ui/inputs';

interface Row {
  readonly key: string;
  readonly volumeMl: string;
  readonly requestId: string;
}

/** One bottle for each request, and one for what is left over. */
function firstRows(batch: Batch): Row[] {
  const rows = batch.requests.map(({ id, volumeMl }) => ({
    key: id,
    volumeMl: String(volumeMl),
    requestId: id,
  }));
  const madeMl = batch.actual?.volumeMl ?? batch.sheet.makeVolumeMl;
  const left = madeMl - batch.requests.reduce((sum, { volumeMl }) => sum + volumeMl, 0);
  return left >= 1
    ? [...rows, { key: 'left', volumeMl: String(Number(left.toFixed(1))), requestId: '' }]
    : rows;
}

/** Divides a checked batch. */
export function BottleForm({ batch }: { readonly batch: Batch }) {
  const change = useBatchChange(batch.id);
  const [rows, setRows] = useState(() => firstRows(batch));
  const [key, setKey] = useState(newIdempotencyKey);
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const errorOf = (pointer: string) => problem?.errors.find((error) => error.pointer === pointer)?.detail;
  const update = (index: number, next: Partial<Row>) =>
    setRows(rows.map((row, at) => (at === index ? { ...row, ...next } : row)));
  const general = problem && (problem.errors.length === 0 ? problem.message : errorOf('#/bottles'));

  const fill = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    try {
      const bottles = rows.map(({ volumeMl, requestId }) => ({
        volumeMl,
        requestId: requestId === '' ? null : requestId,
      }));
      await change(() =>
        callApi(batchEndpoints.bottle, {
          params: { id: batch.id },
          body: { bottles, version: batch.version },
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
    <form onSubmit={(event) => void fill(event)} noValidate className="no-print grid gap-3">
      {general && <Alert tone="stop" title={general} />}
      <ol className="grid gap-3">
        {rows.map((row, index) => (
          <li key={row.key} className="flex flex-wrap items-end gap-3">
            <NumberInput
              id={`bottle-${index}`}
              label={`Bottle ${index + 1}`}
              unit="mL"
              value={row.volumeMl}
              onChange={(event) => update(index, { volumeMl: event.target.value })}
              error={errorOf(`#/bottles/${index}/volumeMl`)}
              className="w-44"
            />
            <Select
              id={`bottle-for-${index}`}
              label={`Bottle ${index + 1} is for`}
              value={row.requestId}
              onChange={(event) => update(index, { requestId: event.target.value })}
              error={errorOf(`#/bottles/${index}/requestId`)}
              className="min-w-56"
            >
              {batch.requests.map(({ id, code, session }) => (
                <option key={id} value={id}>
                  {code}, {session}
                </option>
              ))}
              <option value="">the shelf</option>
            </Select>
            {rows.length > 1 && (
              <Button look="plain" onClick={() => setRows(rows.filter((_row, at) => at !== index))}>
                Leave out bottle {index + 1}
              </Button>
            )}
          </li>
        ))}
      </ol>
      <div className="flex flex-wrap gap-3">
        <Button
          onClick={() =>
            setRows([
              ...rows,
              { key: newIdempotencyKey(), volumeMl: '', requestId: batch.requests[0]?.id ?? '' },
            ])
          }
        >
          Add a bottle
        </Button>
        <Button type="submit" look="primary" isBusy={isBusy} busyText="Saving …">
          Fill these bottles
        </Button>
      </div>
    </form>
  );
}
