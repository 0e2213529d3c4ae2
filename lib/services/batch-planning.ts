import 'server-only';
import { createHash } from 'node:crypto';
import { formatISO, min } from 'date-fns';
import { DomainError, invalid } from '@/lib/domain/errors';
import { fromMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import { stateWords } from '@/lib/domain/states';
import type { Classification } from '@/lib/hazards/types';
import type { SheetShortage } from '@/lib/planning/batch-sheet-types';
import type { Batch, BatchCreate } from '@/lib/schemas/batches';
import type { Need } from '@/lib/schemas/needs';
import { write } from '@/models/db';
import { BatchModel } from '@/models/batch';
import { BatchRequestModel } from '@/models/batch-request';
import { BatchStepModel } from '@/models/batch-step';
import { BatchTakeModel } from '@/models/batch-take';
import { RequestModel } from '@/models/request';
import { ReviewModel } from '@/models/review';
import { SolutionModel } from '@/models/solution';
import { keepable, makeSheet } from './batch-sheets';
import { getBatch } from './batches';
import { closeShortages, openShortages } from './batch-shortages';
import { nextCode } from './codes';
import { once } from './idempotency';
import { rowsById } from './lookup';
import { changeState } from './moves';
import { needsOf, plansOf } from './needs';
import { record } from './record';

const isoDay = (date: Date): string => formatISO(date, { representation: 'date' });

/** Thrown to leave the transaction; what is missing is then written down in one of its own. */
class NotEnough extends DomainError {
  constructor(
    readonly shortages: readonly SheetShortage[],
    readonly requestId: string,
  ) {
    const lines = shortages.map(
      ({ name, unit, shortMicro }) =>
        `${name}: ${Number(fromMicro(shortMicro).toPrecision(4))} ${unit} short`,
    );
    super('not-enough', `Not enough stands on the shelves. ${lines.join('; ')}. Purchasing has been told.`, {
      data: {
        shortages: shortages.map(({ substanceId, name, unit, shortMicro }) => ({
          substanceId,
          name,
          unit,
          short: fromMicro(shortMicro),
        })),
      },
    });
  }
}

/**
 * Plans one batch and its sheet, and takes the requests it serves into work. A call sent twice under one key plans
 * one batch. Where the shelves hold too little, nothing is planned and the shortage is put before purchasing.
 * @throws DomainError `not-enough`, `invalid`, `wrong-state`
 */
export async function createBatch(viewer: Viewer, input: BatchCreate, key: string | null): Promise<Batch> {
  const plan = async () => ({ id: await planBatch(viewer, input) });
  try {
    const { id } = key
      ? await once(
          {
            userId: viewer.id,
            endpoint: 'POST /api/batches',
            key,
            requestHash: createHash('sha256').update(JSON.stringify(input)).digest('hex'),
          },
          plan,
        )
      : await write(plan);
    return await getBatch(viewer, id);
  } catch (error) {
    if (error instanceof NotEnough) {
      const { shortages, requestId } = error;
      await openShortages(viewer, { shortages, neededOn: input.makeOn, requestId });
    }
    throw error;
  }
}

/** The requests asked for, in the order asked, each of them agreed. */
async function agreedRequests(ids: readonly string[]): Promise<RequestModel[]> {
  const rows = await rowsById(RequestModel, ids);
  return [...new Set(ids)].map((id, index) => {
    const request = rows.get(id);
    if (!request) throw invalid([{ pointer: `#/requestIds/${index}`, detail: 'There is no such request.' }]);
    if (request.state !== 'agreed' && request.state !== 'in-work') {
      throw new DomainError(
        'wrong-state',
        `Request ${request.code} is ${stateWords(request.state)}; only what is agreed can be made.`,
      );
    }
    return request;
  });
}

function openNeeds(needs: readonly Need[], requests: readonly RequestModel[], solutionId: string): Need[] {
  return requests.map((request, index) => {
    const need = needs.find((one) => one.requestId === request.id && one.solutionId === solutionId);
    if (!need)
      throw invalid([
        { pointer: `#/requestIds/${index}`, detail: `Request ${request.code} does not need this solution.` },
      ]);
    if (need.openMl === 0)
      throw new DomainError(
        'wrong-state',
        `What request ${request.code} needs of it is already planned or made.`,
      );
    return need;
  });
}

/** @throws DomainError `invalid` unless the day lies in the window of every need */
function refuseOutsideWindow(makeOn: string, needs: readonly Need[]): void {
  const today = isoDay(new Date());
  const refuse = (detail: string) => invalid([{ pointer: '#/makeOn', detail }]);
  if (makeOn < today) throw refuse('This day is over.');
  for (const { requestCode, notBefore, startsAt } of needs) {
    if (makeOn < notBefore) throw refuse(`For ${requestCode} it would be too old: not before ${notBefore}.`);
    const sessionDay = isoDay(new Date(startsAt));
    if (makeOn > sessionDay) throw refuse(`The session of ${requestCode} is on ${sessionDay}.`);
  }
}

/** Conditions that officers set for these requests, each once. */
async function conditionsFor(requests: readonly RequestModel[]): Promise<string[]> {
  const reviews = await ReviewModel.findAll({
    where: { requestId: requests.map(({ id }) => id), state: 'agreed-with-conditions' },
  });
  const codes = new Map(requests.map(({ id, code, planHash }) => [id, { code, planHash }]));
  const current = reviews.filter(({ requestId, planHash }) => codes.get(requestId)?.planHash === planHash);
  return [
    ...new Set(
      current.flatMap(({ requestId, conditions }) =>
        conditions.map((line) => `${codes.get(requestId)?.code ?? ''}: ${line}`),
      ),
    ),
  ];
}

/** The solution as the agreed plan classified it: the label says what was judged. */
async function classificationOf(
  requests: readonly RequestModel[],
  solution: SolutionModel,
): Promise<Classification> {
  for (const plan of (await plansOf(requests)).values()) {
    const planned = plan.solutions.find(({ solutionId }) => solutionId === solution.id);
    if (planned) return planned.classification;
  }
  throw new DomainError('wrong-state', `No agreed plan says how ${solution.name} is to be labelled.`);
}

async function planBatch(viewer: Viewer, input: BatchCreate): Promise<string> {
  const solution = await SolutionModel.findByPk(input.solutionId);
  if (!solution) throw invalid([{ pointer: '#/solutionId', detail: 'There is no such solution.' }]);
  const requests = await agreedRequests(input.requestIds);
  const needs = openNeeds(await needsOf(requests), requests, solution.id);
  refuseOutsideWindow(input.makeOn, needs);
  const openMl = needs.reduce((sum, need) => sum + need.openMl, 0);
  const volumeMl = input.volumeMl ?? openMl;
  if (volumeMl < openMl) {
    throw invalid([
      { pointer: '#/volumeMl', detail: `The chosen requests need ${Number(openMl.toPrecision(6))} mL.` },
    ]);
  }
  const sheet = await makeSheet(solution, {
    volumeMl,
    makeOn: input.makeOn,
    conditions: await conditionsFor(requests),
    classification: await classificationOf(requests, solution),
  });
  const [first] = requests;
  if (sheet.plan.shortages.length > 0 && first) throw new NotEnough(sheet.plan.shortages, first.id);

  const readyBy = min(needs.map((need) => new Date(need.readyBy)));
  const batch = await BatchModel.create({
    code: await nextCode('batch'),
    solutionId: solution.id,
    volumeMl,
    state: 'planned',
    makeOn: input.makeOn,
    readyBy,
    sheet: keepable(sheet),
    plannedById: viewer.id,
  });
  await BatchTakeModel.bulkCreate(
    sheet.plan.takes.map(({ position, substanceId, lotId, unit, targetMicro, lowMicro, highMicro }) => ({
      batchId: batch.id,
      position,
      substanceId,
      lotId,
      unit,
      targetMicro,
      lowMicro,
      highMicro,
    })),
  );
  await BatchStepModel.bulkCreate(
    sheet.plan.steps.map(({ kind, text }, position) => ({ batchId: batch.id, position, kind, text })),
  );
  await BatchRequestModel.bulkCreate(
    needs.map((need) => ({ batchId: batch.id, requestId: need.requestId, volumeMl: need.openMl })),
  );
  await record(viewer, {
    subjectType: 'batch',
    subjectId: batch.id,
    subjectLabel: batch.code,
    action: 'planned',
    toState: 'planned',
    detail: { solution: solution.name, volumeMl, requests: requests.map(({ code }) => code) },
  });
  await closeShortages(
    viewer,
    requests.map(({ id }) => id),
    sheet.solutes.map(({ substanceId }) => substanceId),
  );
  for (const request of requests) {
    if (request.state === 'agreed')
      await changeState(viewer, 'request', request, 'in-work', {
        label: request.code,
        reason: `Batch ${batch.code}`,
      });
  }
  return batch.id;
}
