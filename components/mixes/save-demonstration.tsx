'use client';

import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { demonstrationEndpoints } from '@/lib/schemas/demonstrations';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { TextArea, TextInput } from '../ui/inputs';
import { Section } from '../ui/section';
import type { BenchPortion } from './portion';

/** Keeps what stands on the bench as a demonstration that requests can ask for. */
export function SaveDemonstration({
  portions,
  vesselMl,
}: {
  readonly portions: readonly BenchPortion[];
  readonly vesselMl: number;
}) {
  const [name, setName] = useState('');
  const [outcomeWanted, setOutcome] = useState('');
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [key, setKey] = useState(newIdempotencyKey);

  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    try {
      await callApi(demonstrationEndpoints.create, {
        body: {
          name,
          outcomeWanted: outcomeWanted || null,
          vesselMl,
          portions: portions.map(({ solutionId, volumeMl }) => ({ solutionId: solutionId ?? '', volumeMl })),
        },
        idempotencyKey: key,
      });
      toast(`“${name}” can be asked for in a request now`);
      setName('');
      setOutcome('');
      setKey(newIdempotencyKey());
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
    } finally {
      setBusy(false);
    }
  };

  return (
    <Section title="Keep it as a demonstration">
      <form onSubmit={(event) => void save(event)} noValidate className="grid gap-3">
        {problem && problem.errors.every(({ pointer }) => pointer !== '#/name') && (
          <Alert tone="stop" title={problem.errors[0]?.detail ?? problem.message} />
        )}
        <TextInput
          id="demonstration-name"
          label="Name"
          value={name}
          onChange={(event) => setName(event.target.value)}
          error={problem?.errors.find(({ pointer }) => pointer === '#/name')?.detail}
        />
        <TextArea
          id="demonstration-outcome"
          label="What should be seen"
          rows={2}
          value={outcomeWanted}
          onChange={(event) => setOutcome(event.target.value)}
        />
        <p>
          <Button type="submit" look="primary" isBusy={isBusy} busyText="Saving …">
            Save as demonstration
          </Button>
        </p>
      </form>
    </Section>
  );
}
