import 'server-only';
import { Op } from 'sequelize';
import { DomainError, invalid } from '@/lib/domain/errors';
import type { FieldError } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import type { Page } from '@/lib/schemas/list';
import type {
  BudgetRow,
  OfferListQuery,
  OfferRow,
  OrderCreate,
  OrderDetail,
  OrderListQuery,
  OrderMove,
  OrderPatch,
  OrderRow,
} from '@/lib/schemas/orders';
import { write } from '@/models/db';
import { BudgetModel } from '@/models/budget';
import { OfferModel } from '@/models/offer';
import { OrderModel } from '@/models/order';
import { OrderLineModel } from '@/models/order-line';
import { ShortageModel } from '@/models/shortage';
import { SubstanceModel } from '@/models/substance';
import { SupplierModel } from '@/models/supplier';
import { nextCode } from './codes';
import { contains, orderOf } from './lists';
import { rowsById } from './lookup';
import { changeState, refuseStale } from './moves';
import { CURRENCY, loadOrder, packSizeOf, presentOrder, presentOrderRows } from './order-rows';
import { record } from './record';

export async function listOrders(_viewer: Viewer, query: OrderListQuery): Promise<Page<OrderRow>> {
  const { rows, count } = await OrderModel.findAndCountAll({
    where: {
      ...(query.state ? { state: query.state } : {}),
      ...(query.search ? contains('code', query.search) : {}),
    },
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await presentOrderRows(rows), total: count, page: query.page, pageSize: query.pageSize };
}

export async function getOrder(viewer: Viewer, id: string): Promise<OrderDetail> {
  return presentOrder(viewer, await loadOrder(id));
}

export async function listOffers(_viewer: Viewer, query: OfferListQuery): Promise<Page<OfferRow>> {
  const found = query.search
    ? await SubstanceModel.findAll({
        where: contains('searchText', query.search.toLowerCase()),
        attributes: ['id'],
      })
    : null;
  const { rows, count } = await OfferModel.findAndCountAll({
    where: {
      active: true,
      ...(query.supplierId ? { supplierId: query.supplierId } : {}),
      ...(query.substanceId ? { substanceId: query.substanceId } : {}),
      ...(found
        ? { [Op.or]: [{ substanceId: found.map(({ id }) => id) }, contains('stockNumber', query.search)] }
        : {}),
    },
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  const [suppliers, substances] = await Promise.all([
    rowsById(
      SupplierModel,
      rows.map(({ supplierId }) => supplierId),
    ),
    rowsById(
      SubstanceModel,
      rows.map(({ substanceId }) => substanceId),
    ),
  ]);
  const items = rows.map((offer) => ({
    id: offer.id,
    supplierId: offer.supplierId,
    supplierName: suppliers.get(offer.supplierId)?.name ?? '',
    substanceId: offer.substanceId,
    substanceName: substances.get(offer.substanceId)?.name ?? '',
    stockNumber: offer.stockNumber,
    packSize: packSizeOf(offer.packMicro, offer.unit),
    priceMinor: offer.priceMinor,
    leadDays: suppliers.get(offer.supplierId)?.leadDays ?? 0,
  }));
  return { items, total: count, page: query.page, pageSize: query.pageSize };
}

/** Budgets with the orders that are promised but not paid, and those that are paid. */
export async function listBudgets(): Promise<BudgetRow[]> {
  const budgets = await BudgetModel.findAll({
    order: [
      ['year', 'DESC'],
      ['name', 'ASC'],
    ],
  });
  const orders = await OrderModel.findAll({
    where: {
      budgetId: budgets.map(({ id }) => id),
      state: { [Op.notIn]: ['draft', 'for-approval', 'refused', 'cancelled'] },
    },
    attributes: ['budgetId', 'totalMinor', 'paidAt'],
  });
  const sum = (budgetId: string, isPaid: boolean) =>
    orders
      .filter((order) => order.budgetId === budgetId && (order.paidAt !== null) === isPaid)
      .reduce((total, { totalMinor }) => total + totalMinor, 0);
  return budgets.map(({ id, name, year, amountMinor, currency }) => ({
    id,
    name,
    year,
    amountMinor,
    currency,
    committedMinor: sum(id, false),
    spentMinor: sum(id, true),
  }));
}

interface Priced {
  readonly rows: readonly {
    offerId: string;
    substanceId: string;
    packs: number;
    packMicro: number;
    unit: 'g' | 'mL';
    priceMinor: number;
    lineTotalMinor: number;
  }[];
  readonly goodsMinor: number;
  readonly surchargeMinor: number;
}

/** Prices lines at a supplier's present offers. @throws DomainError `invalid` for every line that does not fit */
async function priceLines(supplier: SupplierModel, lines: OrderCreate['lines']): Promise<Priced> {
  const offers = await rowsById(
    OfferModel,
    lines.map(({ offerId }) => offerId),
  );
  const errors: FieldError[] = [];
  const seen = new Set<string>();
  let isHazardous = false;
  const rows = lines.flatMap(({ offerId, packs }, index) => {
    const offer = offers.get(offerId);
    const pointer = `#/lines/${index}/offerId`;
    if (!offer || !offer.active) errors.push({ pointer, detail: 'There is no such offer.' });
    else if (offer.supplierId !== supplier.id)
      errors.push({ pointer, detail: `${supplier.name} does not offer this.` });
    else if (seen.has(offerId)) errors.push({ pointer, detail: 'This offer stands twice.' });
    if (!offer) return [];
    seen.add(offerId);
    isHazardous ||= offer.hazardous;
    const { substanceId, packMicro, unit, priceMinor } = offer;
    return [{ offerId, substanceId, packs, packMicro, unit, priceMinor, lineTotalMinor: priceMinor * packs }];
  });
  if (errors.length > 0) throw invalid(errors);
  const goodsMinor = rows.reduce((sum, { lineTotalMinor }) => sum + lineTotalMinor, 0);
  if (goodsMinor < supplier.minimumOrderMinor) {
    throw invalid([
      {
        pointer: '#/lines',
        detail: `${supplier.name} takes orders from ${(supplier.minimumOrderMinor / 100).toFixed(2)} ${CURRENCY} of goods.`,
      },
    ]);
  }
  return {
    rows,
    goodsMinor,
    surchargeMinor: supplier.carriageMinor + (isHazardous ? supplier.hazardSurchargeMinor : 0),
  };
}

/** Ties the open shortages of what is ordered to its lines. */
async function claimShortages(orderId: string): Promise<void> {
  const lines = await OrderLineModel.findAll({ where: { orderId } });
  for (const line of lines) {
    await ShortageModel.update(
      { state: 'on-order', orderLineId: line.id },
      { where: { substanceId: line.substanceId, state: 'open' } },
    );
  }
}

/** What an order no longer covers is open again. Belongs inside a write. */
export async function releaseShortages(orderId: string): Promise<void> {
  const lines = await OrderLineModel.findAll({ where: { orderId }, attributes: ['id'] });
  await ShortageModel.update(
    { state: 'open', orderLineId: null },
    { where: { orderLineId: lines.map(({ id }) => id), state: 'on-order' } },
  );
}

async function saveLines(orderId: string, { rows }: Priced): Promise<void> {
  await releaseShortages(orderId);
  await OrderLineModel.destroy({ where: { orderId } });
  await OrderLineModel.bulkCreate(rows.map((row, position) => ({ orderId, position, ...row })));
  await claimShortages(orderId);
}

async function requireBudget(budgetId: string): Promise<void> {
  if (!(await BudgetModel.findByPk(budgetId)))
    throw invalid([{ pointer: '#/budgetId', detail: 'There is no such budget.' }]);
}

export async function createOrder(viewer: Viewer, input: OrderCreate): Promise<OrderDetail> {
  return write(async () => {
    const supplier = await SupplierModel.findByPk(input.supplierId);
    if (!supplier || !supplier.active)
      throw invalid([{ pointer: '#/supplierId', detail: 'There is no such supplier.' }]);
    await requireBudget(input.budgetId);
    const priced = await priceLines(supplier, input.lines);
    const order = await OrderModel.create({
      code: await nextCode('order'),
      supplierId: supplier.id,
      budgetId: input.budgetId,
      state: 'draft',
      draftedById: viewer.id,
      note: input.note,
      currency: CURRENCY,
      goodsMinor: priced.goodsMinor,
      surchargeMinor: priced.surchargeMinor,
      totalMinor: priced.goodsMinor + priced.surchargeMinor,
    });
    await saveLines(order.id, priced);
    await record(viewer, {
      subjectType: 'order',
      subjectId: order.id,
      subjectLabel: order.code,
      action: 'draft',
      toState: 'draft',
    });
    return presentOrder(viewer, order);
  });
}

export async function updateOrder(viewer: Viewer, id: string, patch: OrderPatch): Promise<OrderDetail> {
  return write(async () => {
    const order = await loadOrder(id);
    if (order.version !== patch.version) refuseStale(order, patch.version, await presentOrder(viewer, order));
    if (order.state !== 'draft') throw new DomainError('wrong-state', 'Only a draft can be changed.');
    const supplier = await SupplierModel.findByPk(order.supplierId, { rejectOnEmpty: true });
    await requireBudget(patch.budgetId);
    const priced = await priceLines(supplier, patch.lines);
    await order.update({
      budgetId: patch.budgetId,
      note: patch.note,
      goodsMinor: priced.goodsMinor,
      surchargeMinor: priced.surchargeMinor,
      totalMinor: priced.goodsMinor + priced.surchargeMinor,
      version: order.version + 1,
    });
    await saveLines(order.id, priced);
    await record(viewer, {
      subjectType: 'order',
      subjectId: order.id,
      subjectLabel: order.code,
      action: 'changed',
    });
    return presentOrder(viewer, order);
  });
}

export async function submitOrder(
  viewer: Viewer,
  id: string,
  { version, reason }: OrderMove,
): Promise<OrderDetail> {
  return write(async () => {
    const order = await loadOrder(id);
    if (order.version !== version) refuseStale(order, version, await presentOrder(viewer, order));
    await changeState(viewer, 'order', order, 'for-approval', {
      label: order.code,
      reason: reason || null,
      detail: { totalMinor: order.totalMinor },
    });
    return presentOrder(viewer, order);
  });
}

/** What was short is short again. */
export async function cancelOrder(
  viewer: Viewer,
  id: string,
  { version, reason }: OrderMove,
): Promise<OrderDetail> {
  return write(async () => {
    const order = await loadOrder(id);
    if (order.version !== version) refuseStale(order, version, await presentOrder(viewer, order));
    if (order.paidAt)
      throw new DomainError('wrong-state', 'It is paid; settle that with the supplier first.');
    await changeState(viewer, 'order', order, 'cancelled', { label: order.code, reason: reason || null });
    await releaseShortages(order.id);
    return presentOrder(viewer, order);
  });
}
