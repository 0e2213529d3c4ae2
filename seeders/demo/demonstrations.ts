import { DemonstrationModel } from '@/models/demonstration';
import { DemonstrationPortionModel } from '@/models/demonstration-portion';
import type { SolutionModel } from '@/models/solution';

type Pour = readonly [
  name: string,
  outcome: string,
  vesselMl: number,
  portions: readonly (readonly [solution: string, volumeMl: number])[],
];

const POURS: readonly Pour[] = [
  [
    'Copper hydroxide to deep blue ammine',
    'A pale blue precipitate that redissolves to a deep blue solution.',
    250,
    [
      ['Copper(II) sulfate 0.1 mol/L', 50],
      ['Ammonia 2 mol/L', 60],
    ],
  ],
  [
    'Silver chloride, dissolved by ammonia',
    'A white precipitate that clears.',
    100,
    [
      ['Silver nitrate 0.05 mol/L', 10],
      ['Sodium chloride 0.1 mol/L', 5],
      ['Ammonia 2 mol/L', 30],
    ],
  ],
  [
    'Silver bromide, dissolved by thiosulfate',
    'A cream precipitate that clears.',
    100,
    [
      ['Silver nitrate 0.05 mol/L', 10],
      ['Potassium bromide 0.1 mol/L', 5],
      ['Sodium thiosulfate 0.5 mol/L', 20],
    ],
  ],
  [
    'Silver into its cyanide complex',
    'A white precipitate that clears in excess.',
    100,
    [
      ['Silver nitrate 0.075 mol/L', 25],
      ['Sodium cyanide 0.1 mol/L in alkali', 40],
    ],
  ],
  [
    'Golden rain',
    'Yellow crystals on cooling.',
    250,
    [
      ['Lead(II) nitrate 0.1 mol/L', 50],
      ['Potassium iodide 0.1 mol/L', 100],
    ],
  ],
  [
    'Iron thiocyanate, blood red',
    'A deep red solution.',
    250,
    [
      ['Iron(III) nitrate 0.002 mol/L', 50],
      ['Potassium thiocyanate 0.002 mol/L', 50],
    ],
  ],
  [
    'Zinc hydroxide, both ways',
    'A white precipitate that clears in excess alkali.',
    100,
    [
      ['Zinc sulfate 0.1 mol/L', 20],
      ['Sodium hydroxide 1 mol/L', 30],
    ],
  ],
  [
    'Aluminium hydroxide, both ways',
    'A white jelly that clears in excess alkali.',
    100,
    [
      ['Aluminium sulfate 0.05 mol/L', 20],
      ['Sodium hydroxide 1 mol/L', 15],
    ],
  ],
  [
    'Nickel to its blue ammine',
    'Green to blue.',
    250,
    [
      ['Nickel(II) sulfate 0.1 mol/L', 50],
      ['Ammonia 2 mol/L', 60],
    ],
  ],
  [
    'Barium sulfate',
    'A dense white precipitate.',
    100,
    [
      ['Barium chloride 0.1 mol/L', 20],
      ['Sodium sulfate 0.1 mol/L', 20],
    ],
  ],
  [
    'Silver chromate indicator',
    'A brick-red precipitate.',
    100,
    [
      ['Silver nitrate 0.05 mol/L', 20],
      ['Potassium chromate 0.05 mol/L', 10],
    ],
  ],
  [
    'Prussian blue',
    'A deep blue colloid.',
    100,
    [
      ['Iron(III) chloride 0.1 mol/L', 10],
      ['Potassium hexacyanoferrate(II) 0.05 mol/L', 10],
    ],
  ],
];

/** @returns the demonstrations by name */
export async function seedDemonstrations(
  ownerId: string,
  solutions: ReadonlyMap<string, SolutionModel>,
): Promise<Map<string, DemonstrationModel>> {
  const byName = new Map<string, DemonstrationModel>();
  for (const [name, outcomeWanted, vesselMl, portions] of POURS) {
    const demonstration = await DemonstrationModel.create({ name, outcomeWanted, vesselMl, ownerId });
    await DemonstrationPortionModel.bulkCreate(
      portions.map(([solution, volumeMl], position) => {
        const solutionId = solutions.get(solution)?.id;
        if (!solutionId) throw new Error(`No recipe is called ${solution}`);
        return { demonstrationId: demonstration.id, position, solutionId, volumeMl };
      }),
    );
    byName.set(name, demonstration);
  }
  return byName;
}
