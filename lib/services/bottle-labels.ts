import 'server-only';
import { environment } from '@/lib/config/env';
import type { Viewer } from '@/lib/domain/roles';
import type { BatchActual } from '@/lib/schemas/batch-sheets';
import type { BottleLabel } from '@/lib/schemas/bottles';
import { BatchModel } from '@/models/batch';
import { BottleModel } from '@/models/bottle';
import { SolutionModel } from '@/models/solution';
import { keptSheet } from './batch-sheets';
import { loadBatch, mutableClassification } from './batches';
import { batchStops } from './holds';
import { houseIdentity } from './house-identity';

async function labelsFor(batch: BatchModel, bottles: readonly BottleModel[]): Promise<BottleLabel[]> {
  const [solution, house] = await Promise.all([SolutionModel.findByPk(batch.solutionId), houseIdentity()]);
  const sheet = keptSheet(batch);
  const actual = batch.actual as unknown as BatchActual | null;
  return bottles.map(({ code, volumeMl, publicToken }) => ({
    bottleCode: code,
    batchCode: batch.code,
    solutionName: solution?.name ?? sheet.plan.solutionName,
    solutes: [...sheet.solutes],
    strengths: actual?.strengths ?? [],
    volumeMl,
    madeAt: batch.madeAt?.toISOString() ?? null,
    useBy: batch.useBy?.toISOString() ?? null,
    storageNote: sheet.storageNote,
    classification: mutableClassification(sheet),
    house,
    address: `${environment().BASE_URL}/b/${publicToken}`,
  }));
}

/** What the labels of a batch say, in the order of the bottles. Discarded bottles get none. */
export async function labelsOfBatch(viewer: Viewer, id: string): Promise<{ labels: BottleLabel[] }> {
  const { batch } = await loadBatch(viewer, id);
  const bottles = await BottleModel.findAll({
    where: { batchId: id, state: ['filled', 'handed-over', 'returned'] },
    order: [
      ['createdAt', 'ASC'],
      ['code', 'ASC'],
    ],
  });
  return { labels: await labelsFor(batch, bottles) };
}

export type PublicBottle =
  | {
      readonly kind: 'bottle';
      readonly label: BottleLabel;
      readonly isHeld: boolean;
      readonly isDiscarded: boolean;
      readonly isPastDate: boolean;
    }
  | { readonly kind: 'revoked'; readonly house: BottleLabel['house'] };

/** What anybody may read who holds the bottle; null where the address names nothing. */
export async function findPublicBottle(token: string): Promise<PublicBottle | null> {
  const bottle = await BottleModel.findOne({ where: { publicToken: token } });
  if (!bottle) return null;
  if (bottle.tokenRevokedAt) return { kind: 'revoked', house: await houseIdentity() };
  const batch = await BatchModel.findByPk(bottle.batchId, { rejectOnEmpty: true });
  const [label] = await labelsFor(batch, [bottle]);
  if (!label) return null;
  const stops = await batchStops([batch]);
  return {
    kind: 'bottle',
    label,
    isHeld: stops.has(batch.id),
    isDiscarded: bottle.state === 'discarded',
    isPastDate: batch.useBy !== null && batch.useBy < new Date(),
  };
}
