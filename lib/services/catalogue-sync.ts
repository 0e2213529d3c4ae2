import 'server-only';
import { ALL_SUBSTANCES } from '@/lib/chemistry/substances';
import { findSubstanceHazards } from '@/lib/hazards/tables';
import { write } from '@/models/db';
import { SubstanceModel } from '@/models/substance';

/**
 * Brings the substances of the data files into the database, where lots, offers and recipes refer to them.
 * Identity comes from the files; holds and low-stock points are local and stay.
 * @returns how many were added
 */
export async function syncCatalogue(): Promise<number> {
  return write(async () => {
    const known = new Map((await SubstanceModel.findAll()).map((row) => [row.id, row]));
    let added = 0;
    for (const substance of ALL_SUBSTANCES) {
      const hazards = findSubstanceHazards(substance.id);
      const identity = {
        name: substance.name,
        cas: substance.cas,
        formula: substance.formula,
        molarMassGPerMol: Number.isFinite(substance.molarMassGPerMol) ? substance.molarMassGPerMol : null,
        form: substance.form,
        unit: substance.form === 'solid' ? ('g' as const) : ('mL' as const),
        storageGroup: hazards?.storageGroup ?? 'general',
        restricted: hazards?.restricted ?? false,
        searchText: `${substance.name} ${substance.formula} ${substance.cas}`.toLowerCase(),
      };
      const row = known.get(substance.id);
      if (row) await row.update(identity);
      else {
        await SubstanceModel.create({ id: substance.id, ...identity });
        added += 1;
      }
    }
    return added;
  });
}
