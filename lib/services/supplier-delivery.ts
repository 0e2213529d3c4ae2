import 'server-only';
import type { JsonObject } from '@/lib/domain/json';
import { write } from '@/models/db';
import { OrderModel } from '@/models/order';
import { OrderLineModel } from '@/models/order-line';
import { changeState } from './moves';
import { PermanentFailure } from './outside/failure';
import { placeOrder } from './outside/supplier';
import type { Acknowledgement, OutgoingOrder } from './outside/supplier';
import { record } from './record';

interface OrderMessage {
  readonly orderId: string;
  readonly orderCode: string;
  readonly account: string;
  readonly lines: OutgoingOrder['lines'];
}

/**
 * Places one order and writes down the supplier's answer. Sent again after a lost answer, it is still one order.
 * @throws as `placeOrder` does; PermanentFailure also where the order was cancelled meanwhile
 */
export async function deliverOrder(payload: JsonObject, key: string): Promise<void> {
  const { orderId, orderCode, account, lines } = payload as unknown as OrderMessage;
  const { state } = await OrderModel.findByPk(orderId, { rejectOnEmpty: true });
  if (state === 'cancelled') throw new PermanentFailure('The order was cancelled.');
  const answer = await placeOrder({ order: orderCode, account, lines }, key).catch(async (error: unknown) => {
    if (error instanceof PermanentFailure) await recordRefusal(orderId, orderCode, error.message);
    throw error;
  });
  await write(async () => {
    const order = await OrderModel.findByPk(orderId, { rejectOnEmpty: true });
    for (const { line, status } of answer.lines)
      await OrderLineModel.update({ supplierStatus: status }, { where: { id: line, orderId } });
    order.supplierReference = answer.reference;
    const about = { label: order.code, reason: wordsOf(answer, lines) };
    if (order.state === 'sent') await changeState(null, 'order', order, 'acknowledged', about);
    else await order.save();
  });
}

async function recordRefusal(orderId: string, orderCode: string, reason: string): Promise<void> {
  await write(() =>
    record(null, {
      subjectType: 'order',
      subjectId: orderId,
      subjectLabel: orderCode,
      action: 'refused by the supplier',
      reason,
    }),
  );
}

/** The supplier's reference, and each line it does not take as ordered. */
function wordsOf(answer: Acknowledgement, ordered: OutgoingOrder['lines']): string {
  const money = (minor: number) => (minor / 100).toFixed(2);
  const odd = answer.lines.flatMap(({ line, status, priceMinor }) => {
    const before = ordered.find((one) => one.line === line);
    if (!before || status === 'accepted') return [];
    return status === 'price-changed'
      ? [`${before.stockNumber} now ${money(priceMinor)} instead of ${money(before.priceMinor)}`]
      : [`${before.stockNumber} back-ordered`];
  });
  return [`as ${answer.reference}`, ...odd].join('; ');
}
