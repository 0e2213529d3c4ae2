import 'server-only';
import { DomainError } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import { write } from '@/models/db';
import { BatchModel } from '@/models/batch';
import { BatchTakeModel } from '@/models/batch-take';
import { LotModel } from '@/models/lot';
import { SubstanceModel } from '@/models/substance';
import { rowsById } from './lookup';
import { refuseStale } from './moves';
import { record } from './record';

/**
 * A hold stops use at once. It is looked up wherever something is used, and never copied: a held lot stops all
 * that was made from it, a held substance all its lots, and lifting it frees them again.
 */

/** Why nothing may be taken from these lots now; lots that may be used are absent. */
export async function lotStops(lots: readonly LotModel[]): Promise<Map<string, string>> {
  const substances = await rowsById(
    SubstanceModel,
    lots.map(({ substanceId }) => substanceId),
  );
  const stops = new Map<string, string>();
  for (const lot of lots) {
    const substance = substances.get(lot.substanceId);
    if (lot.heldAt) stops.set(lot.id, `Lot ${lot.code} is on hold: ${lot.heldReason ?? ''}`);
    else if (substance?.heldAt)
      stops.set(lot.id, `${substance.name} is on hold: ${substance.heldReason ?? ''}`);
  }
  return stops;
}

/** Why these batches, and bottles of them, may not be used now; others are absent. */
export async function batchStops(batches: readonly BatchModel[]): Promise<Map<string, string>> {
  const takes = await BatchTakeModel.findAll({ where: { batchId: batches.map(({ id }) => id) } });
  const lots = await rowsById(
    LotModel,
    takes.map(({ lotId }) => lotId),
  );
  const ofLots = await lotStops([...lots.values()]);
  const stops = new Map<string, string>();
  for (const { batchId, lotId, actualMicro } of takes) {
    const reason = ofLots.get(lotId);
    if (reason && actualMicro !== null) stops.set(batchId, `It was made from what is on hold. ${reason}`);
  }
  for (const batch of batches) {
    if (batch.heldAt) stops.set(batch.id, `Batch ${batch.code} is on hold: ${batch.heldReason ?? ''}`);
  }
  return stops;
}

/** @throws DomainError `wrong-state` where the batch may not be used now */
export async function refuseStopped(batch: BatchModel): Promise<void> {
  const reason = (await batchStops([batch])).get(batch.id);
  if (reason) throw new DomainError('wrong-state', reason);
}

interface Holdable {
  id: string;
  code: string;
  version: number;
  heldAt: Date | null;
  heldReason: string | null;
  save(): Promise<unknown>;
}

async function setHold(
  viewer: Viewer,
  kind: 'batch' | 'lot',
  find: () => Promise<Holdable | null>,
  change: { readonly isHeld: boolean; readonly reason: string; readonly version: number },
): Promise<void> {
  await write(async () => {
    const row = await find();
    if (!row) throw new DomainError('not-found', `There is no such ${kind}.`);
    await refuseStale(row, change.version, () => ({ version: row.version }));
    if ((row.heldAt !== null) === change.isHeld) {
      throw new DomainError(
        'wrong-state',
        change.isHeld ? `${row.code} is already on hold.` : `${row.code} is not on hold.`,
      );
    }
    row.heldAt = change.isHeld ? new Date() : null;
    row.heldReason = change.isHeld ? change.reason : null;
    row.version += 1;
    await row.save();
    await record(viewer, {
      subjectType: kind,
      subjectId: row.id,
      subjectLabel: row.code,
      action: change.isHeld ? 'put on hold' : 'hold lifted',
      reason: change.reason,
    });
  });
}

/** Stops or allows the use of a batch and its bottles. */
export async function holdBatch(
  viewer: Viewer,
  id: string,
  change: { isHeld: boolean; reason: string; version: number },
): Promise<void> {
  await setHold(viewer, 'batch', () => BatchModel.findByPk(id), change);
}

/** Stops or allows the use of a lot and of everything made from it. */
export async function holdLot(
  viewer: Viewer,
  id: string,
  change: { isHeld: boolean; reason: string; version: number },
): Promise<void> {
  await setHold(viewer, 'lot', () => LotModel.findByPk(id), change);
}
