import 'server-only';
import { formatISO } from 'date-fns';
import { DomainError, invalid } from '@/lib/domain/errors';
import { fromMicro, toMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import type { Lot, LotCreate, LotPatch, LotReason } from '@/lib/schemas/lots';
import { write } from '@/models/db';
import { BatchModel } from '@/models/batch';
import { BatchTakeModel } from '@/models/batch-take';
import { BottleModel } from '@/models/bottle';
import { LotModel } from '@/models/lot';
import { PlaceModel } from '@/models/place';
import { SolutionModel } from '@/models/solution';
import { SubstanceModel } from '@/models/substance';
import { SupplierModel } from '@/models/supplier';
import { nextCode } from './codes';
import { holdLot } from './holds';
import { move } from './ledger';
import { groupedBy, rowsById } from './lookup';
import { presentLots } from './lot-rows';
import { refuseStale } from './moves';
import { receivedMicro } from './places';
import { record } from './record';
import { storyOf } from './records';

const isoDay = (date: Date): string => formatISO(date, { representation: 'date' });

async function usedIn(lotId: string): Promise<Lot['usedIn']> {
  const takes = (await BatchTakeModel.findAll({ where: { lotId }, order: [['enteredAt', 'ASC']] })).filter(
    ({ actualMicro }) => actualMicro !== null,
  );
  const batchIds = takes.map(({ batchId }) => batchId);
  const [batches, bottles] = await Promise.all([
    rowsById(BatchModel, batchIds),
    BottleModel.findAll({ where: { batchId: batchIds } }),
  ]);
  const solutions = await rowsById(
    SolutionModel,
    [...batches.values()].map(({ solutionId }) => solutionId),
  );
  const bottlesOf = groupedBy(bottles, ({ batchId }) => batchId);
  return takes.flatMap((take) => {
    const batch = batches.get(take.batchId);
    if (!batch) return [];
    return [
      {
        batchId: batch.id,
        batchCode: batch.code,
        solutionName: solutions.get(batch.solutionId)?.name ?? '',
        state: batch.state,
        amount: fromMicro(take.actualMicro ?? 0),
        at: (take.enteredAt ?? take.updatedAt).toISOString(),
        bottleCodes: (bottlesOf.get(batch.id) ?? []).map(({ code }) => code).sort(),
      },
    ];
  });
}

/** A lot, what was made from it, and its story. */
export async function getLot(_viewer: Viewer, id: string): Promise<Lot> {
  const lot = await LotModel.findByPk(id);
  if (!lot) throw new DomainError('not-found', 'There is no such lot.');
  const [[row], substance, place, supplier, received, uses, story] = await Promise.all([
    presentLots([lot]),
    SubstanceModel.findByPk(lot.substanceId, { rejectOnEmpty: true }),
    PlaceModel.findByPk(lot.placeId, { rejectOnEmpty: true }),
    lot.supplierId ? SupplierModel.findByPk(lot.supplierId) : null,
    receivedMicro([id]),
    usedIn(id),
    storyOf('lot', id),
  ]);
  if (!row) throw new Error(`Lot ${id} can't be presented`);
  return {
    ...row,
    heldReason: lot.heldReason,
    substanceHeldReason: substance.heldAt ? (substance.heldReason ?? '') : null,
    supplierName: supplier?.name ?? null,
    storageGroup: substance.storageGroup,
    placeStorageGroup: place.storageGroup,
    receivedAmount: fromMicro(received.get(id) ?? 0),
    usedIn: uses,
    story,
  };
}

/** What a lot can be of, by name. */
export async function listStockable(
  _viewer: Viewer,
): Promise<{ id: string; name: string; unit: string; storageGroup: string }[]> {
  const substances = await SubstanceModel.findAll({
    attributes: ['id', 'name', 'unit', 'storageGroup'],
    order: [['name', 'ASC']],
  });
  return substances.map(({ id, name, unit, storageGroup }) => ({ id, name, unit, storageGroup }));
}

/** Puts a new lot on the shelf and begins its ledger; to be called inside a write by whoever receives goods. */
export async function addLot(
  viewer: Viewer,
  lot: {
    readonly substance: SubstanceModel;
    readonly lotNumber: string;
    readonly assayPercent: number | null;
    readonly amountMicro: number;
    readonly receivedOn: string;
    readonly expiresOn: string | null;
    readonly placeId: string;
    readonly supplierId: string | null;
    readonly receiptId?: string;
    readonly reason: string;
  },
): Promise<LotModel> {
  const row = await LotModel.create({
    code: await nextCode('lot'),
    substanceId: lot.substance.id,
    supplierId: lot.supplierId,
    lotNumber: lot.lotNumber,
    assayPercent: lot.assayPercent,
    unit: lot.substance.unit,
    receivedOn: lot.receivedOn,
    expiresOn: lot.expiresOn,
    placeId: lot.placeId,
  });
  await move(viewer, {
    lotId: row.id,
    kind: 'received',
    amountMicro: lot.amountMicro,
    reason: lot.reason,
    receiptId: lot.receiptId,
  });
  await record(viewer, {
    subjectType: 'lot',
    subjectId: row.id,
    subjectLabel: row.code,
    action: 'received',
    reason: lot.reason,
    detail: { substance: lot.substance.id, amountMicro: lot.amountMicro, unit: row.unit },
  });
  return row;
}

/** Puts a lot on the shelf by hand. */
export async function createLot(viewer: Viewer, input: LotCreate): Promise<Lot> {
  const id = await write(async () => {
    const [substance, place] = await Promise.all([
      SubstanceModel.findByPk(input.substanceId),
      PlaceModel.findByPk(input.placeId),
    ]);
    const errors = [
      ...(substance
        ? []
        : [{ pointer: '#/substanceId', detail: 'There is no such substance in the catalogue.' }]),
      ...(place ? [] : [{ pointer: '#/placeId', detail: 'There is no such place.' }]),
      ...(input.expiresOn !== null && input.expiresOn < input.receivedOn
        ? [{ pointer: '#/expiresOn', detail: 'It would have expired before it came.' }]
        : []),
      ...(input.receivedOn > isoDay(new Date())
        ? [{ pointer: '#/receivedOn', detail: 'This day is still to come.' }]
        : []),
    ];
    if (!substance || errors.length > 0) throw invalid(errors);
    const { lotNumber, receivedOn, expiresOn, placeId, reason } = input;
    const lot = await addLot(viewer, {
      substance,
      lotNumber,
      assayPercent: input.assayPercent ?? null,
      amountMicro: toMicro(input.amount),
      receivedOn,
      expiresOn,
      placeId,
      supplierId: null,
      reason,
    });
    return lot.id;
  });
  return getLot(viewer, id);
}

/** Moves a lot or corrects its dates and assay. */
export async function updateLot(viewer: Viewer, id: string, patch: LotPatch): Promise<Lot> {
  await write(async () => {
    const lot = await LotModel.findByPk(id);
    if (!lot) throw new DomainError('not-found', 'There is no such lot.');
    await refuseStale(lot, patch.version, () => getLot(viewer, id));
    if (!(await PlaceModel.findByPk(patch.placeId)))
      throw invalid([{ pointer: '#/placeId', detail: 'There is no such place.' }]);
    const { placeId, openedOn, expiresOn, reason } = patch;
    const before = {
      placeId: lot.placeId,
      assayPercent: lot.assayPercent,
      openedOn: lot.openedOn,
      expiresOn: lot.expiresOn,
    };
    await lot.update({
      placeId,
      openedOn,
      expiresOn,
      assayPercent: patch.assayPercent ?? null,
      version: lot.version + 1,
    });
    await record(viewer, {
      subjectType: 'lot',
      subjectId: id,
      subjectLabel: lot.code,
      action: 'changed',
      reason,
      detail: { before },
    });
  });
  return getLot(viewer, id);
}

/** Puts a lot on hold or lifts the hold. */
export async function setLotHold(
  viewer: Viewer,
  id: string,
  isHeld: boolean,
  about: LotReason,
): Promise<Lot> {
  await holdLot(viewer, id, { isHeld, ...about });
  return getLot(viewer, id);
}
