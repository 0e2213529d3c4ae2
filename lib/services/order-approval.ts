import 'server-only';
import type { Viewer } from '@/lib/domain/roles';
import type { OrderDetail, OrderMove, OrderRefuse } from '@/lib/schemas/orders';
import { write } from '@/models/db';
import { changeState } from './moves';
import { releaseShortages } from './order-lines';
import { orderToMove, presentOrder } from './order-rows';

/** Another person than the drafter approves, within their limit. */
export async function approveOrder(
  viewer: Viewer,
  id: string,
  { version, reason }: OrderMove,
): Promise<OrderDetail> {
  return write(async () => {
    const order = await orderToMove(viewer, 'order:approve', id, version);
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
    const order = await orderToMove(viewer, 'order:refuse', id, version);
    await changeState(viewer, 'order', order, 'refused', { label: order.code, reason });
    await releaseShortages(order.id);
    return presentOrder(viewer, order);
  });
}
