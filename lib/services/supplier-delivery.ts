import 'server-only';
import type { JsonObject } from '@/lib/domain/json';
import { write } from '@/models/db';
import { OrderModel } from '@/models/order';
import { OrderLineModel } from '@/models/order-line';
import { changeState } from './moves';
import { placeOrder } from './outside/supplier';
import type { OutgoingOrder } from './outside/supplier';

interface OrderMessage {
  readonly orderId: string;
  readonly orderCode: string;
  readonly account: string;
  readonly lines: OutgoingOrder['lines'];
}

/**
 * Places one order and writes down the supplier's answer. Sent again after a lost answer, it is still one order.
 * @throws as `placeOrder` does
 */
export async function deliverOrder(payload: JsonObject, key: string): Promise<void> {
  const { orderId, orderCode, account, lines } = payload as unknown as OrderMessage;
  const answer = await placeOrder({ order: orderCode, account, lines }, key);
  await write(async () => {
    const order = await OrderModel.findByPk(orderId, { rejectOnEmpty: true });
    for (const { line, status } of answer.lines)
      await OrderLineModel.update({ supplierStatus: status }, { where: { id: line, orderId } });
    order.supplierReference = answer.reference;
    if (order.state === 'sent') {
      const odd = answer.lines.filter(({ status }) => status !== 'accepted');
      await changeState(null, 'order', order, 'acknowledged', {
        label: order.code,
        reason:
          odd.length === 0
            ? `as ${answer.reference}`
            : `as ${answer.reference}; ${odd.map(({ status }) => status).join(', ')}`,
      });
    } else await order.save();
  });
}
