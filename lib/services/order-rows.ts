import 'server-only';
import { DomainError } from '@/lib/domain/errors';
import { authorise, may } from '@/lib/domain/policy';
import { fromMicro } from '@/lib/domain/quantities';
import type { LedgerUnit } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import { ORDER_STATES, ORDER_MOVES } from '@/lib/domain/states';
import type { OrderDetail, OrderRow } from '@/lib/schemas/orders';
import { BudgetModel } from '@/models/budget';
import { InvoiceModel } from '@/models/invoice';
import { OfferModel } from '@/models/offer';
import { OrderModel } from '@/models/order';
import { OrderLineModel } from '@/models/order-line';
import { OutboxMessageModel } from '@/models/outbox-message';
import { PaymentModel } from '@/models/payment';
import { SubstanceModel } from '@/models/substance';
import { SupplierModel } from '@/models/supplier';
import { UserModel } from '@/models/user';
import { budgetLeftMinor } from './budgets';
import { rowsById } from './lookup';
import { refuseStale } from './moves';
import { storyOf } from './records';

/** The college keeps its books in one currency. */
export const CURRENCY = 'GBP';

const CANCELLABLE = ORDER_STATES.filter((state) => ORDER_MOVES[state].includes('cancelled'));

export function packSizeOf(packMicro: number, unit: LedgerUnit): string {
  return `${fromMicro(packMicro)} ${unit}`;
}

export async function presentOrderRows(orders: readonly OrderModel[]): Promise<OrderRow[]> {
  const [suppliers, people, lines] = await Promise.all([
    rowsById(
      SupplierModel,
      orders.map(({ supplierId }) => supplierId),
    ),
    rowsById(
      UserModel,
      orders.map(({ draftedById }) => draftedById),
    ),
    OrderLineModel.findAll({ where: { orderId: orders.map(({ id }) => id) }, attributes: ['orderId'] }),
  ]);
  return orders.map((order) => ({
    id: order.id,
    code: order.code,
    state: order.state,
    supplierName: suppliers.get(order.supplierId)?.name ?? '',
    draftedByName: people.get(order.draftedById)?.name ?? '',
    totalMinor: order.totalMinor,
    currency: order.currency,
    lineCount: lines.filter(({ orderId }) => orderId === order.id).length,
    isPaid: order.paidAt !== null,
    createdAt: order.createdAt.toISOString(),
    version: order.version,
  }));
}

/** Why a person can't approve, send or pay an order, in words; null where they can. */
export function whyNotApprove(viewer: Viewer, order: OrderModel): string | null {
  if (!viewer.roles.includes('purchasing')) return 'Only purchasing approves, sends and pays.';
  if (order.draftedById === viewer.id) return 'You drafted it; another person must approve it.';
  if (!may(viewer, 'order:approve', { ownerId: order.draftedById, totalMinor: order.totalMinor }))
    return 'It is above your limit; somebody with a higher one must approve it.';
  return null;
}

/** @throws DomainError `not-found` */
export async function loadOrder(id: string): Promise<OrderModel> {
  const order = await OrderModel.findByPk(id);
  if (!order) throw new DomainError('not-found', 'There is no such order.');
  return order;
}

type OrderAction = 'order:update' | 'order:cancel' | 'order:approve' | 'order:refuse' | 'order:send';

/** Why a person can't do something with an order, in words. */
function whyNot(viewer: Viewer, action: OrderAction, order: OrderModel): string | undefined {
  switch (action) {
    // Whoever drafted it is never who approves it, so nobody else may put lines into it.
    case 'order:update':
      return 'It is the draft of another person; only they change it.';
    case 'order:cancel':
      return 'Only who drafted it, or purchasing, can cancel it.';
    case 'order:refuse':
      return 'You drafted it; another person must judge it.';
    case 'order:approve':
    case 'order:send':
      return whyNotApprove(viewer, order) ?? undefined;
  }
}

/**
 * An order to do something with, as the person saw it.
 * @throws DomainError `not-found`, `forbidden`, or `conflict` where it changed meanwhile
 */
export async function orderToMove(
  viewer: Viewer,
  action: OrderAction,
  id: string,
  version: number,
): Promise<OrderModel> {
  const order = await loadOrder(id);
  const { draftedById: ownerId, totalMinor } = order;
  authorise(viewer, action, { ownerId, totalMinor }, whyNot(viewer, action, order));
  await refuseStale(order, version, () => presentOrder(viewer, order));
  return order;
}

export async function presentOrder(viewer: Viewer, order: OrderModel): Promise<OrderDetail> {
  const [row] = await presentOrderRows([order]);
  if (!row) throw new Error('An order can be presented');
  const [lines, budget, approver, payment, invoices, message, story] = await Promise.all([
    OrderLineModel.findAll({ where: { orderId: order.id }, order: [['position', 'ASC']] }),
    BudgetModel.findByPk(order.budgetId),
    order.approvedById ? UserModel.findByPk(order.approvedById) : null,
    PaymentModel.findOne({ where: { orderId: order.id }, order: [['createdAt', 'DESC']] }),
    InvoiceModel.findAll({ where: { orderId: order.id }, order: [['createdAt', 'ASC']] }),
    OutboxMessageModel.findOne({
      where: { subjectType: 'order', subjectId: order.id, channel: 'supplier-order' },
    }),
    storyOf('order', order.id),
  ]);
  const [substances, offers] = await Promise.all([
    rowsById(
      SubstanceModel,
      lines.map(({ substanceId }) => substanceId),
    ),
    rowsById(
      OfferModel,
      lines.map(({ offerId }) => offerId),
    ),
  ]);
  return {
    ...row,
    supplierId: order.supplierId,
    budgetId: order.budgetId,
    budgetName: budget ? `${budget.name} ${budget.year}` : '',
    note: order.note,
    goodsMinor: order.goodsMinor,
    surchargeMinor: order.surchargeMinor,
    supplierReference: order.supplierReference,
    approvedByName: approver?.name ?? null,
    lines: lines.map((line) => ({
      id: line.id,
      substanceId: line.substanceId,
      substanceName: substances.get(line.substanceId)?.name ?? line.substanceId,
      stockNumber: offers.get(line.offerId)?.stockNumber ?? '',
      packs: line.packs,
      packSize: packSizeOf(line.packMicro, line.unit),
      priceMinor: line.priceMinor,
      lineTotalMinor: line.lineTotalMinor,
      receivedPacks: line.receivedPacks,
      supplierStatus: line.supplierStatus,
      reason: line.reason,
    })),
    payment: payment
      ? { state: payment.state, failure: payment.failure, reference: payment.intentReference }
      : null,
    invoices: invoices.map(({ id, number, amountMinor, state }) => ({ id, number, amountMinor, state })),
    sending: message
      ? { id: message.id, state: message.state, attempts: message.attempts, lastError: message.lastError }
      : null,
    story,
    whyNotApprove: whyNotApprove(viewer, order),
    mayChange: order.state === 'draft' && may(viewer, 'order:update', { ownerId: order.draftedById }),
    mayCancel:
      CANCELLABLE.includes(order.state) &&
      (payment === null || payment.state === 'failed') &&
      may(viewer, 'order:cancel', { ownerId: order.draftedById }),
    yourLimitMinor: viewer.approvalLimitMinor,
    budgetLeftMinor: budget ? await budgetLeftMinor(budget) : 0,
  };
}
