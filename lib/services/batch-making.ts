import 'server-only';
import { addDays, endOfDay, formatISO } from 'date-fns';
import { DomainError, invalid } from '@/lib/domain/errors';
import type { JsonObject } from '@/lib/domain/json';
import { toMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import { stateWords } from '@/lib/domain/states';
import { actualStrength, judgeTake } from '@/lib/planning/actual-strength';
import type { ActualOutcome } from '@/lib/planning/actual-strength';
import type { BatchActual } from '@/lib/schemas/batch-sheets';
import type { Batch, BatchCheck, BatchReason, TakeEntry } from '@/lib/schemas/batches';
import { write } from '@/models/db';
import type { BatchModel } from '@/models/batch';
import { BatchStepModel } from '@/models/batch-step';
import { BatchTakeModel } from '@/models/batch-take';
import { BottleModel } from '@/models/bottle';
import { LotModel } from '@/models/lot';
import { keptSheet } from './batch-sheets';
import { getBatch, loadBatch, missingFor } from './batches';
import { holdBatch, lotStops, refuseStopped } from './holds';
import { move } from './ledger';
import { changeState, refuseStale } from './moves';
import { reopenUncovered } from './readiness';
import { record } from './record';

const isoDay = (date: Date): string => formatISO(date, { representation: 'date' });

/** The batch as it is now, for somebody who may change it. */
async function changing(viewer: Viewer, id: string, version?: number): Promise<BatchModel> {
  const { batch } = await loadBatch(viewer, id);
  if (version !== undefined) await refuseStale(batch, version, () => getBatch(viewer, id));
  return batch;
}

function refuseUnlessMaking(batch: BatchModel): void {
  if (batch.state === 'making') return;
  throw new DomainError(
    'wrong-state',
    `Batch ${batch.code} is ${stateWords(batch.state)}; entries are made while it is being made.`,
  );
}

/** Begins to make a batch. */
export async function startBatch(viewer: Viewer, id: string, version: number): Promise<Batch> {
  await write(async () => {
    const batch = await changing(viewer, id, version);
    await refuseStopped(batch);
    batch.makerId = viewer.id;
    await changeState(viewer, 'batch', batch, 'making', { label: batch.code });
  });
  return getBatch(viewer, id);
}

async function usableLot(take: BatchTakeModel): Promise<LotModel> {
  const lot = await LotModel.findByPk(take.lotId, { rejectOnEmpty: true });
  const stop = (await lotStops([lot])).get(lot.id);
  if (stop) throw new DomainError('wrong-state', stop);
  if (lot.expiresOn !== null && lot.expiresOn < isoDay(new Date())) {
    throw new DomainError(
      'wrong-state',
      `Lot ${lot.code} expired on ${lot.expiresOn}. Discard this batch and plan it again from another lot.`,
    );
  }
  return lot;
}

/**
 * Enters what was really taken. The ledger falls by it once: the same entry sent again changes nothing, and a
 * corrected one first gives back what stood there before.
 * @throws DomainError `invalid` where an amount outside the range is not explained, `not-enough`, `wrong-state`,
 *   `conflict`
 */
export async function enterTake(
  viewer: Viewer,
  batchId: string,
  takeId: string,
  entry: TakeEntry,
): Promise<Batch> {
  await write(async () => {
    const batch = await changing(viewer, batchId);
    const take = await BatchTakeModel.findOne({ where: { id: takeId, batchId } });
    if (!take) throw new DomainError('not-found', 'There is no such line on this sheet.');
    const amountMicro = toMicro(entry.amount);
    const explanation = entry.explanation === '' ? null : entry.explanation;
    if (take.actualMicro === amountMicro && take.explanation === explanation) return;
    await refuseStale(take, entry.version, () => getBatch(viewer, batchId));
    refuseUnlessMaking(batch);
    await refuseStopped(batch);
    const lot = await usableLot(take);
    const { plan } = keptSheet(batch);
    const line = plan.takes.find(({ position }) => position === take.position);
    if (!line) throw new Error(`Take ${take.id} lost its line`);
    if (amountMicro === 0) throw invalid([{ pointer: '#/amount', detail: 'Too little to be counted.' }]);
    if (judgeTake(line, plan.toleranceFraction, amountMicro) !== 'within' && explanation === null) {
      const percent = Math.abs(100 * (amountMicro / take.targetMicro - 1)).toPrecision(2);
      throw invalid([
        {
          pointer: '#/explanation',
          detail: `That is ${percent} % off the target, more than allowed. Say why, or take it again.`,
        },
      ]);
    }
    await postTake(viewer, batch, take, lot, amountMicro);
    const before = take.actualMicro;
    await take.update({
      actualMicro: amountMicro,
      explanation,
      enteredById: viewer.id,
      enteredAt: new Date(),
      version: take.version + 1,
    });
    await record(viewer, {
      subjectType: 'batch',
      subjectId: batch.id,
      subjectLabel: batch.code,
      action: before === null ? 'taken' : 'entry corrected',
      reason: explanation,
      detail: { line: take.position, lot: lot.code, unit: take.unit, amountMicro, beforeMicro: before },
    });
  });
  return getBatch(viewer, batchId);
}

async function postTake(
  viewer: Viewer,
  batch: BatchModel,
  take: BatchTakeModel,
  lot: LotModel,
  amountMicro: number,
): Promise<void> {
  const about = { lotId: lot.id, batchId: batch.id };
  if (take.actualMicro === amountMicro) return;
  if (take.actualMicro !== null) {
    await move(viewer, {
      ...about,
      kind: 'corrected',
      amountMicro: take.actualMicro,
      reason: `Entry of line ${take.position} of ${batch.code} taken back`,
    });
  }
  await move(viewer, { ...about, kind: 'taken', amountMicro: -amountMicro, reason: `Batch ${batch.code}` });
  if (lot.openedOn === null)
    await LotModel.update({ openedOn: isoDay(new Date()) }, { where: { id: lot.id } });
}

/** Ticks a step of the sheet, or takes the tick back. Doing it twice changes nothing more. */
export async function tickStep(
  viewer: Viewer,
  batchId: string,
  stepId: string,
  isDone: boolean,
): Promise<Batch> {
  await write(async () => {
    const batch = await changing(viewer, batchId);
    const step = await BatchStepModel.findOne({ where: { id: stepId, batchId } });
    if (!step) throw new DomainError('not-found', 'There is no such step on this sheet.');
    if ((step.doneAt !== null) === isDone) return;
    refuseUnlessMaking(batch);
    await step.update({ doneAt: isDone ? new Date() : null, doneById: isDone ? viewer.id : null });
    if (step.kind !== 'condition') return;
    await record(viewer, {
      subjectType: 'batch',
      subjectId: batch.id,
      subjectLabel: batch.code,
      action: isDone ? 'condition met' : 'condition open again',
      reason: step.text,
    });
  });
  return getBatch(viewer, batchId);
}

function keptActual(outcome: ActualOutcome, volumeMl: number): BatchActual {
  return {
    volumeMl,
    verdict: outcome.verdict,
    strengths: outcome.strengths.map(({ budget, ...strength }) => ({
      ...strength,
      largestPart: budget?.contributions[0]?.influence ?? null,
    })),
  };
}

/**
 * Marks a batch as checked and works out its real strength. The checker is named beside the maker; in a prep room
 * of one they may be the same person.
 * @throws DomainError `wrong-state` while entries, conditions or checks are open, or where it must be made again;
 *   `invalid` where a deviation is explained nowhere
 */
export async function checkBatch(viewer: Viewer, id: string, check: BatchCheck): Promise<Batch> {
  await write(async () => {
    const batch = await changing(viewer, id, check.version);
    refuseUnlessMaking(batch);
    await refuseStopped(batch);
    const takes = await BatchTakeModel.findAll({ where: { batchId: id }, order: [['position', 'ASC']] });
    const steps = await BatchStepModel.findAll({ where: { batchId: id }, order: [['position', 'ASC']] });
    const missing = missingFor(takes, steps);
    if (missing.length > 0) throw new DomainError('wrong-state', missing.join(' '), { data: { missing } });
    const { plan, shelfLifeDays } = keptSheet(batch);
    const volumeMl = check.volumeMl ?? plan.makeVolumeMl;
    const outcome = actualStrength(plan, {
      takes: takes.flatMap(({ position, actualMicro }) =>
        actualMicro === null ? [] : [{ position, amountMicro: actualMicro }],
      ),
      volumeMl,
    });
    refuseDeviation(outcome, check.note !== '' || takes.some(({ explanation }) => explanation !== null));
    const now = new Date();
    batch.actual = keptActual(outcome, volumeMl) as unknown as JsonObject;
    batch.checkerId = viewer.id;
    batch.madeAt = now;
    batch.useBy = endOfDay(addDays(now, shelfLifeDays));
    await changeState(viewer, 'batch', batch, 'checked', {
      label: batch.code,
      reason: check.note || null,
      detail: {
        volumeMl,
        strengths: outcome.strengths.map(({ substanceId, molarity, expandedUncertainty }) => ({
          substanceId,
          molarity,
          expandedUncertainty,
        })),
      },
    });
  });
  return getBatch(viewer, id);
}

function refuseDeviation({ strengths, verdict }: ActualOutcome, isExplained: boolean): void {
  if (verdict === 'within') return;
  const worst = [...strengths].sort((a, b) => Math.abs(b.deviationPercent) - Math.abs(a.deviationPercent))[0];
  const said = worst
    ? `${worst.name} is ${Math.abs(worst.deviationPercent).toPrecision(2)} % ${worst.deviationPercent > 0 ? 'too strong' : 'too weak'}`
    : '';
  if (verdict === 'remake') throw new DomainError('wrong-state', `${said}. Discard it and make it again.`);
  if (!isExplained)
    throw invalid([
      { pointer: '#/note', detail: `${said}, more than allowed. Say why, or discard it and make it again.` },
    ]);
}

/** Discards a batch with its bottles. What was taken stays taken; requests that relied on it go back into work. */
export async function discardBatch(
  viewer: Viewer,
  id: string,
  { reason, version }: BatchReason,
): Promise<Batch> {
  await write(async () => {
    const batch = await changing(viewer, id, version);
    await changeState(viewer, 'batch', batch, 'discarded', { label: batch.code, reason });
    const bottles = await BottleModel.findAll({ where: { batchId: id } });
    for (const bottle of bottles) {
      if (bottle.state !== 'discarded')
        await changeState(viewer, 'bottle', bottle, 'discarded', { label: bottle.code, reason });
    }
    await reopenUncovered(viewer, id);
  });
  return getBatch(viewer, id);
}

/** Puts a batch on hold or lifts the hold. */
export async function setBatchHold(
  viewer: Viewer,
  id: string,
  isHeld: boolean,
  about: BatchReason,
): Promise<Batch> {
  await holdBatch(viewer, id, { isHeld, ...about });
  return getBatch(viewer, id);
}
