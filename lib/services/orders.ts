import 'server-only';
import { DomainError, invalid } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import type { Page } from '@/lib/schemas/list';
import type {
  OrderCreate,
  OrderDetail,
  OrderListQuery,
  OrderMove,
  OrderPatch,
  OrderRow,
} from '@/lib/schemas/orders';
import { Op } from 'sequelize';
import { write } from '@/models/db';
import { BudgetModel } from '@/models/budget';
import { OrderModel } from '@/models/order';
import { SupplierModel } from '@/models/supplier';
import { nextCode } from './codes';
import { contains, orderOf } from './lists';
import { changeState } from './moves';
import { priceLines, saveLines } from './order-lines';
import { CURRENCY, loadOrder, orderToMove, presentOrder, presentOrderRows } from './order-rows';
import { record } from './record';

export async function listOrders(_viewer: Viewer, query: OrderListQuery): Promise<Page<OrderRow>> {
  const suppliers = query.search
    ? await SupplierModel.findAll({ where: contains('name', query.search), attributes: ['id'] })
    : [];
  const { rows, count } = await OrderModel.findAndCountAll({
    where: {
      ...(query.state ? { state: query.state } : {}),
      ...(query.search
        ? { [Op.or]: [contains('code', query.search), { supplierId: suppliers.map(({ id }) => id) }] }
        : {}),
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
    const order = await orderToMove(viewer, 'order:update', id, patch.version);
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
    const order = await orderToMove(viewer, 'order:update', id, version);
    await changeState(viewer, 'order', order, 'for-approval', {
      label: order.code,
      reason: reason || null,
      detail: { totalMinor: order.totalMinor },
    });
    return presentOrder(viewer, order);
  });
}
