import { addDays, formatISO } from 'date-fns';
import { toMicro } from '@/lib/domain/quantities';
import type { LedgerUnit } from '@/lib/domain/quantities';
import { nextCode } from '@/lib/services/codes';
import { move } from '@/lib/services/ledger';
import { LotModel } from '@/models/lot';
import type { PlaceModel } from '@/models/place';
import { SubstanceModel } from '@/models/substance';
import type { SupplierModel } from '@/models/supplier';
import type { UserModel } from '@/models/user';

const PLACE_OF_GROUP: Readonly<Record<string, string>> = {
  acid_inorganic: 'Acid cabinet, top',
  acid_organic: 'Acid cabinet, base',
  acid_oxidising: 'Oxidising acids',
  base: 'Alkali cabinet',
  oxidiser: 'Oxidiser shelf',
  flammable: 'Flammables cabinet',
  toxic: 'Poisons cupboard',
  cyanide: 'Cyanide safe',
  sulfide: 'Sulfide box',
  water_reactive: 'Water-reactive tin',
  restricted: 'Restricted cupboard',
};

interface Standing {
  readonly amount: number;
  readonly receivedDaysAgo: number;
  readonly expiresInDays: number;
  readonly assayPercent?: number;
}

/** What stands out on the shelves: two lots of one thing, short ones, one near its date, one weak. */
const NOTABLE: Readonly<Record<string, readonly Standing[]>> = {
  'copper-sulfate': [
    { amount: 180, receivedDaysAgo: 400, expiresInDays: 40, assayPercent: 98.6 },
    { amount: 500, receivedDaysAgo: 60, expiresInDays: 900, assayPercent: 99.4 },
  ],
  'silver-nitrate': [{ amount: 38, receivedDaysAgo: 120, expiresInDays: 420, assayPercent: 99.9 }],
  'sodium-cyanide': [{ amount: 25, receivedDaysAgo: 200, expiresInDays: 500 }],
  'ammonia-solution': [{ amount: 2300, receivedDaysAgo: 90, expiresInDays: 90, assayPercent: 23.4 }],
  'potassium-iodide': [{ amount: 30, receivedDaysAgo: 500, expiresInDays: 12 }],
  'nickel-sulfate': [{ amount: 4, receivedDaysAgo: 700, expiresInDays: 200 }],
  'cobalt-chloride': [{ amount: 6.5, receivedDaysAgo: 640, expiresInDays: 150 }],
  'iron-ii-sulfate': [{ amount: 250, receivedDaysAgo: 800, expiresInDays: -20, assayPercent: 94.1 }],
  'sodium-hydroxide': [{ amount: 900, receivedDaysAgo: 100, expiresInDays: 600, assayPercent: 97.2 }],
  'hydrochloric-acid': [{ amount: 2100, receivedDaysAgo: 80, expiresInDays: 500 }],
  'deionised-water': [],
};

/** Never bought by the demo college. */
const ABSENT = new Set([
  'mercury-chloride',
  'mercury-nitrate',
  'cadmium-nitrate',
  'sodium-azide',
  'perchloric-acid',
]);

const day = (offset: number): string => formatISO(addDays(new Date(), offset), { representation: 'date' });

/** One or more lots of nearly every substance, each begun by a line of the ledger. */
export async function seedStock(
  prep: UserModel,
  places: ReadonlyMap<string, PlaceModel>,
  suppliers: readonly SupplierModel[],
): Promise<void> {
  const substances = await SubstanceModel.findAll({ order: [['id', 'ASC']] });
  for (const [index, substance] of substances.entries()) {
    if (ABSENT.has(substance.id)) continue;
    const usual: Standing = {
      amount: substance.unit === 'mL' ? 1000 : index % 3 === 0 ? 100 : 500,
      receivedDaysAgo: 30 + ((index * 37) % 500),
      expiresInDays: 120 + ((index * 53) % 900),
    };
    for (const standing of NOTABLE[substance.id] ?? [usual])
      await seedLot(prep, places, suppliers, substance, standing, index);
  }
}

async function seedLot(
  prep: UserModel,
  places: ReadonlyMap<string, PlaceModel>,
  suppliers: readonly SupplierModel[],
  substance: SubstanceModel,
  standing: Standing,
  index: number,
): Promise<void> {
  const general = index % 2 === 0 ? 'General salts A' : 'General salts B';
  const place = places.get(PLACE_OF_GROUP[substance.storageGroup] ?? general);
  if (!place) throw new Error(`No place for ${substance.storageGroup}`);
  const unit: LedgerUnit = substance.unit;
  const lot = await LotModel.create({
    code: await nextCode('lot'),
    substanceId: substance.id,
    supplierId: suppliers[index % suppliers.length]?.id ?? null,
    lotNumber: `${String.fromCharCode(65 + (index % 26))}${10_000 + index * 73}`,
    assayPercent: standing.assayPercent ?? null,
    unit,
    receivedOn: day(-standing.receivedDaysAgo),
    openedOn: index % 2 === 0 ? day(-Math.floor(standing.receivedDaysAgo / 2)) : null,
    expiresOn: day(standing.expiresInDays),
    placeId: place.id,
  });
  await move(prep, {
    lotId: lot.id,
    kind: 'received',
    amountMicro: toMicro(standing.amount),
    reason: 'Opening count',
  });
}
