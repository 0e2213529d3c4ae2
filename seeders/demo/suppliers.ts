import { toMicro } from '@/lib/domain/quantities';
import { BudgetModel } from '@/models/budget';
import { OfferModel } from '@/models/offer';
import { SubstanceModel } from '@/models/substance';
import { SupplierModel } from '@/models/supplier';

const SUPPLIERS = [
  {
    name: 'Fenwold Reagents',
    email: 'orders@fenwold.example',
    accountCode: 'LARK-201',
    leadDays: 4,
    minimumOrderMinor: 40_00,
    carriageMinor: 9_50,
    hazardSurchargeMinor: 15_00,
  },
  {
    name: 'Saltmarsh Supply',
    email: 'sales@saltmarsh.example',
    accountCode: '77-0412',
    leadDays: 7,
    minimumOrderMinor: 25_00,
    carriageMinor: 6_00,
    hazardSurchargeMinor: 22_00,
  },
  {
    name: 'Northgate Laboratory Store',
    email: 'desk@northgate.example',
    accountCode: 'LKM',
    leadDays: 2,
    minimumOrderMinor: 60_00,
    carriageMinor: 14_00,
    hazardSurchargeMinor: 12_00,
  },
];

/** Prices in minor units per pack at the first supplier; invented. */
const PRICES: Readonly<Record<string, readonly (readonly [pack: number, priceMinor: number])[]>> = {
  'silver-nitrate': [
    [5, 21_80],
    [25, 84_00],
    [100, 298_00],
  ],
  'copper-sulfate': [
    [250, 9_40],
    [1000, 24_50],
  ],
  'nickel-sulfate': [
    [100, 12_90],
    [500, 41_00],
  ],
  'cobalt-chloride': [
    [25, 18_20],
    [100, 52_00],
  ],
  'potassium-iodide': [
    [100, 19_60],
    [500, 78_00],
  ],
  'ammonia-solution': [
    [1000, 11_20],
    [2500, 22_40],
  ],
};
const USUAL_SOLID = [
  [100, 8_90],
  [500, 27_50],
] as const;
const USUAL_LIQUID = [
  [500, 10_40],
  [2500, 34_00],
] as const;
/** What each supplier asks against the first. */
const PRICE_FACTORS = [1, 0.93, 1.12];
const HAZARDOUS_GROUPS = new Set([
  'acid_inorganic',
  'acid_oxidising',
  'acid_organic',
  'base',
  'oxidiser',
  'flammable',
  'toxic',
  'cyanide',
  'sulfide',
  'water_reactive',
  'restricted',
]);

/** Three suppliers, their packs, and a budget for the year. */
export async function seedSuppliers(): Promise<SupplierModel[]> {
  const suppliers = await SupplierModel.bulkCreate(SUPPLIERS);
  const substances = await SubstanceModel.findAll({ order: [['id', 'ASC']] });
  const offers = substances
    .filter(({ id }) => id !== 'deionised-water')
    .flatMap((substance, index) =>
      suppliers.flatMap((supplier, which) => {
        if ((index + which) % 4 === 3 && !PRICES[substance.id]) return [];
        const packs = PRICES[substance.id] ?? (substance.unit === 'mL' ? USUAL_LIQUID : USUAL_SOLID);
        return packs.map(([pack, priceMinor]) => ({
          supplierId: supplier.id,
          substanceId: substance.id,
          stockNumber: `${supplier.name.slice(0, 2).toUpperCase()}-${1000 + index * 7}-${pack}`,
          packMicro: toMicro(pack),
          unit: substance.unit,
          priceMinor: Math.round(priceMinor * (PRICE_FACTORS[which] ?? 1)),
          hazardous: HAZARDOUS_GROUPS.has(substance.storageGroup),
        }));
      }),
    );
  await OfferModel.bulkCreate(offers);
  const year = new Date().getFullYear();
  await BudgetModel.bulkCreate([
    { name: 'Teaching reagents', year, amountMinor: 9_000_00, currency: 'GBP' },
    { name: 'Research reserve', year, amountMinor: 1_500_00, currency: 'GBP' },
  ]);
  return suppliers;
}
