import 'server-only';
import { DomainError, invalid } from '@/lib/domain/errors';
import { authorise, may } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type { RequestState } from '@/lib/domain/states';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import type {
  PlanPreviewBody,
  RequestCreate,
  RequestDetail,
  RequestLineInput,
  RequestMove,
  RequestPatch,
} from '@/lib/schemas/requests';
import { write } from '@/models/db';
import { DemonstrationModel } from '@/models/demonstration';
import { PlanModel } from '@/models/plan';
import { RequestModel } from '@/models/request';
import { RequestLineModel } from '@/models/request-line';
import { ReviewModel } from '@/models/review';
import { ReviewMessageModel } from '@/models/review-message';
import { SessionModel } from '@/models/session';
import { SolutionModel } from '@/models/solution';
import { nextCode } from './codes';
import { changeState, refuseStale } from './moves';
import { record } from './record';
import { storyOf } from './records';
import { judgeAgain, recomputeNeighboursOf, withdraw } from './request-changes';
import { linesOf } from './request-lines';
import { presentRows } from './request-list';
import { computePlan, judge } from './request-plans';
import { lapseReviews } from './reviews';

/** States in which its lines can still change. */
const CHANGEABLE: readonly RequestState[] = ['draft', 'returned', 'asked', 'in-review', 'agreed'];

/** Later states are judged again only because something changed, never because somebody presses the button twice. */
const SUBMITTABLE: readonly RequestState[] = ['draft', 'returned'];

async function lineNames(lines: readonly RequestLineInput[]): Promise<string[]> {
  const [solutions, demonstrations] = await Promise.all([
    SolutionModel.findAll({
      where: { id: lines.flatMap((line) => (line.kind === 'solution' ? [line.solutionId] : [])) },
      attributes: ['id', 'name'],
    }),
    DemonstrationModel.findAll({
      where: { id: lines.flatMap((line) => (line.kind === 'demonstration' ? [line.demonstrationId] : [])) },
      attributes: ['id', 'name'],
    }),
  ]);
  const names = new Map([...solutions, ...demonstrations].map(({ id, name }) => [id, name]));
  return lines.map(
    (line) => names.get(line.kind === 'solution' ? line.solutionId : line.demonstrationId) ?? '',
  );
}

async function detail(viewer: Viewer, request: RequestModel): Promise<RequestDetail> {
  const [row] = await presentRows([request]);
  if (!row) throw new Error('A request can be presented');
  const lines = (await linesOf([request.id])).get(request.id) ?? [];
  const plan = request.planHash
    ? await PlanModel.findOne({
        where: { requestId: request.id, hash: request.planHash },
        order: [['createdAt', 'DESC']],
      })
    : null;
  const review = await ReviewModel.findOne({
    where: { requestId: request.id },
    order: [['createdAt', 'DESC']],
  });
  return {
    ...row,
    note: request.note,
    lines,
    lineNames: await lineNames(lines),
    decision: plan?.decision ?? null,
    planHash: request.planHash,
    plan: plan?.content ?? null,
    review: review
      ? {
          id: review.id,
          state: review.state,
          decisionText: review.decisionText,
          conditions: review.conditions,
        }
      : null,
    story: await storyOf('request', request.id),
    mayChange:
      may(viewer, 'request:update', { ownerId: request.requesterId }) && CHANGEABLE.includes(request.state),
  };
}

async function loadOwn(viewer: Viewer, id: string): Promise<RequestModel> {
  const request = await RequestModel.findByPk(id);
  if (!request) throw new DomainError('not-found', 'There is no such request.');
  authorise(
    viewer,
    'request:update',
    { ownerId: request.requesterId },
    'It is the request of another instructor.',
  );
  return request;
}

export async function getRequest(viewer: Viewer, id: string): Promise<RequestDetail> {
  const request = await RequestModel.findByPk(id);
  if (!request) throw new DomainError('not-found', 'There is no such request.');
  return detail(viewer, request);
}

async function saveLines(requestId: string, lines: readonly RequestLineInput[]): Promise<void> {
  await RequestLineModel.destroy({ where: { requestId } });
  await RequestLineModel.bulkCreate(lines.map((line, position) => ({ requestId, position, ...line })));
}

/** A draft; its plan is computed once already, so that a line that can't be planned is refused now. */
export async function createRequest(viewer: Viewer, input: RequestCreate): Promise<RequestDetail> {
  return write(async () => {
    const session = await SessionModel.findByPk(input.sessionId);
    if (!session) throw invalid([{ pointer: '#/sessionId', detail: 'There is no such session.' }]);
    if (session.cancelledAt)
      throw invalid([{ pointer: '#/sessionId', detail: 'This session is cancelled.' }]);
    authorise(
      viewer,
      'request:create',
      { ownerId: session.instructorId },
      'It is the session of another instructor.',
    );
    await computePlan(input.sessionId, input.lines, null);
    const request = await RequestModel.create({
      code: await nextCode('request'),
      sessionId: input.sessionId,
      requesterId: viewer.id,
      state: 'draft',
      note: input.note,
      planHash: null,
    });
    await saveLines(request.id, input.lines);
    await record(viewer, {
      subjectType: 'request',
      subjectId: request.id,
      subjectLabel: request.code,
      action: 'draft',
      toState: 'draft',
    });
    return detail(viewer, request);
  });
}

/** What was judged is judged again when the change alters its plan. */
export async function updateRequest(viewer: Viewer, id: string, patch: RequestPatch): Promise<RequestDetail> {
  return write(async () => {
    const request = await loadOwn(viewer, id);
    await refuseStale(request, patch.version, () => detail(viewer, request));
    if (!CHANGEABLE.includes(request.state))
      throw new DomainError(
        'wrong-state',
        `The request is ${request.state.replaceAll('-', ' ')}; its lines stand.`,
      );
    await computePlan(request.sessionId, patch.lines, request.id);
    await request.update({ note: patch.note, version: request.version + 1 });
    await saveLines(request.id, patch.lines);
    await record(viewer, {
      subjectType: 'request',
      subjectId: request.id,
      subjectLabel: request.code,
      action: 'changed',
    });
    if (request.state === 'in-review' || request.state === 'agreed') {
      await judgeAgain(viewer, request, 'the request changed');
      await recomputeNeighboursOf(viewer, request, `${request.code} beside it changed`);
    }
    return detail(viewer, request);
  });
}

/** The answer to a question stands in the conversation it was asked in. */
async function keepAnswer(viewer: Viewer, request: RequestModel, answer: string): Promise<void> {
  if (answer === '') return;
  const asked = await ReviewModel.findOne({
    where: { requestId: request.id, state: 'returned' },
    order: [['createdAt', 'DESC']],
  });
  if (asked) await ReviewMessageModel.create({ reviewId: asked.id, authorId: viewer.id, body: answer });
}

/** Agreed at once or put before safety; an answer to a returned request goes with it. */
export async function submitRequest(
  viewer: Viewer,
  id: string,
  { version, reason }: RequestMove,
): Promise<RequestDetail> {
  return write(async () => {
    const request = await loadOwn(viewer, id);
    await refuseStale(request, version, () => detail(viewer, request));
    if (!SUBMITTABLE.includes(request.state))
      throw new DomainError(
        'wrong-state',
        `The request is ${request.state.replaceAll('-', ' ')}; it was submitted already.`,
      );
    const session = await SessionModel.findByPk(request.sessionId, { rejectOnEmpty: true });
    if (session.cancelledAt) throw new DomainError('wrong-state', 'Its session is cancelled.');
    if (request.state === 'returned') {
      await keepAnswer(viewer, request, reason);
      await lapseReviews(viewer, request, 'it was answered and submitted again');
    }
    request.submittedAt = new Date();
    await changeState(viewer, 'request', request, 'asked', { label: request.code, reason: reason || null });
    await judge(viewer, request);
    await recomputeNeighboursOf(viewer, request, `${request.code} was asked for in the same room`);
    return detail(viewer, request);
  });
}

export async function withdrawRequest(
  viewer: Viewer,
  id: string,
  { version, reason }: RequestMove,
): Promise<RequestDetail> {
  return write(async () => {
    const request = await loadOwn(viewer, id);
    await refuseStale(request, version, () => detail(viewer, request));
    await withdraw(viewer, request, reason || null);
    return detail(viewer, request);
  });
}

/** The plan while it is still being typed; nothing is kept. */
export async function previewPlan(
  _viewer: Viewer,
  { sessionId, requestId, lines }: PlanPreviewBody,
): Promise<RequestPlan> {
  return computePlan(sessionId, lines, requestId);
}
