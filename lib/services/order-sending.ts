import 'server-only';
import { Op } from 'sequelize';
import { environment } from '@/lib/config/env';
import { DomainError } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import type { OrderDetail, OrderMove } from '@/lib/schemas/orders';
import { write } from '@/models/db';
import { OfferModel } from '@/models/offer';
import { OrderLineModel } from '@/models/order-line';
import { OutboxMessageModel } from '@/models/outbox-message';
import { PaymentModel } from '@/models/payment';
import { SubstanceModel } from '@/models/substance';
import { SupplierModel } from '@/models/supplier';
import { rowsById } from './lookup';
import { changeState } from './moves';
import { releaseShortages } from './order-lines';
import { orderToMove, packSizeOf, presentOrder } from './order-rows';
import { enqueue, enqueueLetter } from './outbox';

/**
 * Hands an approved order to the outbox, for the supplier's ordering service and for its mailbox. It is on its
 * way however the service does just now.
 */
export async function sendOrder(viewer: Viewer, id: string, { version }: OrderMove): Promise<OrderDetail> {
  return write(async () => {
    const order = await orderToMove(viewer, 'order:send', id, version);
    const supplier = await SupplierModel.findByPk(order.supplierId, { rejectOnEmpty: true });
    if (!supplier.active) throw new DomainError('wrong-state', `${supplier.name} is closed.`);
    const lines = await OrderLineModel.findAll({
      where: { orderId: order.id },
      order: [['position', 'ASC']],
    });
    const [offers, substances] = await Promise.all([
      rowsById(
        OfferModel,
        lines.map(({ offerId }) => offerId),
      ),
      rowsById(
        SubstanceModel,
        lines.map(({ substanceId }) => substanceId),
      ),
    ]);
    order.sentAt = new Date();
    await changeState(viewer, 'order', order, 'sent', { label: order.code });
    await enqueue({
      channel: 'supplier-order',
      dedupeKey: `order:${order.id}`,
      subjectType: 'order',
      subjectId: order.id,
      payload: {
        orderId: order.id,
        orderCode: order.code,
        account: supplier.accountCode,
        lines: lines.map((line) => ({
          line: line.id,
          stockNumber: offers.get(line.offerId)?.stockNumber ?? '',
          packs: line.packs,
          priceMinor: line.priceMinor,
        })),
      },
    });
    await enqueueLetter(
      `order-letter:${order.id}`,
      {
        to: supplier.email,
        subject: `Order ${order.code} for account ${supplier.accountCode}`,
        text: [
          `${supplier.name},`,
          '',
          `please deliver to the Larkmoor College prep room, account ${supplier.accountCode}:`,
          '',
          ...lines.map(
            (line) =>
              `${line.packs} × ${packSizeOf(line.packMicro, line.unit)} ${substances.get(line.substanceId)?.name ?? ''}, ${offers.get(line.offerId)?.stockNumber ?? ''}, ${(line.priceMinor / 100).toFixed(2)} ${order.currency} each`,
          ),
          '',
          `Goods ${(order.goodsMinor / 100).toFixed(2)}, carriage and surcharges ${(order.surchargeMinor / 100).toFixed(2)}, in all ${(order.totalMinor / 100).toFixed(2)} ${order.currency}.`,
          `The same order goes to your ordering service under ${order.code}; please deliver it once.`,
          '',
          environment().BASE_URL,
        ].join('\n'),
      },
      { type: 'order', id: order.id },
    );
    return presentOrder(viewer, order);
  });
}

/**
 * Cancels an order that is neither paid nor about to be. What was short is short again, what still waits to be sent
 * stays here, and a supplier that may have it is told.
 */
export async function cancelOrder(
  viewer: Viewer,
  id: string,
  { version, reason }: OrderMove,
): Promise<OrderDetail> {
  return write(async () => {
    const order = await orderToMove(viewer, 'order:cancel', id, version);
    const payment = await PaymentModel.findOne({
      where: { orderId: order.id, state: ['requested', 'succeeded'] },
    });
    if (payment)
      throw new DomainError(
        'wrong-state',
        payment.state === 'succeeded'
          ? 'It is paid; settle that with the supplier first.'
          : 'It is not known yet whether a payment went through. Pay again to find out, then settle it.',
      );
    await changeState(viewer, 'order', order, 'cancelled', { label: order.code, reason: reason || null });
    await releaseShortages(order.id);
    if (order.sentAt) await recall(order.id, order.code, order.supplierId, reason);
    return presentOrder(viewer, order);
  });
}

/** A try that is under way just now can't be called back, so the supplier is told in any case. */
async function recall(orderId: string, code: string, supplierId: string, reason: string): Promise<void> {
  const waiting = { subjectType: 'order', subjectId: orderId, state: { [Op.ne]: 'sent' as const } };
  await OutboxMessageModel.update(
    { state: 'dead', lastError: 'The order was cancelled.' },
    { where: { ...waiting, channel: 'supplier-order' } },
  );
  await OutboxMessageModel.destroy({ where: { ...waiting, channel: 'mail' } });
  const supplier = await SupplierModel.findByPk(supplierId, { rejectOnEmpty: true });
  await enqueueLetter(
    `order-cancelled:${orderId}`,
    {
      to: supplier.email,
      subject: `Cancelled: order ${code} for account ${supplier.accountCode}`,
      text: [
        `${supplier.name},`,
        '',
        `please do not deliver our order ${code}, by whichever way it reached you.`,
        ...(reason ? [reason] : []),
        '',
        environment().BASE_URL,
      ].join('\n'),
    },
    { type: 'order', id: orderId },
  );
}
