import 'server-only';
import { Op } from 'sequelize';
import type { WhereOptions } from 'sequelize';
import { environment } from '@/lib/config/env';
import { DomainError } from '@/lib/domain/errors';
import { may, mayByRole } from '@/lib/domain/policy';
import { fromMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import { judgeTake } from '@/lib/planning/actual-strength';
import type { Batch, BatchListQuery, BatchRow } from '@/lib/schemas/batches';
import type { BatchActual, BatchStep, BatchTake } from '@/lib/schemas/batch-sheets';
import type { Page } from '@/lib/schemas/list';
import { BatchModel } from '@/models/batch';
import { BatchRequestModel } from '@/models/batch-request';
import { BatchStepModel } from '@/models/batch-step';
import { BatchTakeModel } from '@/models/batch-take';
import { BottleModel } from '@/models/bottle';
import { LotModel } from '@/models/lot';
import { PlaceModel } from '@/models/place';
import { RequestModel } from '@/models/request';
import { SessionModel } from '@/models/session';
import { SolutionModel } from '@/models/solution';
import { UserModel } from '@/models/user';
import { keptSheet } from './batch-sheets';
import type { KeptSheet } from './batch-sheets';
import { presentBottles } from './bottle-rows';
import { batchStops, lotStops } from './holds';
import { contains, orderOf } from './lists';
import { groupedBy, rowsById } from './lookup';
import { storyOf } from './records';

const MOST_FOUND = 500;

async function presentRows(batches: readonly BatchModel[]): Promise<BatchRow[]> {
  const ids = batches.map(({ id }) => id);
  const [solutions, people, links, stops] = await Promise.all([
    rowsById(
      SolutionModel,
      batches.map(({ solutionId }) => solutionId),
    ),
    rowsById(
      UserModel,
      batches.map(({ makerId }) => makerId),
    ),
    BatchRequestModel.findAll({ where: { batchId: ids } }),
    batchStops(batches),
  ]);
  const requests = await rowsById(
    RequestModel,
    links.map(({ requestId }) => requestId),
  );
  const linksOf = groupedBy(links, ({ batchId }) => batchId);
  return batches.map((batch) => ({
    id: batch.id,
    code: batch.code,
    solutionId: batch.solutionId,
    solutionName: solutions.get(batch.solutionId)?.name ?? '',
    volumeMl: batch.volumeMl,
    state: batch.state,
    makeOn: batch.makeOn,
    readyBy: batch.readyBy.toISOString(),
    useBy: batch.useBy?.toISOString() ?? null,
    isHeld: stops.has(batch.id),
    makerName: people.get(batch.makerId ?? '')?.name ?? null,
    requestCodes: (linksOf.get(batch.id) ?? []).map(({ requestId }) => requests.get(requestId)?.code ?? ''),
    version: batch.version,
  }));
}

/** Batches of these requests; used to show an instructor only their own. */
async function batchIdsFor(where: WhereOptions): Promise<string[]> {
  const requests = await RequestModel.findAll({ where, attributes: ['id'] });
  const links = await BatchRequestModel.findAll({
    where: { requestId: requests.map(({ id }) => id) },
    attributes: ['batchId'],
  });
  return links.map(({ batchId }) => batchId);
}

/** Batches; who is no staff sees those made for their own requests. */
export async function listBatches(viewer: Viewer, query: BatchListQuery): Promise<Page<BatchRow>> {
  const conditions: WhereOptions[] = [];
  if (!mayByRole(viewer, 'stock:read'))
    conditions.push({ id: await batchIdsFor({ requesterId: viewer.id }) });
  if (query.requestId) conditions.push({ id: await batchIdsFor({ id: query.requestId }) });
  if (query.state) conditions.push({ state: query.state });
  if (query.on) conditions.push({ makeOn: query.on });
  if (query.solutionId) conditions.push({ solutionId: query.solutionId });
  if (query.search) {
    const solutions = await SolutionModel.findAll({
      where: contains('name', query.search),
      attributes: ['id'],
      limit: MOST_FOUND,
    });
    conditions.push({
      [Op.or]: [contains('code', query.search), { solutionId: solutions.map(({ id }) => id) }],
    });
  }
  const { rows, count } = await BatchModel.findAndCountAll({
    where: { [Op.and]: conditions },
    attributes: { exclude: ['sheet', 'actual'] },
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await presentRows(rows), total: count, page: query.page, pageSize: query.pageSize };
}

async function presentTakes(takes: readonly BatchTakeModel[], sheet: KeptSheet): Promise<BatchTake[]> {
  const [lots, people] = await Promise.all([
    rowsById(
      LotModel,
      takes.map(({ lotId }) => lotId),
    ),
    rowsById(
      UserModel,
      takes.map(({ enteredById }) => enteredById),
    ),
  ]);
  const [stops, places] = await Promise.all([
    lotStops([...lots.values()]),
    rowsById(
      PlaceModel,
      [...lots.values()].map(({ placeId }) => placeId),
    ),
  ]);
  return takes.map((take) => {
    const line = sheet.plan.takes.find(({ position }) => position === take.position);
    const lot = lots.get(take.lotId);
    if (!line || !lot) throw new Error(`Take ${take.id} lost its line or its lot`);
    return {
      id: take.id,
      position: take.position,
      substanceId: take.substanceId,
      name: line.name,
      formula: line.formula,
      lotId: take.lotId,
      lotCode: lot.code,
      place: places.get(lot.placeId)?.name ?? line.place,
      lotHeldReason: stops.get(take.lotId) ?? null,
      unit: take.unit,
      target: fromMicro(take.targetMicro),
      low: fromMicro(take.lowMicro),
      high: fromMicro(take.highMicro),
      targetText: line.amountText,
      rangeText: line.rangeText,
      measuredWith: line.measuredWith,
      note: line.note,
      actual: take.actualMicro === null ? null : fromMicro(take.actualMicro),
      verdict:
        take.actualMicro === null ? null : judgeTake(line, sheet.plan.toleranceFraction, take.actualMicro),
      explanation: take.explanation,
      enteredBy: people.get(take.enteredById ?? '')?.name ?? null,
      enteredAt: take.enteredAt?.toISOString() ?? null,
      version: take.version,
    };
  });
}

async function presentSteps(steps: readonly BatchStepModel[]): Promise<BatchStep[]> {
  const people = await rowsById(
    UserModel,
    steps.map(({ doneById }) => doneById),
  );
  return steps.map(({ id, position, kind, text, doneAt, doneById }) => ({
    id,
    position,
    kind,
    text,
    doneAt: doneAt?.toISOString() ?? null,
    doneBy: people.get(doneById ?? '')?.name ?? null,
  }));
}

/** What still keeps a batch from being checked, in words. */
export function missingFor(
  takes: readonly { actualMicro: number | null; position: number }[],
  steps: readonly { kind: string; text: string; doneAt: Date | null }[],
): string[] {
  const open = takes.filter(({ actualMicro }) => actualMicro === null).map(({ position }) => position);
  const unticked = steps.filter(
    ({ kind, doneAt }) => (kind === 'condition' || kind === 'check') && doneAt === null,
  );
  return [
    ...(open.length > 0 ? [`Enter what was taken in line ${open.join(', ')}.`] : []),
    ...unticked.map(({ kind, text }) => `Tick the ${kind}: ${text}`),
  ];
}

/** @throws DomainError `not-found`, also where it serves none of the viewer's requests and so is not theirs to see */
export async function loadBatch(
  viewer: Viewer,
  id: string,
): Promise<{ batch: BatchModel; requests: RequestModel[]; links: BatchRequestModel[] }> {
  const batch = await BatchModel.findByPk(id);
  if (!batch) throw new DomainError('not-found', 'There is no such batch.');
  const links = await BatchRequestModel.findAll({ where: { batchId: id } });
  const requests = [
    ...(
      await rowsById(
        RequestModel,
        links.map(({ requestId }) => requestId),
      )
    ).values(),
  ];
  const isSeen = may(viewer, 'batch:read', { requesterIds: requests.map(({ requesterId }) => requesterId) });
  if (!isSeen) throw new DomainError('not-found', 'There is no such batch.');
  return { batch, requests, links };
}

/** A batch as its sheet shows it. */
export async function getBatch(viewer: Viewer, id: string): Promise<Batch> {
  const { batch, requests, links } = await loadBatch(viewer, id);
  const sheet = keptSheet(batch);
  const [takes, steps, bottles, sessions, people, [row], stops, story] = await Promise.all([
    BatchTakeModel.findAll({ where: { batchId: id }, order: [['position', 'ASC']] }),
    BatchStepModel.findAll({ where: { batchId: id }, order: [['position', 'ASC']] }),
    BottleModel.findAll({
      where: { batchId: id },
      order: [
        ['createdAt', 'ASC'],
        ['code', 'ASC'],
      ],
    }),
    rowsById(
      SessionModel,
      requests.map(({ sessionId }) => sessionId),
    ),
    rowsById(UserModel, [batch.plannedById, batch.checkerId]),
    presentRows([batch]),
    batchStops([batch]),
    storyOf('batch', id),
  ]);
  if (!row) throw new Error(`Batch ${id} can't be presented`);
  const { plan } = sheet;
  return {
    ...row,
    heldReason: stops.get(id) ?? null,
    plannedByName: people.get(batch.plannedById)?.name ?? '',
    checkerName: people.get(batch.checkerId ?? '')?.name ?? null,
    madeAt: batch.madeAt?.toISOString() ?? null,
    solutes: [...sheet.solutes],
    classification: mutableClassification(sheet),
    sheet: {
      makeVolumeMl: plan.makeVolumeMl,
      tolerance: plan.tolerance,
      toleranceFraction: plan.toleranceFraction,
      vessel: plan.vessel,
      glassware: [...plan.glassware],
      warnings: [...plan.warnings],
      questions: plan.questions.map(({ message }) => message),
      passedOver: plan.passedOver.map(({ message }) => message),
      expected: sheet.expected,
      storageNote: sheet.storageNote,
    },
    takes: await presentTakes(takes, sheet),
    steps: await presentSteps(steps),
    requests: links.flatMap(({ requestId, volumeMl }) => {
      const request = requests.find((one) => one.id === requestId);
      const session = request && sessions.get(request.sessionId);
      if (!request || !session) return [];
      return [
        {
          id: requestId,
          code: request.code,
          state: request.state,
          session: `${session.course} ${session.title}`,
          startsAt: session.startsAt.toISOString(),
          volumeMl,
        },
      ];
    }),
    bottles: await presentBottles(bottles),
    actual: batch.actual as unknown as BatchActual | null,
    story,
    address: `${environment().BASE_URL}/batches/${id}`,
    missing: batch.state === 'making' ? missingFor(takes, steps) : [],
  };
}

/** The kept classification in the shape that is sent. */
export function mutableClassification({ classification }: KeptSheet): Batch['classification'] {
  const { signalWord, pictograms, hazards, precautions, supplemental, incomplete } = classification;
  return {
    signalWord,
    pictograms: [...pictograms],
    hazards: hazards.map((hazard) => ({ ...hazard })),
    precautions: [...precautions],
    supplemental: [...supplemental],
    incomplete: [...incomplete],
  };
}
