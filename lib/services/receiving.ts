import 'server-only';
import { formatISO } from 'date-fns';
import { DomainError, invalid } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import type { InvoiceInput, OrderDetail, ReceiptInput } from '@/lib/schemas/orders';
import { write } from '@/models/db';
import { InvoiceModel } from '@/models/invoice';
import { OrderLineModel } from '@/models/order-line';
import { PlaceModel } from '@/models/place';
import { ReceiptModel } from '@/models/receipt';
import { ShortageModel } from '@/models/shortage';
import { SubstanceModel } from '@/models/substance';
import { addLot } from './lots';
import { changeState, refuseStale } from './moves';
import { loadOrder, presentOrder } from './order-rows';
import { record } from './record';

const RECEIVABLE = ['sent', 'acknowledged', 'part-received'];

/** Takes packs in as a lot: the shelf, the ledger, the order and the shortage change together. */
export async function receivePacks(viewer: Viewer, id: string, input: ReceiptInput): Promise<OrderDetail> {
  return write(async () => {
    const order = await loadOrder(id);
    await refuseStale(order, input.version, () => presentOrder(viewer, order));
    if (!RECEIVABLE.includes(order.state))
      throw new DomainError(
        'wrong-state',
        `An order that is ${order.state.replaceAll('-', ' ')} receives nothing.`,
      );
    const line = await OrderLineModel.findOne({ where: { id: input.lineId, orderId: order.id } });
    const place = await PlaceModel.findByPk(input.placeId);
    const today = formatISO(new Date(), { representation: 'date' });
    const left = line ? line.packs - line.receivedPacks : 0;
    const errors = [
      ...(line ? [] : [{ pointer: '#/lineId', detail: 'There is no such line.' }]),
      ...(place ? [] : [{ pointer: '#/placeId', detail: 'There is no such place.' }]),
      ...(line && input.packs > left
        ? [
            {
              pointer: '#/packs',
              detail:
                left === 0 ? 'All packs of this line have come.' : `Only ${left} packs are still to come.`,
            },
          ]
        : []),
      ...(input.expiresOn !== null && input.expiresOn < today
        ? [{ pointer: '#/expiresOn', detail: 'It has expired already; send it back.' }]
        : []),
    ];
    if (!line || errors.length > 0) throw invalid(errors);

    const substance = await SubstanceModel.findByPk(line.substanceId, { rejectOnEmpty: true });
    const lot = await addLot(viewer, {
      substance,
      lotNumber: input.lotNumber,
      assayPercent: input.assayPercent,
      amountMicro: line.packMicro * input.packs,
      receivedOn: today,
      expiresOn: input.expiresOn,
      placeId: input.placeId,
      supplierId: order.supplierId,
      reason: `Received on order ${order.code}`,
    });
    await ReceiptModel.create({
      orderLineId: line.id,
      lotId: lot.id,
      packs: input.packs,
      receivedById: viewer.id,
    });
    await line.update({ receivedPacks: line.receivedPacks + input.packs });
    const lines = await OrderLineModel.findAll({ where: { orderId: order.id } });
    const isComplete = lines.every(({ packs, receivedPacks }) => receivedPacks >= packs);
    await changeState(viewer, 'order', order, isComplete ? 'received' : 'part-received', {
      label: order.code,
      reason: `${input.packs} packs of ${substance.name} as lot ${lot.code}`,
    });
    if (line.receivedPacks >= line.packs)
      await ShortageModel.update(
        { state: 'covered' },
        { where: { orderLineId: line.id, state: 'on-order' } },
      );
    return presentOrder(viewer, order);
  });
}

/** Enters the supplier's invoice and matches it with what was ordered; a received order that matches is closed when paid. */
export async function enterInvoice(
  viewer: Viewer,
  id: string,
  { number, amountMinor, version }: InvoiceInput,
): Promise<OrderDetail> {
  return write(async () => {
    const order = await loadOrder(id);
    await refuseStale(order, version, () => presentOrder(viewer, order));
    if (await InvoiceModel.findOne({ where: { orderId: order.id, number } }))
      throw invalid([{ pointer: '#/number', detail: 'This invoice is entered already.' }]);
    const isMatched = amountMinor === order.totalMinor;
    await InvoiceModel.create({
      orderId: order.id,
      number,
      amountMinor,
      currency: order.currency,
      state: isMatched ? 'matched' : 'disputed',
    });
    await record(viewer, {
      subjectType: 'order',
      subjectId: order.id,
      subjectLabel: order.code,
      action: isMatched ? 'invoice matched' : 'invoice disputed',
      reason: number,
      detail: { amountMinor, orderedMinor: order.totalMinor },
    });
    if (isMatched && order.state === 'received' && order.paidAt)
      await changeState(viewer, 'order', order, 'closed', {
        label: order.code,
        reason: 'Received, paid and matched',
      });
    else await order.update({ version: order.version + 1 });
    return presentOrder(viewer, order);
  });
}
