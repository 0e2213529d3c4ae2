import 'server-only';
import { formatISO, subDays, subHours } from 'date-fns';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import type { Viewer } from '@/lib/domain/roles';
import type { RequestState } from '@/lib/domain/states';
import type { Page } from '@/lib/schemas/list';
import type { Need, NeedListQuery } from '@/lib/schemas/needs';
import { BatchModel } from '@/models/batch';
import { BatchRequestModel } from '@/models/batch-request';
import { BottleModel } from '@/models/bottle';
import { PlanModel } from '@/models/plan';
import { RequestModel } from '@/models/request';
import { SessionModel } from '@/models/session';
import { SolutionModel } from '@/models/solution';
import { groupedBy, rowsById } from './lookup';

/** Bottles stand on the trolley this long before a session starts. Common practice of the trade. */
const READY_BEFORE_HOURS = 2;
/** Volumes are compared to a hundredth of a millilitre: no glass of a prep room is read finer. */
const SAME_VOLUME_ML = 0.01;

const isoDay = (date: Date): string => formatISO(date, { representation: 'date' });

/** What one batch gives to one request: as planned, or what was bottled for it. */
export interface Coverage {
  readonly batch: BatchModel;
  readonly volumeMl: number;
  readonly isBottled: boolean;
}

const coverageKey = (requestId: string, solutionId: string): string => `${requestId}:${solutionId}`;

/** What covers the needs of these requests, by request and solution. Discarded batches and bottles cover nothing. */
async function coverageOf(requestIds: readonly string[]): Promise<Map<string, Coverage[]>> {
  const links = await BatchRequestModel.findAll({ where: { requestId: [...requestIds] } });
  const batches = await rowsById(
    BatchModel,
    links.map(({ batchId }) => batchId),
  );
  const bottles = groupedBy(
    await BottleModel.findAll({ where: { requestId: [...requestIds] } }),
    ({ batchId, requestId }) => `${batchId}:${requestId}`,
  );
  const coverage = new Map<string, Coverage[]>();
  for (const link of links) {
    const batch = batches.get(link.batchId);
    if (!batch || batch.state === 'discarded') continue;
    const isBottled = batch.state === 'bottled' || batch.state === 'spent';
    const own = bottles.get(`${link.batchId}:${link.requestId}`) ?? [];
    const bottledMl = own
      .filter(({ state }) => state !== 'discarded')
      .reduce((sum, { volumeMl }) => sum + volumeMl, 0);
    const key = coverageKey(link.requestId, batch.solutionId);
    const volumeMl = isBottled ? bottledMl : link.volumeMl;
    coverage.set(key, [...(coverage.get(key) ?? []), { batch, volumeMl, isBottled }]);
  }
  return coverage;
}

/** The frozen plans that requests are agreed on, by request. */
export async function plansOf(requests: readonly RequestModel[]): Promise<Map<string, RequestPlan>> {
  const hashes = new Map(requests.flatMap(({ id, planHash }) => (planHash ? [[id, planHash]] : [])));
  const plans = await PlanModel.findAll({
    where: { requestId: [...hashes.keys()] },
    order: [['createdAt', 'ASC']],
  });
  return new Map(
    plans
      .filter(({ requestId, hash }) => hashes.get(requestId) === hash)
      .map(({ requestId, content }) => [requestId, content as unknown as RequestPlan]),
  );
}

/** First and last day on which a solution may be made for a session. */
export function makeDays(startsAt: Date, solution: Pick<SolutionModel, 'shelfLifeDays' | 'sameDayOnly'>) {
  const readyBy = subHours(startsAt, READY_BEFORE_HOURS);
  const keepsDays = solution.sameDayOnly ? 0 : solution.shelfLifeDays;
  return { readyBy, makeBy: isoDay(readyBy), notBefore: isoDay(subDays(startsAt, keepsDays)) };
}

/**
 * What these requests need, each solution of each request once, with what covers it.
 * Requests without a frozen plan need nothing yet.
 */
export async function needsOf(requests: readonly RequestModel[]): Promise<Need[]> {
  const ids = requests.map(({ id }) => id);
  const [plans, sessions, coverage] = await Promise.all([
    plansOf(requests),
    rowsById(
      SessionModel,
      requests.map(({ sessionId }) => sessionId),
    ),
    coverageOf(ids),
  ]);
  const planned = [...plans.values()].flatMap(({ solutions }) =>
    solutions.map(({ solutionId }) => solutionId),
  );
  const solutions = await rowsById(SolutionModel, planned);
  const today = isoDay(new Date());
  return requests.flatMap((request) => {
    const session = sessions.get(request.sessionId);
    const plan = plans.get(request.id);
    if (!session || !plan || session.cancelledAt) return [];
    return plan.solutions.flatMap(({ solutionId, name, volumeMl }): Need[] => {
      const solution = solutions.get(solutionId);
      if (!solution) return [];
      const covers = coverage.get(coverageKey(request.id, solutionId)) ?? [];
      const coveredMl = covers.reduce((sum, cover) => sum + cover.volumeMl, 0);
      const openMl = volumeMl - coveredMl;
      const { readyBy, makeBy, notBefore } = makeDays(session.startsAt, solution);
      return [
        {
          id: coverageKey(request.id, solutionId),
          requestId: request.id,
          requestCode: request.code,
          requestState: request.state,
          session: `${session.course} ${session.title}`,
          startsAt: session.startsAt.toISOString(),
          solutionId,
          solutionName: name,
          neededMl: volumeMl,
          coveredMl,
          openMl: openMl > SAME_VOLUME_ML ? openMl : 0,
          notBefore,
          makeBy,
          readyBy: readyBy.toISOString(),
          isLate: makeBy < today,
          batches: covers.map(({ batch, volumeMl: coverMl }) => ({
            id: batch.id,
            code: batch.code,
            state: batch.state,
            volumeMl: coverMl,
          })),
        },
      ];
    });
  });
}

/** Whether all that a request needs stands in labelled bottles. */
export async function isAllBottled(request: RequestModel): Promise<boolean> {
  const plan = (await plansOf([request])).get(request.id);
  if (!plan || plan.solutions.length === 0) return false;
  const coverage = await coverageOf([request.id]);
  return plan.solutions.every(({ solutionId, volumeMl }) => {
    const bottled = (coverage.get(coverageKey(request.id, solutionId)) ?? []).filter(
      ({ isBottled }) => isBottled,
    );
    return bottled.reduce((sum, cover) => sum + cover.volumeMl, 0) >= volumeMl - SAME_VOLUME_ML;
  });
}

const SORTS: Readonly<Record<string, (a: Need, b: Need) => number>> = {
  makeBy: (a, b) => a.makeBy.localeCompare(b.makeBy) || a.solutionName.localeCompare(b.solutionName, 'en'),
  solutionName: (a, b) => a.solutionName.localeCompare(b.solutionName, 'en'),
  requestCode: (a, b) => a.requestCode.localeCompare(b.requestCode, 'en'),
  openMl: (a, b) => a.openMl - b.openMl,
};

/**
 * Solutions to be made for agreed requests. They follow from the plans of the few requests that are agreed or in
 * work, so they are worked out and not stored; sorting and paging come after.
 */
export async function listNeeds(_viewer: Viewer, query: NeedListQuery): Promise<Page<Need>> {
  const states: RequestState[] = ['agreed', 'in-work'];
  const requests = await RequestModel.findAll({
    where: { state: states, ...(query.requestId ? { id: query.requestId } : {}) },
    order: [['id', 'ASC']],
  });
  const text = query.search.toLowerCase();
  const column = query.sort.replace('-', '');
  const sort = SORTS[column] ?? SORTS.makeBy;
  const sign = query.sort.startsWith('-') ? -1 : 1;
  const needs = (await needsOf(requests))
    .filter((need) => query.show === 'all' || need.openMl > 0)
    .filter((need) => !query.solutionId || need.solutionId === query.solutionId)
    .filter((need) => !query.until || need.makeBy <= query.until)
    .filter(({ solutionName, requestCode, session }) =>
      `${solutionName} ${requestCode} ${session}`.toLowerCase().includes(text),
    )
    .sort((a, b) => sign * (sort?.(a, b) ?? 0));
  const { page, pageSize } = query;
  return { items: needs.slice((page - 1) * pageSize, page * pageSize), total: needs.length, page, pageSize };
}
