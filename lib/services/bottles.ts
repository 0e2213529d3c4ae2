import 'server-only';
import { DomainError, invalid } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import { stateWords } from '@/lib/domain/states';
import type { Batch, BatchBottling } from '@/lib/schemas/batches';
import type { BatchActual } from '@/lib/schemas/batch-sheets';
import type { Bottle, BottleChange, BottleRevoke, HandOver, LabelPrint } from '@/lib/schemas/bottles';
import { write } from '@/models/db';
import { BatchModel } from '@/models/batch';
import { BatchRequestModel } from '@/models/batch-request';
import { BottleModel } from '@/models/bottle';
import { RequestModel } from '@/models/request';
import { keptSheet } from './batch-sheets';
import { getBatch, loadBatch } from './batches';
import { presentBottles } from './bottle-rows';
import { randomToken } from './codes';
import { batchStops, refuseStopped } from './holds';
import { rowsById } from './lookup';
import { changeState, refuseStale } from './moves';
import { closeHandOver, readyWhatIsBottled, reopenUncovered } from './readiness';
import { record } from './record';

/** Bottles may hold this much more than was made: volumes are read to about so much when filling. */
const FILLING_SLACK = 0.005;

async function refuseUnfitting(batch: BatchModel, bottles: BatchBottling['bottles']): Promise<void> {
  const madeMl =
    (batch.actual as unknown as BatchActual | null)?.volumeMl ?? keptSheet(batch).plan.makeVolumeMl;
  const filledMl = bottles.reduce((sum, { volumeMl }) => sum + volumeMl, 0);
  if (filledMl > madeMl * (1 + FILLING_SLACK)) {
    throw invalid([
      {
        pointer: '#/bottles',
        detail: `The bottles hold ${filledMl} mL together; only ${madeMl} mL were made.`,
      },
    ]);
  }
  const links = await BatchRequestModel.findAll({ where: { batchId: batch.id } });
  const served = new Set(links.map(({ requestId }) => requestId));
  const errors = bottles.flatMap(({ requestId }, index) =>
    requestId === null || served.has(requestId)
      ? []
      : [{ pointer: `#/bottles/${index}/requestId`, detail: 'The batch was not made for this request.' }],
  );
  if (errors.length > 0) throw invalid(errors);
}

/** Divides a checked batch into bottles, each with its code and an address nobody can guess. */
export async function bottleBatch(
  viewer: Viewer,
  id: string,
  { bottles, version }: BatchBottling,
): Promise<Batch> {
  await write(async () => {
    const { batch } = await loadBatch(viewer, id);
    await refuseStale(batch, version, () => getBatch(viewer, id));
    if (batch.state !== 'checked') {
      throw new DomainError(
        'wrong-state',
        `Batch ${batch.code} is ${stateWords(batch.state)}; only a checked batch is bottled.`,
      );
    }
    await refuseStopped(batch);
    await refuseUnfitting(batch, bottles);
    for (const [index, { volumeMl, requestId }] of bottles.entries()) {
      const code = `${batch.code}/${index + 1}`;
      const bottle = await BottleModel.create({
        code,
        batchId: id,
        requestId,
        volumeMl,
        state: 'filled',
        publicToken: randomToken(),
      });
      await record(viewer, {
        subjectType: 'bottle',
        subjectId: bottle.id,
        subjectLabel: code,
        action: 'filled',
        toState: 'filled',
        detail: { volumeMl },
      });
    }
    await changeState(viewer, 'batch', batch, 'bottled', {
      label: batch.code,
      detail: { bottles: bottles.length },
    });
    await readyWhatIsBottled(viewer, id);
  });
  return getBatch(viewer, id);
}

/** @throws DomainError `wrong-state` where one of them may not leave the prep room */
async function refuseUnfitToLeave(bottles: readonly BottleModel[]): Promise<void> {
  const batches = await rowsById(
    BatchModel,
    bottles.map(({ batchId }) => batchId),
  );
  const stops = await batchStops([...batches.values()]);
  const now = new Date();
  for (const { code, batchId, state } of bottles) {
    const reason = stops.get(batchId);
    if (reason) throw new DomainError('wrong-state', `${code} stays here. ${reason}`);
    const useBy = batches.get(batchId)?.useBy;
    if (useBy && useBy < now)
      throw new DomainError('wrong-state', `${code} is past its date and stays here.`);
    if (state !== 'filled' && state !== 'returned')
      throw new DomainError('wrong-state', `${code} is ${stateWords(state)}.`);
  }
}

/** Hands bottles over to the session they were made for; the request follows when the last one left. */
export async function handOver(viewer: Viewer, { requestId, bottleIds }: HandOver) {
  return write(async () => {
    const request = await RequestModel.findByPk(requestId);
    if (!request) throw invalid([{ pointer: '#/requestId', detail: 'There is no such request.' }]);
    const found = await rowsById(BottleModel, bottleIds);
    const bottles = [...new Set(bottleIds)].map((id, index) => {
      const bottle = found.get(id);
      if (bottle?.requestId !== requestId)
        throw invalid([
          { pointer: `#/bottleIds/${index}`, detail: 'This bottle was not made for this request.' },
        ]);
      return bottle;
    });
    await refuseUnfitToLeave(bottles);
    for (const bottle of bottles)
      await changeState(viewer, 'bottle', bottle, 'handed-over', {
        label: bottle.code,
        reason: request.code,
      });
    await closeHandOver(viewer, request);
    return { requestId, requestState: request.state, bottles: await presentBottles(bottles) };
  });
}

async function loadBottle(id: string, version: number): Promise<BottleModel> {
  const bottle = await BottleModel.findByPk(id);
  if (!bottle) throw new DomainError('not-found', 'There is no such bottle.');
  await refuseStale(bottle, version, async () => (await presentBottles([bottle]))[0]);
  return bottle;
}

async function presentOne(bottle: BottleModel): Promise<Bottle> {
  const [presented] = await presentBottles([bottle]);
  if (!presented) throw new Error(`Bottle ${bottle.id} can't be presented`);
  return presented;
}

/** Takes a bottle back or discards it. A batch whose last bottle is discarded is spent. */
export async function changeBottle(
  viewer: Viewer,
  id: string,
  { state, reason, version }: BottleChange,
): Promise<Bottle> {
  return write(async () => {
    const bottle = await loadBottle(id, version);
    await changeState(viewer, 'bottle', bottle, state, { label: bottle.code, reason });
    if (state === 'discarded') {
      await reopenUncovered(viewer, bottle.batchId);
      const left = await BottleModel.count({
        where: { batchId: bottle.batchId, state: ['filled', 'handed-over', 'returned'] },
      });
      const batch = await BatchModel.findByPk(bottle.batchId);
      if (left === 0 && batch?.state === 'bottled')
        await changeState(viewer, 'batch', batch, 'spent', { label: batch.code });
    }
    return presentOne(bottle);
  });
}

/** Makes the address on a label say nothing from now on. */
export async function revokeBottle(
  viewer: Viewer,
  id: string,
  { reason, version }: BottleRevoke,
): Promise<Bottle> {
  return write(async () => {
    const bottle = await loadBottle(id, version);
    if (bottle.tokenRevokedAt) throw new DomainError('wrong-state', 'Its address is already revoked.');
    await bottle.update({ tokenRevokedAt: new Date(), version: bottle.version + 1 });
    await record(viewer, {
      subjectType: 'bottle',
      subjectId: id,
      subjectLabel: bottle.code,
      action: 'address revoked',
      reason,
    });
    return presentOne(bottle);
  });
}

/**
 * Notes that labels are printed.
 * @throws DomainError `invalid` where a label was printed before and no reason is given
 */
export async function printLabels(
  viewer: Viewer,
  { bottleIds, reason }: LabelPrint,
): Promise<{ bottles: Bottle[] }> {
  return write(async () => {
    const found = await rowsById(BottleModel, bottleIds);
    const bottles = [...new Set(bottleIds)].map((id, index) => {
      const bottle = found.get(id);
      if (!bottle) throw invalid([{ pointer: `#/bottleIds/${index}`, detail: 'There is no such bottle.' }]);
      return bottle;
    });
    const again = bottles.filter(({ labelPrints }) => labelPrints > 0).map(({ code }) => code);
    if (again.length > 0 && reason.length < 3) {
      throw invalid([
        {
          pointer: '#/reason',
          detail: `Printed before: ${again.join(', ')}. Say why they are printed again.`,
        },
      ]);
    }
    for (const bottle of bottles) {
      await bottle.update({ labelPrints: bottle.labelPrints + 1 });
      await record(viewer, {
        subjectType: 'bottle',
        subjectId: bottle.id,
        subjectLabel: bottle.code,
        action: bottle.labelPrints > 1 ? 'label printed again' : 'label printed',
        reason: reason || null,
      });
    }
    return { bottles: await presentBottles(bottles) };
  });
}
