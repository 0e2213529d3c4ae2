import 'server-only';
import { gravityOf } from '@/lib/domain/gravity';
import type { Viewer } from '@/lib/domain/roles';
import type { PlanModel } from '@/models/plan';
import type { RequestModel } from '@/models/request';
import { ReviewModel } from '@/models/review';
import { changeState } from './moves';
import { record } from './record';

/** Puts a plan before the safety officers. Belongs inside a write. */
export async function openReview(
  viewer: Viewer,
  request: RequestModel,
  plan: PlanModel,
): Promise<ReviewModel> {
  const review = await ReviewModel.create({
    requestId: request.id,
    planId: plan.id,
    planHash: plan.hash,
    state: 'waiting',
    gravity: gravityOf(plan.decision),
    conditions: [],
  });
  await record(viewer, {
    subjectType: 'review',
    subjectId: review.id,
    subjectLabel: request.code,
    action: 'waiting',
    toState: 'waiting',
  });
  return review;
}

/** Ends every review of a request that no longer fits it. Belongs inside a write. */
export async function lapseReviews(
  actor: Viewer | null,
  request: RequestModel,
  reason: string,
): Promise<void> {
  const open = await ReviewModel.findAll({ where: { requestId: request.id } });
  for (const review of open.filter(({ state }) => state !== 'lapsed')) {
    await changeState(actor, 'review', review, 'lapsed', { label: request.code, reason });
  }
}
