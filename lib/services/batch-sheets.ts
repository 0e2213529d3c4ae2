import 'server-only';
import { Op } from 'sequelize';
import { pourMix } from '@/lib/chemistry/mixing';
import { ALL_SUBSTANCES, findSubstance } from '@/lib/chemistry/substances';
import { DomainError } from '@/lib/domain/errors';
import type { JsonObject } from '@/lib/domain/json';
import { hazardStatements } from '@/lib/hazards/classification/statements';
import { findSubstanceHazards } from '@/lib/hazards/tables';
import type { Classification, HazardStatement } from '@/lib/hazards/types';
import { planBatchSheet } from '@/lib/planning/batch-sheet';
import type { BatchSheet, SheetLot } from '@/lib/planning/batch-sheet-types';
import { canServeFor } from '@/lib/planning/weigh-out';
import type { BatchSolute } from '@/lib/schemas/batch-sheets';
import { BatchModel } from '@/models/batch';
import { BatchTakeModel } from '@/models/batch-take';
import { EquipmentModel } from '@/models/equipment';
import { LotModel } from '@/models/lot';
import { PlaceModel } from '@/models/place';
import type { SolutionModel } from '@/models/solution';
import { SolutionSoluteModel } from '@/models/solution-solute';
import { SubstanceModel } from '@/models/substance';
import { rowsById } from './lookup';

/** What is kept with a batch as it was when planned; the recipe may change afterwards. */
export interface KeptSheet {
  readonly plan: BatchSheet;
  readonly solutes: readonly BatchSolute[];
  readonly classification: Classification;
  readonly expected: { readonly pH: number | null; readonly colour: string | null };
  readonly storageNote: string | null;
  readonly shelfLifeDays: number;
}

export function keptSheet(batch: BatchModel): KeptSheet {
  return batch.sheet as unknown as KeptSheet;
}

export function keepable(sheet: KeptSheet): JsonObject {
  return sheet as unknown as JsonObject;
}

/** A strength at which the colour and pH of a solution are foreseen; the volume makes no difference to them. */
const ANY_VOLUME_ML = 100;
const ROOM_TEMPERATURE_C = 25;

/** The solutes of a recipe with their names. */
export async function solutesOf(solutionId: string): Promise<BatchSolute[]> {
  const rows = await SolutionSoluteModel.findAll({ where: { solutionId }, order: [['position', 'ASC']] });
  const substances = await rowsById(
    SubstanceModel,
    rows.map(({ substanceId }) => substanceId),
  );
  return rows.map(({ substanceId, molarity }) => {
    const substance = substances.get(substanceId);
    return { substanceId, molarity, name: substance?.name ?? substanceId, formula: substance?.formula ?? '' };
  });
}

/** pH and colour to check a finished batch by; null where the model can't say. */
export function expectedLook(name: string, solutes: readonly BatchSolute[]): KeptSheet['expected'] {
  const isModelled = solutes.every(({ substanceId }) => findSubstance(substanceId)?.releases);
  if (!isModelled) return { pH: null, colour: null };
  const portion = {
    label: name,
    volumeMl: ANY_VOLUME_ML,
    solutes: solutes.map(({ substanceId, molarity }) => ({ substance: substanceId, molarity })),
  };
  const mix = pourMix({ portions: [portion], activity: 'davies', temperatureC: ROOM_TEMPERATURE_C });
  if (!mix.converged) return { pH: null, colour: null };
  return { pH: mix.equilibrium.pH, colour: mix.appearance.solution.words };
}

/** Amounts that other planned batches will still take, by lot, in millionths. */
async function reservedMicro(lotIds: readonly string[]): Promise<Map<string, number>> {
  const takes = await BatchTakeModel.findAll({ where: { lotId: [...lotIds], actualMicro: null } });
  const batches = await rowsById(
    BatchModel,
    takes.map(({ batchId }) => batchId),
  );
  const reserved = new Map<string, number>();
  for (const { batchId, lotId, targetMicro } of takes) {
    const state = batches.get(batchId)?.state;
    if (state !== 'planned' && state !== 'making') continue;
    reserved.set(lotId, (reserved.get(lotId) ?? 0) + targetMicro);
  }
  return reserved;
}

/** Every lot that might serve for one of the solutes, less what other batches count on. */
async function lotsFor(solutes: readonly BatchSolute[]): Promise<SheetLot[]> {
  const recipe = solutes.map(({ substanceId, name }) => {
    const substance = findSubstance(substanceId);
    if (!substance)
      throw new DomainError(
        'wrong-state',
        `${name} is not in the catalogue's data; its batch can't be planned.`,
      );
    return substance;
  });
  const serving = ALL_SUBSTANCES.filter((bottle) =>
    recipe.some((substance) => canServeFor(substance, bottle)),
  );
  const lots = await LotModel.findAll({
    where: { substanceId: serving.map(({ id }) => id), balanceMicro: { [Op.gt]: 0 } },
  });
  const [places, substances, reserved] = await Promise.all([
    rowsById(
      PlaceModel,
      lots.map(({ placeId }) => placeId),
    ),
    rowsById(
      SubstanceModel,
      lots.map(({ substanceId }) => substanceId),
    ),
    reservedMicro(lots.map(({ id }) => id)),
  ]);
  return lots.flatMap((lot) => {
    const substance = findSubstance(lot.substanceId);
    if (!substance) return [];
    return [
      {
        id: lot.id,
        code: lot.code,
        unit: lot.unit,
        balanceMicro: Math.max(0, lot.balanceMicro - (reserved.get(lot.id) ?? 0)),
        expiresOn: lot.expiresOn,
        receivedOn: lot.receivedOn,
        held: lot.heldAt !== null || Boolean(substances.get(lot.substanceId)?.heldAt),
        substance,
        place: places.get(lot.placeId)?.name ?? '',
        assayPercent: lot.assayPercent,
        densityGPerMl: null,
      },
    ];
  });
}

/** What the materials can do as they are taken, before they are diluted: that is what hands and eyes meet. */
function materialHazards(solutes: readonly BatchSolute[]): HazardStatement[] {
  const classes = solutes.flatMap(({ substanceId, name }) =>
    (findSubstanceHazards(substanceId)?.classes ?? []).map((assigned) => ({
      class: assigned,
      because: `${name} as taken`,
    })),
  );
  return hazardStatements(classes);
}

/** Plans the sheet of a batch from what stands on the shelves now. */
export async function makeSheet(
  solution: SolutionModel,
  about: {
    readonly volumeMl: number;
    readonly makeOn: string;
    readonly conditions: readonly string[];
    readonly classification: Classification;
  },
): Promise<KeptSheet> {
  const solutes = await solutesOf(solution.id);
  if (solutes.length === 0)
    throw new DomainError('wrong-state', `${solution.name} has no solute; there is nothing to take.`);
  const [lots, equipment] = await Promise.all([lotsFor(solutes), EquipmentModel.findAll()]);
  const expected = expectedLook(solution.name, solutes);
  const plan = planBatchSheet({
    solution: {
      name: solution.name,
      solutes: solutes.flatMap(({ substanceId, molarity }) => {
        const substance = findSubstance(substanceId);
        return substance ? [{ substance, molarity, solubleMolarity: null }] : [];
      }),
      expected,
    },
    volumeMl: about.volumeMl,
    lots,
    equipment: equipment.map((item) => item.get({ plain: true })),
    tolerance: solution.toleranceClass,
    onDay: about.makeOn,
    hazards: [...about.classification.hazards, ...materialHazards(solutes)],
    conditions: about.conditions,
  });
  return {
    plan,
    solutes,
    classification: about.classification,
    expected,
    storageNote: solution.storageNote,
    shelfLifeDays: solution.sameDayOnly ? 0 : solution.shelfLifeDays,
  };
}
