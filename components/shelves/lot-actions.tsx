'use client';

import { useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { lotKeys } from '@/lib/client/lots';
import { lotEndpoints, movementEndpoints } from '@/lib/schemas/lots';
import type { Lot } from '@/lib/schemas/lots';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { NumberInput, Select, TextArea } from '../ui/inputs';
import { ReasonDialog } from '../ui/reason-dialog';

type Kind = 'counted' | 'discarded' | 'put-back';

const KINDS: readonly (readonly [kind: Kind, words: string, hint: string])[] = [
  ['counted', 'I counted what stands there', 'The difference to the ledger is written as a correction.'],
  ['discarded', 'Some of it was discarded', 'The amount that is gone.'],
  ['put-back', 'Some of it was put back', 'The amount that came back unused.'],
];

/** What can be done with a lot by hand. */
export function LotActions({
  lot,
  mayWrite,
  mayHold,
}: {
  readonly lot: Lot;
  readonly mayWrite: boolean;
  readonly mayHold: boolean;
}) {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const hold = (name: 'hold' | 'lift') => async (reason: string) => {
    await callApi(lotEndpoints[name], { params: { id: lot.id }, body: { reason, version: lot.version } });
    router.refresh();
  };
  return (
    <>
      {mayWrite && <Button onClick={() => setOpen(true)}>Correct the stock</Button>}
      {mayHold && lot.heldReason === null && (
        <ReasonDialog
          label="Put on hold"
          look="danger"
          title={`Put lot ${lot.code} on hold`}
          description="Nothing may be taken from it, and nothing made from it may be bottled or handed over, until the hold is lifted."
          onConfirm={hold('hold')}
        />
      )}
      {mayHold && lot.heldReason !== null && (
        <ReasonDialog
          label="Lift the hold"
          title={`Lift the hold on lot ${lot.code}`}
          description="It and all that was made from it may be used again."
          onConfirm={hold('lift')}
        />
      )}
      <Dialog
        title={`Correct the stock of ${lot.code}`}
        description="The ledger is never edited; a new line says what changed and why."
        isOpen={isOpen}
        onOpenChange={setOpen}
      >
        <MovementForm lot={lot} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function MovementForm({ lot, onDone }: { readonly lot: Lot; readonly onDone: () => void }) {
  const router = useRouter();
  const client = useQueryClient();
  const [kind, setKind] = useState<Kind>('counted');
  const [amount, setAmount] = useState('');
  const [reason, setReason] = useState('');
  const [key, setKey] = useState(newIdempotencyKey);
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const errorOf = (field: string) => problem?.errors.find(({ pointer }) => pointer === `#/${field}`)?.detail;
  const hint = KINDS.find(([name]) => name === kind)?.[2];

  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    try {
      const line = await callApi(movementEndpoints.create, {
        body: { kind, lotId: lot.id, amount, reason },
        idempotencyKey: key,
      });
      toast(`${lot.code} now holds ${line.balanceAfter} ${line.unit}`);
      void client.invalidateQueries({ queryKey: lotKeys.ledger() });
      onDone();
      router.refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
      if (error.status !== 0) setKey(newIdempotencyKey());
    } finally {
      setBusy(false);
    }
  };

  return (
    <form onSubmit={(event) => void save(event)} noValidate className="grid gap-4">
      {problem && problem.errors.length === 0 && <Alert tone="stop" title={problem.message} />}
      <Select
        id="movement-what"
        label="What happened"
        value={kind}
        onChange={(event) => setKind(event.target.value as Kind)}
      >
        {KINDS.map(([name, words]) => (
          <option key={name} value={name}>
            {words}
          </option>
        ))}
      </Select>
      <NumberInput
        id="movement-amount"
        label="Amount"
        unit={lot.unit}
        hint={`${hint} The ledger says ${lot.balance} ${lot.unit}.`}
        value={amount}
        onChange={(event) => setAmount(event.target.value)}
        error={errorOf('amount')}
      />
      <TextArea
        id="movement-reason"
        label="Reason"
        value={reason}
        onChange={(event) => setReason(event.target.value)}
        error={errorOf('reason')}
      />
      <Button type="submit" look="primary" isBusy={isBusy} busyText="Writing …">
        Write the line
      </Button>
    </form>
  );
}
