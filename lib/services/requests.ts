import 'server-only';
import type { WhereOptions } from 'sequelize';
import { DomainError, invalid } from '@/lib/domain/errors';
import { authorise, may } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type { RequestState } from '@/lib/domain/states';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import type { Page } from '@/lib/schemas/list';
import type {
  PlanPreviewBody,
  RequestCreate,
  RequestDetail,
  RequestLineInput,
  RequestListQuery,
  RequestMove,
  RequestPatch,
  RequestRow,
} from '@/lib/schemas/requests';
import { write } from '@/models/db';
import { DemonstrationModel } from '@/models/demonstration';
import { PlanModel } from '@/models/plan';
import { RequestModel } from '@/models/request';
import { RequestLineModel } from '@/models/request-line';
import { ReviewModel } from '@/models/review';
import { SessionModel } from '@/models/session';
import { SolutionModel } from '@/models/solution';
import { UserModel } from '@/models/user';
import { nextCode } from './codes';
import { contains, orderOf } from './lists';
import { changeState, refuseStale } from './moves';
import { record } from './record';
import { storyOf } from './records';
import { computePlan, judge, linesOf } from './request-plans';
import { lapseReviews } from './reviews';

const WAITS_FOR: Readonly<Record<RequestState, string>> = {
  draft: 'you to submit it',
  asked: 'the check',
  'in-review': 'the safety officer',
  agreed: 'the prep room',
  'in-work': 'the batches',
  ready: 'the session',
  'handed-over': 'leftovers to come back',
  closed: 'nothing',
  returned: 'your answer',
  withdrawn: 'nothing',
};
/** States in which its lines can still change. */
const CHANGEABLE: readonly RequestState[] = ['draft', 'returned', 'asked', 'in-review', 'agreed'];

/** Later states are judged again only because something changed, never because somebody presses the button twice. */
const SUBMITTABLE: readonly RequestState[] = ['draft', 'returned'];

async function presentRows(requests: readonly RequestModel[]): Promise<RequestRow[]> {
  const [sessions, people, lines] = await Promise.all([
    SessionModel.findAll({ where: { id: requests.map(({ sessionId }) => sessionId) } }),
    UserModel.findAll({
      where: { id: requests.map(({ requesterId }) => requesterId) },
      attributes: ['id', 'name'],
    }),
    linesOf(requests.map(({ id }) => id)),
  ]);
  const sessionById = new Map(sessions.map((session) => [session.id, session]));
  const names = new Map(people.map(({ id, name }) => [id, name]));
  return requests.map((request) => {
    const session = sessionById.get(request.sessionId);
    return {
      id: request.id,
      code: request.code,
      state: request.state,
      sessionId: request.sessionId,
      session: session ? `${session.course} ${session.title}` : '',
      startsAt: session?.startsAt.toISOString() ?? '',
      requesterId: request.requesterId,
      requesterName: names.get(request.requesterId) ?? '',
      lineCount: lines.get(request.id)?.length ?? 0,
      waitsFor: WAITS_FOR[request.state],
      version: request.version,
    };
  });
}

export async function listRequests(viewer: Viewer, query: RequestListQuery): Promise<Page<RequestRow>> {
  const where: WhereOptions = {
    ...(query.whose === 'mine' ? { requesterId: viewer.id } : {}),
    ...(query.state ? { state: query.state } : {}),
    ...(query.search ? contains('code', query.search) : {}),
  };
  const { rows, count } = await RequestModel.findAndCountAll({
    where,
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await presentRows(rows), total: count, page: query.page, pageSize: query.pageSize };
}

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
    if (request.version !== patch.version) refuseStale(request, patch.version, await detail(viewer, request));
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
      await lapseReviews(viewer, request, 'its request changed');
      await changeState(viewer, 'request', request, 'asked', {
        label: request.code,
        reason: 'the request changed',
      });
      await judge(viewer, request);
    }
    return detail(viewer, request);
  });
}

export async function submitRequest(
  viewer: Viewer,
  id: string,
  { version, reason }: RequestMove,
): Promise<RequestDetail> {
  return write(async () => {
    const request = await loadOwn(viewer, id);
    if (request.version !== version) refuseStale(request, version, await detail(viewer, request));
    if (!SUBMITTABLE.includes(request.state))
      throw new DomainError(
        'wrong-state',
        `The request is ${request.state.replaceAll('-', ' ')}; it was submitted already.`,
      );
    if (request.state === 'returned')
      await lapseReviews(viewer, request, 'it was answered and submitted again');
    request.submittedAt = new Date();
    await changeState(viewer, 'request', request, 'asked', { label: request.code, reason: reason || null });
    await judge(viewer, request);
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
    if (request.version !== version) refuseStale(request, version, await detail(viewer, request));
    request.closedAt = new Date();
    await changeState(viewer, 'request', request, 'withdrawn', {
      label: request.code,
      reason: reason || null,
    });
    await lapseReviews(viewer, request, 'its request was withdrawn');
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
