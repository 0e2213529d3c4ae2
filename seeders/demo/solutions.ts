import type { ToleranceClass } from '@/lib/domain/quantities';
import { SolutionModel } from '@/models/solution';
import { SolutionSoluteModel } from '@/models/solution-solute';

type Recipe = readonly [
  name: string,
  solutes: readonly (readonly [substance: string, molarity: number])[],
  shelfLifeDays: number,
  tolerance?: ToleranceClass,
  note?: string,
];

/** Shelf lives are common practice of prep rooms; the storage notes likewise. */
const RECIPES: readonly Recipe[] = [
  ['Copper(II) sulfate 0.1 mol/L', [['copper-sulfate', 0.1]], 365],
  ['Copper(II) sulfate 0.05 mol/L', [['copper-sulfate', 0.05]], 365],
  ['Copper(II) nitrate 0.1 mol/L', [['copper-nitrate', 0.1]], 365],
  ['Ammonia 2 mol/L', [['ammonia-solution', 2]], 60, 'bench', 'Close tightly; loses strength.'],
  ['Ammonia 0.5 mol/L', [['ammonia-solution', 0.5]], 30, 'bench', 'Close tightly; loses strength.'],
  ['Ammonium chloride 1 mol/L', [['ammonium-chloride', 1]], 365],
  ['Silver nitrate 0.075 mol/L', [['silver-nitrate', 0.075]], 180, 'ordinary', 'Amber glass.'],
  ['Silver nitrate 0.05 mol/L', [['silver-nitrate', 0.05]], 180, 'ordinary', 'Amber glass.'],
  ['Silver nitrate 0.1000 mol/L standard', [['silver-nitrate', 0.1]], 90, 'analytical', 'Amber glass.'],
  [
    'Sodium cyanide 0.1 mol/L in alkali',
    [
      ['sodium-cyanide', 0.1],
      ['sodium-hydroxide', 0.01],
    ],
    7,
    'bench',
    'Locked; never near acid.',
  ],
  ['Hydrochloric acid 0.1 mol/L', [['hydrochloric-acid', 0.1]], 365],
  ['Hydrochloric acid 1 mol/L', [['hydrochloric-acid', 1]], 365],
  ['Hydrochloric acid 2 mol/L', [['hydrochloric-acid', 2]], 365],
  ['Nitric acid 0.1 mol/L', [['nitric-acid', 0.1]], 365],
  ['Nitric acid 1 mol/L', [['nitric-acid', 1]], 365],
  ['Sulfuric acid 0.5 mol/L', [['sulfuric-acid', 0.5]], 365],
  ['Ethanoic acid 0.1 mol/L', [['acetic-acid', 0.1]], 180],
  [
    'Sodium hydroxide 0.1 mol/L',
    [['sodium-hydroxide', 0.1]],
    60,
    'ordinary',
    'Plastic bottle; takes up carbon dioxide.',
  ],
  ['Sodium hydroxide 1 mol/L', [['sodium-hydroxide', 1]], 90, 'bench', 'Plastic bottle.'],
  ['Lead(II) nitrate 0.1 mol/L', [['lead-nitrate', 0.1]], 365],
  ['Potassium iodide 0.1 mol/L', [['potassium-iodide', 0.1]], 90, 'bench', 'Amber glass.'],
  ['Potassium iodide 0.5 mol/L', [['potassium-iodide', 0.5]], 90, 'bench', 'Amber glass.'],
  ['Sodium chloride 0.1 mol/L', [['sodium-chloride', 0.1]], 365],
  ['Potassium bromide 0.1 mol/L', [['potassium-bromide', 0.1]], 365],
  ['Sodium thiosulfate 0.1 mol/L', [['sodium-thiosulfate', 0.1]], 60, 'ordinary'],
  ['Sodium thiosulfate 0.5 mol/L', [['sodium-thiosulfate', 0.5]], 60],
  [
    'Iron(III) chloride 0.1 mol/L',
    [
      ['iron-iii-chloride', 0.1],
      ['hydrochloric-acid', 0.1],
    ],
    180,
  ],
  [
    'Iron(III) nitrate 0.002 mol/L',
    [
      ['iron-iii-nitrate', 0.002],
      ['nitric-acid', 0.05],
    ],
    60,
  ],
  ['Potassium thiocyanate 0.1 mol/L', [['potassium-thiocyanate', 0.1]], 180],
  ['Potassium thiocyanate 0.002 mol/L', [['potassium-thiocyanate', 0.002]], 60],
  ['Zinc sulfate 0.1 mol/L', [['zinc-sulfate', 0.1]], 365],
  ['Nickel(II) sulfate 0.1 mol/L', [['nickel-sulfate', 0.1]], 365],
  ['Cobalt(II) chloride 0.1 mol/L', [['cobalt-chloride', 0.1]], 365],
  ['Aluminium sulfate 0.05 mol/L', [['aluminium-sulfate', 0.05]], 365],
  ['Magnesium chloride 0.1 mol/L', [['magnesium-chloride', 0.1]], 365],
  ['Calcium chloride 0.1 mol/L', [['calcium-chloride', 0.1]], 365],
  ['Barium chloride 0.1 mol/L', [['barium-chloride', 0.1]], 365],
  ['Sodium sulfate 0.1 mol/L', [['sodium-sulfate', 0.1]], 365],
  ['Sodium carbonate 0.5 mol/L', [['sodium-carbonate', 0.5]], 180],
  ['Potassium chromate 0.05 mol/L', [['potassium-chromate', 0.05]], 365],
  ['Disodium EDTA 0.0100 mol/L', [['disodium-edta', 0.01]], 180, 'analytical'],
  [
    'Potassium hexacyanoferrate(II) 0.05 mol/L',
    [['potassium-ferrocyanide', 0.05]],
    30,
    'bench',
    'Amber glass; never heat with acid.',
  ],
  ['Potassium permanganate 0.02 mol/L', [['potassium-permanganate', 0.02]], 60, 'ordinary', 'Amber glass.'],
  [
    'Ethanoate buffer pH 4.7',
    [
      ['acetic-acid', 0.1],
      ['sodium-acetate', 0.1],
    ],
    60,
  ],
  [
    'Phosphate buffer pH 7',
    [
      ['potassium-dihydrogenphosphate', 0.025],
      ['disodium-hydrogenphosphate', 0.025],
    ],
    60,
  ],
];

/** @returns the recipes by name */
export async function seedSolutions(ownerId: string): Promise<Map<string, SolutionModel>> {
  const byName = new Map<string, SolutionModel>();
  for (const [name, solutes, shelfLifeDays, toleranceClass = 'bench', storageNote] of RECIPES) {
    const solution = await SolutionModel.create({
      name,
      ownerId,
      shelfLifeDays,
      toleranceClass,
      storageNote: storageNote ?? null,
    });
    await SolutionSoluteModel.bulkCreate(
      solutes.map(([substanceId, molarity], position) => ({
        solutionId: solution.id,
        position,
        substanceId,
        molarity,
      })),
    );
    byName.set(name, solution);
  }
  return byName;
}
