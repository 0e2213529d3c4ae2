import 'server-only';
import { createHash } from 'node:crypto';
import { Op } from 'sequelize';
import { environment } from '@/lib/config/env';
import { invalid } from '@/lib/domain/errors';
import type { JsonObject } from '@/lib/domain/json';
import type { Viewer } from '@/lib/domain/roles';
import type { RequestState } from '@/lib/domain/states';
import type { BottleContent } from '@/lib/hazards/types';
import { planRequest } from '@/lib/planning/request-plan';
import { solutionNeeds } from '@/lib/planning/request-need';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import type { RequestLineInput } from '@/lib/schemas/requests';
import { FindingModel } from '@/models/finding';
import { PlanModel } from '@/models/plan';
import { RequestModel } from '@/models/request';
import { RoomModel } from '@/models/room';
import { SessionModel } from '@/models/session';
import { UserModel } from '@/models/user';
import { changeState } from './moves';
import { enqueueLetter } from './outbox';
import { canonicalJson } from './record';
import { linesOf, plainLine, resolveLines } from './request-lines';
import { openReview } from './reviews';

/** States in which a request has bottles in the room. */
const STANDING: readonly RequestState[] = ['asked', 'in-review', 'agreed', 'in-work', 'ready', 'handed-over'];
export function hashOfPlan(plan: RequestPlan): string {
  return createHash('sha256').update(canonicalJson(plan)).digest('hex');
}

/** A room for a time. */
export type Slot = Pick<SessionModel, 'roomId' | 'startsAt' | 'endsAt'>;

/** Sessions that are held in the room of a slot while it lasts. */
export async function sessionsBeside({ roomId, startsAt, endsAt }: Slot): Promise<SessionModel[]> {
  return SessionModel.findAll({
    where: { roomId, cancelledAt: null, startsAt: { [Op.lt]: endsAt }, endsAt: { [Op.gt]: startsAt } },
  });
}

/** Bottles that other requests have in the same room at overlapping times, in a fixed order. */
async function neighboursOf(session: SessionModel, ownRequestId: string | null): Promise<BottleContent[]> {
  const sessions = await sessionsBeside(session);
  const requests = await RequestModel.findAll({
    where: {
      sessionId: sessions.map(({ id }) => id),
      state: [...STANDING],
      ...(ownRequestId ? { id: { [Op.ne]: ownRequestId } } : {}),
    },
    order: [['code', 'ASC']],
  });
  const lines = await linesOf(requests.map(({ id }) => id));
  const bottles: BottleContent[] = [];
  for (const request of requests) {
    const resolved = await resolveLines(lines.get(request.id) ?? []);
    const benches = sessions.find(({ id }) => id === request.sessionId)?.benches ?? 1;
    const recipes = new Map(
      resolved
        .flatMap((line) =>
          line.kind === 'solution' ? [line.solution] : line.portions.map(({ solution }) => solution),
        )
        .map((recipe) => [recipe.id, recipe]),
    );
    for (const { solutionId, volumeMl } of solutionNeeds(resolved.map(plainLine), benches)) {
      const recipe = recipes.get(solutionId);
      if (recipe)
        bottles.push({ label: `${recipe.name} (${request.code})`, volumeMl, solutes: recipe.solutes });
    }
  }
  return bottles;
}

/** The plan of lines in a session, with what else stands in the room then. */
export async function computePlan(
  sessionId: string,
  lines: readonly RequestLineInput[],
  ownRequestId: string | null,
): Promise<RequestPlan> {
  const session = await SessionModel.findByPk(sessionId);
  const room = session && (await RoomModel.findByPk(session.roomId));
  if (!session || !room) throw invalid([{ pointer: '#/sessionId', detail: 'There is no such session.' }]);
  return planRequest({
    session: {
      course: session.course,
      title: session.title,
      startsAt: session.startsAt.toISOString(),
      roomName: room.name,
      room: {
        volumeM3: room.volumeM3,
        airChangesPerHour: room.airChangesPerHour,
        fumeCupboard: room.fumeCupboards > 0,
      },
      benches: session.benches,
    },
    lines: await resolveLines(lines),
    neighbours: await neighboursOf(session, ownRequestId),
  });
}

/** Keeps a plan with its findings. Belongs inside a write. */
async function freeze(request: RequestModel, plan: RequestPlan): Promise<PlanModel> {
  const hash = hashOfPlan(plan);
  const frozen = await PlanModel.create({
    requestId: request.id,
    hash,
    decision: plan.decision,
    content: plan as unknown as JsonObject,
  });
  await FindingModel.bulkCreate(
    plan.findings.map((finding, position) => ({
      planId: frozen.id,
      position,
      rule: finding.rule,
      severity: finding.severity,
      scope: finding.scope,
      title: finding.title,
      reason: finding.reason,
      detail: finding as unknown as JsonObject,
      source: finding.source,
    })),
  );
  request.planHash = hash;
  return frozen;
}

/**
 * Computes and freezes the plan of an asked request, and agrees it at once or puts it before safety. Belongs
 * inside a write.
 * @param because - why it is judged again; null where it was just submitted
 */
export async function judge(
  viewer: Viewer,
  request: RequestModel,
  because: string | null = null,
): Promise<void> {
  const lines = (await linesOf([request.id])).get(request.id) ?? [];
  const plan = await computePlan(request.sessionId, lines, request.id);
  const frozen = await freeze(request, plan);
  const headline = plan.findings[0]?.title ?? null;
  if (plan.decision === 'stop' || plan.decision === 'review') {
    await changeState(viewer, 'request', request, 'in-review', {
      label: request.code,
      reason: headline,
      detail: { planHash: frozen.hash },
    });
    await openReview(viewer, request, frozen);
    await tellSafety(request, plan);
    if (because !== null)
      await tellRequester(request, plan, 'went to safety', [
        `It is judged again because ${because}.`,
        headline ?? '',
      ]);
  } else {
    const gravest = plan.decision === 'clear' ? 'a note' : `"${plan.decision}"`;
    await changeState(viewer, 'request', request, 'agreed', {
      label: request.code,
      reason: `Agreed at once: nothing graver than ${gravest} was found`,
      detail: { planHash: frozen.hash },
    });
    await tellRequester(request, plan, 'is agreed', [
      because === null ? 'The prep room can plan it now.' : `It was judged again because ${because}.`,
    ]);
  }
}

async function tellSafety(request: RequestModel, plan: RequestPlan): Promise<void> {
  const officers = (await UserModel.findAll({ where: { disabledAt: null } })).filter(
    ({ roles, id }) => roles.includes('safety') && id !== request.requesterId,
  );
  for (const officer of officers) {
    await enqueueLetter(
      `review-opened:${request.id}:${request.version}:${officer.id}`,
      {
        to: officer.email,
        subject: `${request.code} waits for your judgement (${plan.decision})`,
        text: [
          `${officer.name},`,
          '',
          `${plan.session.course} ${plan.session.title}: ${plan.findings[0]?.title ?? ''}.`,
          plan.findings[0]?.reason ?? '',
          '',
          `${environment().BASE_URL}/reviews`,
        ].join('\n'),
      },
      { type: 'request', id: request.id },
    );
  }
}

async function tellRequester(
  request: RequestModel,
  plan: RequestPlan,
  outcome: string,
  lines: readonly string[],
): Promise<void> {
  const requester = await UserModel.findByPk(request.requesterId, { rejectOnEmpty: true });
  await enqueueLetter(
    `request-judged:${request.id}:${request.version}`,
    {
      to: requester.email,
      subject: `Request ${request.code} ${outcome}`,
      text: [
        `${requester.name},`,
        '',
        `your request ${request.code} for ${plan.session.course} ${plan.session.title} ${outcome}.`,
        ...lines,
        '',
        `${environment().BASE_URL}/requests/${request.id}`,
      ].join('\n'),
    },
    { type: 'request', id: request.id },
  );
}
