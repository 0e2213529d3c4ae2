import 'server-only';
import { environment } from '@/lib/config/env';
import { DomainError } from '@/lib/domain/errors';
import { authorise } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type { OrderDetail, OrderMove, OrderRefuse } from '@/lib/schemas/orders';
import { write } from '@/models/db';
import { OrderLineModel } from '@/models/order-line';
import { OfferModel } from '@/models/offer';
import { SubstanceModel } from '@/models/substance';
import { SupplierModel } from '@/models/supplier';
import { rowsById } from './lookup';
import { changeState, refuseStale } from './moves';
import { loadOrder, packSizeOf, presentOrder, whyNotApprove } from './order-rows';
import { releaseShortages } from './orders';
import { enqueue, enqueueLetter } from './outbox';

/** Another person than the drafter approves, within their limit. */
export async function approveOrder(
  viewer: Viewer,
  id: string,
  { version, reason }: OrderMove,
): Promise<OrderDetail> {
  return write(async () => {
    const order = await loadOrder(id);
    authorise(
      viewer,
      'order:approve',
      { ownerId: order.draftedById, totalMinor: order.totalMinor },
      whyNotApprove(viewer, order) ?? undefined,
    );
    if (order.version !== version) refuseStale(order, version, await presentOrder(viewer, order));
    order.approvedById = viewer.id;
    await changeState(viewer, 'order', order, 'approved', {
      label: order.code,
      reason: reason || null,
      detail: { totalMinor: order.totalMinor, limitMinor: viewer.approvalLimitMinor },
    });
    return presentOrder(viewer, order);
  });
}

export async function refuseOrder(
  viewer: Viewer,
  id: string,
  { version, reason }: OrderRefuse,
): Promise<OrderDetail> {
  return write(async () => {
    const order = await loadOrder(id);
    authorise(
      viewer,
      'order:refuse',
      { ownerId: order.draftedById },
      'You drafted it; another person must judge it.',
    );
    if (order.version !== version) refuseStale(order, version, await presentOrder(viewer, order));
    await changeState(viewer, 'order', order, 'refused', { label: order.code, reason });
    await releaseShortages(order.id);
    return presentOrder(viewer, order);
  });
}

/**
 * Hands an approved order to the outbox, for the supplier's ordering service and for its mailbox. It is on its
 * way however the service does just now.
 */
export async function sendOrder(viewer: Viewer, id: string, { version }: OrderMove): Promise<OrderDetail> {
  return write(async () => {
    const order = await loadOrder(id);
    authorise(
      viewer,
      'order:send',
      { ownerId: order.draftedById },
      'You drafted it; another person must send it.',
    );
    if (order.version !== version) refuseStale(order, version, await presentOrder(viewer, order));
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
