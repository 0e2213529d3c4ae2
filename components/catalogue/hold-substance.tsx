'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi } from '@/lib/client/api';
import { substanceEndpoints } from '@/lib/schemas/substances';
import type { SubstanceDetail } from '@/lib/schemas/substances';
import { Button } from '../ui/button';
import { TextInput } from '../ui/inputs';

/** Stops use of a substance at once, everywhere; or lifts that. */
export function HoldSubstance({ substance }: { readonly substance: SubstanceDetail }) {
  const router = useRouter();
  const [reason, setReason] = useState('');
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setError(undefined);
    try {
      await callApi(substanceEndpoints.hold, {
        params: { id: substance.id },
        body: { isHeld: !substance.isHeld, reason, version: substance.version },
      });
      toast(substance.isHeld ? 'The hold is lifted' : 'Use is stopped');
      setReason('');
      router.refresh();
    } catch (problem) {
      if (!(problem instanceof ApiProblem)) throw problem;
      setError(problem.errors[0]?.detail ?? problem.message);
    } finally {
      setBusy(false);
    }
  };
  return (
    <form onSubmit={(event) => void save(event)} className="grid gap-3">
      <TextInput
        id="hold-reason"
        label="Reason"
        value={reason}
        onChange={(event) => setReason(event.target.value)}
        error={error}
      />
      <p>
        <Button type="submit" look={substance.isHeld ? 'quiet' : 'danger'} isBusy={isBusy}>
          {substance.isHeld ? 'Lift the hold' : 'Hold it now'}
        </Button>
      </p>
    </form>
  );
}
