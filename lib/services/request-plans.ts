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
import type { LineInPlan, RecipeInPlan } from '@/lib/planning/request-plan';
import { solutionNeeds } from '@/lib/planning/request-need';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import type { RequestLineInput } from '@/lib/schemas/requests';
import { DemonstrationModel } from '@/models/demonstration';
import { DemonstrationPortionModel } from '@/models/demonstration-portion';
import { FindingModel } from '@/models/finding';
import { PlanModel } from '@/models/plan';
import { RequestModel } from '@/models/request';
import { RequestLineModel } from '@/models/request-line';
import { RoomModel } from '@/models/room';
import { SessionModel } from '@/models/session';
import { SolutionModel } from '@/models/solution';
import { SolutionSoluteModel } from '@/models/solution-solute';
import { UserModel } from '@/models/user';
import { changeState } from './moves';
import { enqueueLetter } from './outbox';
import { canonicalJson } from './record';
import { lapseReviews, openReview } from './reviews';

/** States in which a request has bottles in the room. */
const STANDING: readonly RequestState[] = ['asked', 'in-review', 'agreed', 'in-work', 'ready', 'handed-over'];
/** States in which a plan was judged or waits for it, so that a change must be judged again. */
const JUDGED: readonly RequestState[] = ['in-review', 'agreed', 'in-work'];

export function hashOfPlan(plan: RequestPlan): string {
  return createHash('sha256').update(canonicalJson(plan)).digest('hex');
}

async function recipesById(ids: readonly string[]): Promise<Map<string, RecipeInPlan>> {
  const [solutions, solutes] = await Promise.all([
    SolutionModel.findAll({ where: { id: [...ids] } }),
    SolutionSoluteModel.findAll({ where: { solutionId: [...ids] }, order: [['position', 'ASC']] }),
  ]);
  return new Map(
    solutions.map(({ id, name, shelfLifeDays }) => [
      id,
      {
        id,
        name,
        shelfLifeDays,
        solutes: solutes
          .filter(({ solutionId }) => solutionId === id)
          .map(({ substanceId, molarity }) => ({ substance: substanceId, molarity })),
      },
    ]),
  );
}

/** @throws DomainError `invalid` for each line that names an unknown recipe or demonstration */
async function resolveLines(lines: readonly RequestLineInput[]): Promise<LineInPlan[]> {
  const demonstrationIds = lines.flatMap((line) =>
    line.kind === 'demonstration' ? [line.demonstrationId] : [],
  );
  const [demonstrations, portions] = await Promise.all([
    DemonstrationModel.findAll({ where: { id: demonstrationIds } }),
    DemonstrationPortionModel.findAll({
      where: { demonstrationId: demonstrationIds },
      order: [['position', 'ASC']],
    }),
  ]);
  const recipes = await recipesById([
    ...lines.flatMap((line) => (line.kind === 'solution' ? [line.solutionId] : [])),
    ...portions.map(({ solutionId }) => solutionId),
  ]);
  const byId = new Map(demonstrations.map((demonstration) => [demonstration.id, demonstration]));
  const errors: { pointer: string; detail: string }[] = [];
  const resolved = lines.flatMap((line, index): LineInPlan[] => {
    if (line.kind === 'solution') {
      const solution = recipes.get(line.solutionId);
      if (!solution)
        errors.push({ pointer: `#/lines/${index}/solutionId`, detail: 'There is no such solution.' });
      return solution
        ? [
            {
              kind: 'solution',
              solution,
              volumePerBenchMl: line.volumePerBenchMl,
              spareBenches: line.spareBenches,
            },
          ]
        : [];
    }
    const demonstration = byId.get(line.demonstrationId);
    if (!demonstration) {
      errors.push({ pointer: `#/lines/${index}/demonstrationId`, detail: 'There is no such demonstration.' });
      return [];
    }
    const own = portions.filter(({ demonstrationId }) => demonstrationId === demonstration.id);
    return [
      {
        kind: 'demonstration',
        id: demonstration.id,
        name: demonstration.name,
        outcomeWanted: demonstration.outcomeWanted,
        vesselMl: demonstration.vesselMl,
        performances: line.performances,
        portions: own.flatMap(({ solutionId, volumeMl }) => {
          const solution = recipes.get(solutionId);
          return solution ? [{ solution, volumeMl }] : [];
        }),
      },
    ];
  });
  if (errors.length > 0) throw invalid(errors);
  return resolved;
}

export async function linesOf(requestIds: readonly string[]): Promise<Map<string, RequestLineInput[]>> {
  const rows = await RequestLineModel.findAll({
    where: { requestId: [...requestIds] },
    order: [['position', 'ASC']],
  });
  const byRequest = new Map<string, RequestLineInput[]>(requestIds.map((id) => [id, []]));
  for (const row of rows) {
    const line: RequestLineInput =
      row.kind === 'solution'
        ? {
            kind: 'solution',
            solutionId: row.solutionId ?? '',
            volumePerBenchMl: row.volumePerBenchMl ?? 0,
            spareBenches: row.spareBenches,
          }
        : {
            kind: 'demonstration',
            demonstrationId: row.demonstrationId ?? '',
            performances: row.performances ?? 1,
          };
    byRequest.get(row.requestId)?.push(line);
  }
  return byRequest;
}

/** Bottles that other requests have in the same room at overlapping times. */
async function neighboursOf(session: SessionModel, ownRequestId: string | null): Promise<BottleContent[]> {
  const sessions = await SessionModel.findAll({
    where: {
      roomId: session.roomId,
      cancelledAt: null,
      startsAt: { [Op.lt]: session.endsAt },
      endsAt: { [Op.gt]: session.startsAt },
    },
  });
  const requests = await RequestModel.findAll({
    where: {
      sessionId: sessions.map(({ id }) => id),
      state: [...STANDING],
      ...(ownRequestId ? { id: { [Op.ne]: ownRequestId } } : {}),
    },
  });
  const lines = await linesOf(requests.map(({ id }) => id));
  const bottles: BottleContent[] = [];
  for (const request of requests) {
    const resolved = await resolveLines(lines.get(request.id) ?? []);
    const benches = sessions.find(({ id }) => id === request.sessionId)?.benches ?? 1;
    const needs = solutionNeeds(resolved.map(plainLine), benches);
    const recipes = new Map(
      resolved
        .flatMap((line) =>
          line.kind === 'solution' ? [line.solution] : line.portions.map(({ solution }) => solution),
        )
        .map((recipe) => [recipe.id, recipe]),
    );
    for (const { solutionId, volumeMl } of needs) {
      const recipe = recipes.get(solutionId);
      if (recipe)
        bottles.push({ label: `${recipe.name} (${request.code})`, volumeMl, solutes: recipe.solutes });
    }
  }
  return bottles;
}

function plainLine(line: LineInPlan) {
  return line.kind === 'solution'
    ? {
        kind: 'solution' as const,
        solutionId: line.solution.id,
        volumePerBenchMl: line.volumePerBenchMl,
        spareBenches: line.spareBenches,
      }
    : {
        kind: 'demonstration' as const,
        demonstrationId: line.id,
        performances: line.performances,
        portions: line.portions.map(({ solution, volumeMl }) => ({ solutionId: solution.id, volumeMl })),
      };
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

/** Computes and freezes the plan of an asked request, and agrees it at once or puts it before safety. Belongs inside a write. */
export async function judge(viewer: Viewer, request: RequestModel): Promise<void> {
  const lines = (await linesOf([request.id])).get(request.id) ?? [];
  const plan = await computePlan(request.sessionId, lines, request.id);
  const frozen = await freeze(request, plan);
  if (plan.decision === 'stop' || plan.decision === 'review') {
    await changeState(viewer, 'request', request, 'in-review', {
      label: request.code,
      reason: plan.findings[0]?.title ?? null,
      detail: { planHash: frozen.hash },
    });
    await openReview(viewer, request, frozen);
    await tellSafety(request, plan);
  } else {
    await changeState(viewer, 'request', request, 'agreed', {
      label: request.code,
      reason: `Agreed at once: nothing graver than ${plan.decision === 'clear' ? 'a note' : `"${plan.decision}"`} was found`,
      detail: { planHash: frozen.hash },
    });
  }
}

async function tellSafety(request: RequestModel, plan: RequestPlan): Promise<void> {
  const officers = (await UserModel.findAll({ where: { disabledAt: null } })).filter(
    ({ roles, id }) => roles.includes('safety') && id !== request.requesterId,
  );
  for (const officer of officers) {
    await enqueueLetter(
      `review-opened:${request.id}:${request.planHash}:${officer.id}`,
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

/** Computes submitted plans again; where one changed, its review lapses and it is judged afresh. Belongs inside a write. */
export async function recomputeRequests(
  viewer: Viewer,
  requestIds: readonly string[],
  reason: string,
): Promise<void> {
  const requests = await RequestModel.findAll({
    where: { id: [...new Set(requestIds)], state: [...JUDGED] },
  });
  for (const request of requests) {
    const lines = (await linesOf([request.id])).get(request.id) ?? [];
    const plan = await computePlan(request.sessionId, lines, request.id);
    if (hashOfPlan(plan) === request.planHash) continue;
    await lapseReviews(viewer, request, reason);
    await changeState(viewer, 'request', request, 'asked', { label: request.code, reason });
    await judge(viewer, request);
  }
}

export async function recomputeRequestsOf(viewer: Viewer, session: SessionModel): Promise<void> {
  const requests = await RequestModel.findAll({ where: { sessionId: session.id }, attributes: ['id'] });
  await recomputeRequests(
    viewer,
    requests.map(({ id }) => id),
    'the session changed',
  );
}

export async function recomputeRequestsUsing(viewer: Viewer, solutionId: string): Promise<void> {
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
    'a recipe changed',
  );
}
