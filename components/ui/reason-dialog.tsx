'use client';

import { useState } from 'react';
import type { FormEvent } from 'react';
import { ApiProblem } from '@/lib/client/api';
import { Alert } from './alert';
import { Button } from './button';
import type { ButtonLook } from './button';
import { Dialog } from './dialog';
import { TextArea } from './inputs';

interface ReasonDialogProps {
  /** On the button that opens it and the one that does it. */
  readonly label: string;
  readonly title: string;
  readonly description: string;
  readonly look?: ButtonLook;
  /** Does it; what it throws is shown and the reason stays. */
  readonly onConfirm: (reason: string) => Promise<unknown>;
}

/** A button for something that needs a reason. */
export function ReasonDialog({ label, title, description, look = 'quiet', onConfirm }: ReasonDialogProps) {
  const [isOpen, setOpen] = useState(false);
  const [reason, setReason] = useState('');
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);

  const confirm = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    try {
      await onConfirm(reason.trim());
      setReason('');
      setOpen(false);
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
    } finally {
      setBusy(false);
    }
  };

  return (
    <>
      <Button look={look} onClick={() => setOpen(true)}>
        {label}
      </Button>
      <Dialog title={title} description={description} isOpen={isOpen} onOpenChange={setOpen}>
        <form onSubmit={(event) => void confirm(event)} noValidate className="grid gap-4">
          {problem && problem.errors.length === 0 && <Alert tone="stop" title={problem.message} />}
          <TextArea
            id="reason"
            label="Reason"
            value={reason}
            onChange={(event) => setReason(event.target.value)}
            error={problem?.errors[0]?.detail}
          />
          <Button
            type="submit"
            look={look === 'danger' ? 'danger' : 'primary'}
            isBusy={isBusy}
            busyText="Saving …"
          >
            {label}
          </Button>
        </form>
      </Dialog>
    </>
  );
}
