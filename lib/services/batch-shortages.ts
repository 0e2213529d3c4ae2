import 'server-only';
import { formatISO, parseISO, subDays } from 'date-fns';
import { Op } from 'sequelize';
import { findSubstance } from '@/lib/chemistry/substances';
import { fromMicro } from '@/lib/domain/quantities';
import type { LedgerUnit } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import type { SheetShortage } from '@/lib/planning/batch-sheet-types';
import { write } from '@/models/db';
import { OfferModel } from '@/models/offer';
import { ShortageModel } from '@/models/shortage';
import { SubstanceModel } from '@/models/substance';
import { SupplierModel } from '@/models/supplier';
import { rowsById } from './lookup';
import { record } from './record';

/** Days between order and shelf where nobody offers the substance yet. */
const USUAL_LEAD_DAYS = 7;

/** What is missing for a batch that could not be planned. */
export interface MissingStock {
  readonly shortages: readonly SheetShortage[];
  readonly neededOn: string;
  readonly requestId: string;
}

/** The shortage in the unit the substance is counted in; where nothing stands there yet the sheet says grams. */
function countedIn(unit: LedgerUnit, shortage: SheetShortage): { unit: LedgerUnit; neededMicro: number } {
  const density = findSubstance(shortage.substanceId)?.densityGPerMl;
  if (shortage.unit === unit || !density) return { unit: shortage.unit, neededMicro: shortage.shortMicro };
  const factor = unit === 'mL' ? 1 / density : density;
  return { unit, neededMicro: Math.ceil(shortage.shortMicro * factor) };
}

async function leadDaysFor(substanceId: string): Promise<number> {
  const offers = await OfferModel.findAll({ where: { substanceId, active: true } });
  const suppliers = await rowsById(
    SupplierModel,
    offers.map(({ supplierId }) => supplierId),
  );
  const leads = [...suppliers.values()].filter(({ active }) => active).map(({ leadDays }) => leadDays);
  return leads.length === 0 ? USUAL_LEAD_DAYS : Math.min(...leads);
}

/** What is planned after all is short no longer; what is on order stays until it is received. */
export async function closeShortages(
  viewer: Viewer,
  requestIds: readonly string[],
  substanceIds: readonly string[],
): Promise<void> {
  const open = await ShortageModel.findAll({
    where: { requestId: [...requestIds], substanceId: [...substanceIds], state: 'open' },
  });
  for (const row of open) {
    await row.update({ state: 'covered' });
    await record(viewer, {
      subjectType: 'shortage',
      subjectId: row.id,
      subjectLabel: row.substanceId,
      action: 'covered',
      fromState: 'open',
      toState: 'covered',
      reason: 'A batch could be planned',
    });
  }
}

/** Opens a shortage for all that is missing, or raises the one that is already open for the same request. */
export async function openShortages(viewer: Viewer, missing: MissingStock): Promise<void> {
  await write(async () => {
    const substances = await rowsById(
      SubstanceModel,
      missing.shortages.map(({ substanceId }) => substanceId),
    );
    for (const shortage of missing.shortages) {
      const { substanceId } = shortage;
      const { unit, neededMicro } = countedIn(substances.get(substanceId)?.unit ?? shortage.unit, shortage);
      const open = await ShortageModel.findOne({
        where: { substanceId, requestId: missing.requestId, state: { [Op.ne]: 'covered' } },
      });
      if (open) {
        if (open.unit === unit && open.neededMicro < neededMicro) await open.update({ neededMicro });
        continue;
      }
      const leadDays = await leadDaysFor(substanceId);
      const orderBy = formatISO(subDays(parseISO(missing.neededOn), leadDays), { representation: 'date' });
      const row = await ShortageModel.create({
        substanceId,
        unit,
        neededMicro,
        neededOn: missing.neededOn,
        orderBy,
        state: 'open',
        requestId: missing.requestId,
      });
      await record(viewer, {
        subjectType: 'shortage',
        subjectId: row.id,
        subjectLabel: shortage.name,
        action: 'opened',
        toState: 'open',
        reason: `${fromMicro(neededMicro)} ${unit} short for ${missing.neededOn}`,
      });
    }
  });
}
