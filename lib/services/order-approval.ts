import 'server-only';
import { authorise } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type { OrderDetail, OrderMove, OrderRefuse } from '@/lib/schemas/orders';
import { write } from '@/models/db';
import { changeState, refuseStale } from './moves';
import { releaseShortages } from './order-lines';
import { loadOrder, presentOrder, whyNotApprove } from './order-rows';

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
