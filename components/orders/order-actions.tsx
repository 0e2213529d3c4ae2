'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useState } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { formatMoney } from '@/lib/client/format';
import { orderEndpoints } from '@/lib/schemas/orders';
import type { OrderDetail } from '@/lib/schemas/orders';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { TextArea } from '../ui/inputs';

type Verb = 'submit' | 'approve' | 'send' | 'pay' | 'cancel';

const DONE: Readonly<Record<Verb, string>> = {
  submit: 'It waits for approval',
  approve: 'Approved',
  send: 'On its way to the supplier',
  pay: 'Paid',
  cancel: 'Cancelled',
};
const LOOK_AGAIN_MS = 2000;

/** What can be done with an order now, and by whom. */
export function OrderActions({
  order,
  mayDraft,
  mayApprove,
}: {
  readonly order: OrderDetail;
  readonly mayDraft: boolean;
  readonly mayApprove: boolean;
}) {
  const router = useRouter();
  const [busy, setBusy] = useState<Verb | 'refuse' | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const [isRefusing, setRefusing] = useState(false);
  const [reason, setReason] = useState('');
  const isOnItsWay = order.state === 'sent';

  useEffect(() => {
    if (!isOnItsWay) return undefined;
    const timer = setInterval(() => router.refresh(), LOOK_AGAIN_MS);
    return () => clearInterval(timer);
  }, [isOnItsWay, router]);

  const act = async (verb: Verb | 'refuse') => {
    setBusy(verb);
    setFailure(null);
    try {
      const body = { version: order.version, reason };
      const after = await callApi(orderEndpoints[verb], {
        params: { id: order.id },
        body,
        idempotencyKey: newIdempotencyKey(),
      });
      toast(
        verb === 'refuse' ? 'Refused' : verb === 'pay' && !after.isPaid ? 'The payment failed' : DONE[verb],
      );
      setRefusing(false);
      router.refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setFailure(error.errors[0]?.detail ?? error.message);
      if (error.status === 409) router.refresh();
    } finally {
      setBusy(null);
    }
  };
  const button = (verb: Verb, words: string, look: 'primary' | 'quiet' | 'danger' = 'primary') => (
    <Button look={look} isBusy={busy === verb} disabled={busy !== null} onClick={() => void act(verb)}>
      {words}
    </Button>
  );
  const blocked = order.whyNotApprove;
  const isPayable =
    !order.isPaid && ['approved', 'sent', 'acknowledged', 'part-received', 'received'].includes(order.state);

  return (
    <div className="no-print mb-8">
      {failure && (
        <div className="mb-3">
          <Alert tone="stop" title={failure} />
        </div>
      )}
      {mayApprove && blocked && ['for-approval', 'approved'].includes(order.state) && (
        <div className="mb-3">
          <Alert tone="attention" title={blocked} />
        </div>
      )}
      <div className="flex flex-wrap gap-3">
        {mayDraft && order.mayChange && order.state === 'draft' && button('submit', 'Put up for approval')}
        {mayApprove && !blocked && order.state === 'for-approval' && (
          <>
            {button('approve', `Approve ${formatMoney(order.totalMinor, order.currency, 'en-GB')}`)}
            <Button look="danger" onClick={() => setRefusing(true)}>
              Refuse
            </Button>
          </>
        )}
        {mayApprove && !blocked && order.state === 'approved' && button('send', 'Send to the supplier')}
        {mayApprove &&
          !blocked &&
          isPayable &&
          button(
            'pay',
            `Pay ${formatMoney(order.totalMinor, order.currency, 'en-GB')}`,
            order.state === 'approved' ? 'quiet' : 'primary',
          )}
        {mayDraft &&
          !order.isPaid &&
          ['draft', 'for-approval', 'approved'].includes(order.state) &&
          button('cancel', 'Cancel the order', 'danger')}
      </div>
      <Dialog title={`Refuse ${order.code}`} isOpen={isRefusing} onOpenChange={setRefusing}>
        <div className="grid gap-4">
          <TextArea
            id="refuse-reason"
            label="Reason"
            value={reason}
            onChange={(event) => setReason(event.target.value)}
            error={isRefusing && failure ? failure : undefined}
          />
          <Button look="danger" isBusy={busy === 'refuse'} onClick={() => void act('refuse')}>
            Refuse the order
          </Button>
        </div>
      </Dialog>
    </div>
  );
}
