import 'server-only';
import { Op } from 'sequelize';
import type { Viewer } from '@/lib/domain/roles';
import { REQUEST_MOVES } from '@/lib/domain/states';
import type { RequestState } from '@/lib/domain/states';
import { DemonstrationPortionModel } from '@/models/demonstration-portion';
import { RequestModel } from '@/models/request';
import { RequestLineModel } from '@/models/request-line';
import { SessionModel } from '@/models/session';
import { changeState } from './moves';
import { linesOf } from './request-lines';
import { computePlan, hashOfPlan, judge, sessionsBeside } from './request-plans';
import type { Slot } from './request-plans';
import { lapseReviews } from './reviews';

/** What follows for submitted requests when something they were judged on changes. All of it belongs inside a write. */

/** States in which a plan was judged or waits for it, so that a change of its own must be judged again. */
const JUDGED: readonly RequestState[] = ['in-review', 'agreed', 'in-work'];
/** What others do reaches less far: once batches are being made, it is the newcomer that is judged. */
const MOVED_BY_OTHERS: readonly RequestState[] = ['in-review', 'agreed'];

/** Computes a plan again; where it changed, its review lapses and it is judged afresh. */
export async function judgeAgain(viewer: Viewer, request: RequestModel, reason: string): Promise<void> {
  const lines = (await linesOf([request.id])).get(request.id) ?? [];
  const plan = await computePlan(request.sessionId, lines, request.id);
  if (hashOfPlan(plan) === request.planHash) return;
  await lapseReviews(viewer, request, reason);
  await changeState(viewer, 'request', request, 'asked', { label: request.code, reason });
  await judge(viewer, request, reason);
}

/** Requests whose bottles stand beside a slot of room and time are looked at again. */
export async function recomputeBeside(
  viewer: Viewer,
  slot: Slot,
  exceptIds: readonly string[],
  reason: string,
): Promise<void> {
  const sessions = await sessionsBeside(slot);
  const requests = await RequestModel.findAll({
    where: {
      sessionId: sessions.map(({ id }) => id),
      state: [...MOVED_BY_OTHERS],
      id: { [Op.notIn]: [...exceptIds] },
    },
    order: [['code', 'ASC']],
  });
  for (const request of requests) await judgeAgain(viewer, request, reason);
}

/** After a request began or ceased to stand in its room. */
export async function recomputeNeighboursOf(
  viewer: Viewer,
  request: RequestModel,
  reason: string,
): Promise<void> {
  const session = await SessionModel.findByPk(request.sessionId, { rejectOnEmpty: true });
  await recomputeBeside(viewer, session, [request.id], reason);
}

async function recomputeRequests(
  viewer: Viewer,
  requestIds: readonly string[],
  reason: string,
): Promise<void> {
  const requests = await RequestModel.findAll({
    where: { id: [...new Set(requestIds)], state: [...JUDGED] },
    order: [['code', 'ASC']],
  });
  for (const request of requests) await judgeAgain(viewer, request, reason);
  for (const request of requests) await recomputeNeighboursOf(viewer, request, reason);
}

/**
 * After a session changed its room, hour or benches, or was cancelled.
 * @param before - where and when it was, since those who stood beside it there are free of it now
 */
export async function followSession(viewer: Viewer, session: SessionModel, before: Slot): Promise<void> {
  const requests = await RequestModel.findAll({
    where: { sessionId: session.id },
    order: [['code', 'ASC']],
  });
  if (session.cancelledAt) {
    for (const request of requests.filter(({ state }) => REQUEST_MOVES[state].includes('withdrawn'))) {
      await withdraw(viewer, request, 'the session was cancelled');
    }
  } else {
    await recomputeRequests(
      viewer,
      requests.map(({ id }) => id),
      'the session changed',
    );
  }
  await recomputeBeside(viewer, before, [], 'the session beside it changed');
}

/** Ends a request and its review; those who stand beside it are looked at again. */
export async function withdraw(viewer: Viewer, request: RequestModel, reason: string | null): Promise<void> {
  request.closedAt = new Date();
  await changeState(viewer, 'request', request, 'withdrawn', { label: request.code, reason });
  await lapseReviews(viewer, request, reason ?? 'its request was withdrawn');
  await recomputeNeighboursOf(viewer, request, `${request.code} was withdrawn`);
}

/** After a recipe changed: every request that asks for it, by itself or in a demonstration. */
export async function recomputeRequestsUsing(
  viewer: Viewer,
  solutionId: string,
  name: string,
): Promise<void> {
  const portions = await DemonstrationPortionModel.findAll({
    where: { solutionId },
    attributes: ['demonstrationId'],
  });
  const lines = await RequestLineModel.findAll({
    where: {
      [Op.or]: [{ solutionId }, { demonstrationId: portions.map(({ demonstrationId }) => demonstrationId) }],
    },
    attributes: ['requestId'],
  });
  await recomputeRequests(
    viewer,
    lines.map(({ requestId }) => requestId),
    `the recipe ${name} changed`,
  );
}

/** After a demonstration changed. */
export async function recomputeRequestsShowing(
  viewer: Viewer,
  demonstrationId: string,
  name: string,
): Promise<void> {
  const lines = await RequestLineModel.findAll({ where: { demonstrationId }, attributes: ['requestId'] });
  await recomputeRequests(
    viewer,
    lines.map(({ requestId }) => requestId),
    `the demonstration ${name} changed`,
  );
}
