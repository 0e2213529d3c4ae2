import 'server-only';
import { DomainError } from '@/lib/domain/errors';
import { authorise } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type { OrderDetail, OrderMove } from '@/lib/schemas/orders';
import { write } from '@/models/db';
import { OrderModel } from '@/models/order';
import { PaymentModel } from '@/models/payment';
import { WebhookEventModel } from '@/models/webhook-event';
import { refuseStale } from './moves';
import { loadOrder, presentOrder, whyNotApprove } from './order-rows';
import { payNow, readPaymentEvent } from './outside/payments';
import type { PaymentOutcome } from './outside/payments';
import { record } from './record';

const PAYABLE = ['approved', 'sent', 'acknowledged', 'part-received', 'received'];

/**
 * Pays an order once. The payment's own id is its key with the service, and stays while its outcome is unknown: a
 * second try asks for the same payment.
 */
export async function payOrder(viewer: Viewer, id: string, { version }: OrderMove): Promise<OrderDetail> {
  const payment = await write(async () => {
    const order = await loadOrder(id);
    authorise(
      viewer,
      'order:pay',
      { ownerId: order.draftedById, totalMinor: order.totalMinor },
      whyNotApprove(viewer, order) ?? undefined,
    );
    if (order.paidAt) throw new DomainError('wrong-state', 'It is paid already.');
    await refuseStale(order, version, () => presentOrder(viewer, order));
    if (!PAYABLE.includes(order.state))
      throw new DomainError('wrong-state', 'Only an approved order can be paid.');
    const pending = await PaymentModel.findOne({ where: { orderId: order.id, state: 'requested' } });
    return (
      pending ??
      PaymentModel.create({
        orderId: order.id,
        amountMinor: order.totalMinor,
        currency: order.currency,
        state: 'requested',
        requestedById: viewer.id,
      })
    );
  });
  const order = await loadOrder(id);
  const outcome = await payNow({
    amountMinor: payment.amountMinor,
    currency: payment.currency,
    description: `Order ${order.code}`,
    paymentId: payment.id,
  });
  await settle(viewer, payment.id, outcome);
  return presentOrder(viewer, await loadOrder(id));
}

/** Writes an outcome down once, whichever way it comes first: as the answer or as an event. */
async function settle(actor: Viewer | null, paymentId: string, outcome: PaymentOutcome): Promise<void> {
  await write(async () => {
    const payment = await PaymentModel.findByPk(paymentId);
    if (!payment || payment.state === 'succeeded' || payment.state === outcome.status) return;
    const failure = outcome.status === 'failed' ? outcome.failure : null;
    await payment.update({
      state: outcome.status,
      intentReference: outcome.reference ?? payment.intentReference,
      failure,
      version: payment.version + 1,
    });
    const order = await OrderModel.findByPk(payment.orderId, { rejectOnEmpty: true });
    if (outcome.status === 'succeeded')
      await order.update({ paidAt: order.paidAt ?? new Date(), version: order.version + 1 });
    await record(actor, {
      subjectType: 'order',
      subjectId: order.id,
      subjectLabel: order.code,
      action: outcome.status === 'succeeded' ? 'paid' : 'payment failed',
      reason: failure,
      detail: { paymentId, amountMinor: payment.amountMinor, reference: outcome.reference },
    });
  });
}

/** Takes in an event; one that comes again changes nothing. */
export async function receivePaymentEvent(payload: string, signature: string): Promise<void> {
  const event = await readPaymentEvent(payload, signature);
  if (event.type !== 'payment_intent.succeeded' && event.type !== 'payment_intent.payment_failed') return;
  const intent = event.data.object;
  const paymentId = intent.metadata.payment;
  await write(async () => {
    const [, isNew] = await WebhookEventModel.findOrCreate({
      where: { id: event.id },
      defaults: { id: event.id, kind: event.type },
    });
    if (!isNew || !paymentId) return;
    await settle(
      null,
      paymentId,
      event.type === 'payment_intent.succeeded'
        ? { status: 'succeeded', reference: intent.id }
        : { status: 'failed', reference: intent.id, failure: 'The payment was declined.' },
    );
  });
}
