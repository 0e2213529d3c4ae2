'use client';

import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi } from '@/lib/client/api';
import { requestEndpoints } from '@/lib/schemas/requests';
import type { RequestDetail } from '@/lib/schemas/requests';
import { Alert } from '../ui/alert';
import { Button, LinkButton } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { TextArea } from '../ui/inputs';

const WITHDRAWABLE = ['draft', 'asked', 'in-review', 'agreed', 'returned', 'in-work', 'ready'];

/** What its owner can do with a request now. */
export function RequestActions({ request }: { readonly request: RequestDetail }) {
  const router = useRouter();
  const [isLeaving, setLeaving] = useState(false);
  const [reason, setReason] = useState('');
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  if (!request.mayChange) return null;

  const move = async (
    endpoint: typeof requestEndpoints.submit | typeof requestEndpoints.withdraw,
    said: string,
  ) => {
    setBusy(true);
    setFailure(null);
    try {
      const done = await callApi(endpoint, {
        params: { id: request.id },
        body: { version: request.version, reason },
      });
      toast(
        said.replace(
          '{state}',
          done.state === 'in-review' ? 'went to safety' : `is ${done.state.replaceAll('-', ' ')}`,
        ),
      );
      setLeaving(false);
      router.refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setFailure(error.message);
    } finally {
      setBusy(false);
    }
  };

  return (
    <div className="no-print mb-8 flex flex-wrap items-center gap-3">
      {failure && <Alert tone="stop" title={failure} />}
      {(request.state === 'draft' || request.state === 'returned') && (
        <Button
          look="primary"
          isBusy={busy}
          onClick={() => void move(requestEndpoints.submit, `${request.code} {state}`)}
        >
          {request.state === 'returned' ? 'Submit again' : 'Submit the request'}
        </Button>
      )}
      <LinkButton href={`/requests/${request.id}/edit` as Route}>Change it</LinkButton>
      {WITHDRAWABLE.includes(request.state) && (
        <Button look="danger" onClick={() => setLeaving(true)}>
          Withdraw
        </Button>
      )}
      <Dialog
        title={`Withdraw ${request.code}`}
        description="Nothing more is made for it. What was made already stays with the prep room."
        isOpen={isLeaving}
        onOpenChange={setLeaving}
      >
        <div className="grid gap-4">
          <TextArea
            id="withdraw-reason"
            label="Why (may stay empty)"
            value={reason}
            onChange={(event) => setReason(event.target.value)}
          />
          <Button
            look="danger"
            isBusy={busy}
            onClick={() => void move(requestEndpoints.withdraw, `${request.code} {state}`)}
          >
            Withdraw it
          </Button>
        </div>
      </Dialog>
    </div>
  );
}
