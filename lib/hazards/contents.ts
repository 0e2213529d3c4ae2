import { findSubstance } from '../chemistry/substances';
import type { CatalogueSubstance } from '../chemistry/substances';
import { findSubstanceHazards, INHERITS } from './tables';
import type { BottleContent } from './types';

/** One solute of a bottle with the groups it counts in at this strength. */
export interface ScreenedSolute {
  readonly substance: CatalogueSubstance;
  readonly molarity: number;
  readonly amountMol: number;
  readonly groups: ReadonlySet<string>;
}
export interface ScreenedBottle {
  readonly label: string;
  readonly volumeMl: number;
  readonly solutes: readonly ScreenedSolute[];
  /** Substances for which no hazard data are held. */
  readonly unknown: readonly string[];
}

/** Acids count as concentrated from here, mol/L: strong enough to boil or splash on dilution. Thresholds are ours. */
const CONCENTRATED_FROM: Readonly<Record<string, number>> = {
  'sulfuric-acid': 9,
  'nitric-acid': 8,
  'hydrochloric-acid': 8,
  'phosphoric-acid': 10,
  'acetic-acid': 10,
  'formic-acid': 10,
  'perchloric-acid': 6,
};
/** About 75 % by mass. */
const DEHYDRATING_SULFURIC_FROM = 12.8;
/** Below this nitric and perchloric acids act as ordinary acids at room temperature. */
const OXIDISING_ACID_FROM = 2;
/** Below this hydrochloric acid gives no more chlorine or vapour than its chloride would. */
const CHLORIDE_ACID_FROM = 0.5;
/** Nitrates count as oxidisers when solid or strong. */
const OXIDISING_NITRATE_FROM = 2;

/** Reactive groups of a substance in solution at a strength, with those they inherit from. */
export function groupsAt(substanceId: string, molarity: number): Set<string> {
  const groups = new Set(findSubstanceHazards(substanceId)?.groups ?? []);
  if (molarity < (CONCENTRATED_FROM[substanceId] ?? Infinity)) groups.delete('concentrated_acid');
  if (molarity < DEHYDRATING_SULFURIC_FROM) groups.delete('sulfuric_conc');
  if (molarity < OXIDISING_NITRATE_FROM) groups.delete('nitrate_ox');
  if (groups.has('acid_mineral_ox') && molarity < OXIDISING_ACID_FROM) {
    groups.delete('acid_mineral_ox');
    groups.add('acid_mineral_nonox');
  }
  if (molarity < CHLORIDE_ACID_FROM) groups.delete('hydrochloric_acid');
  for (const group of [...groups]) for (const parent of INHERITS[group] ?? []) groups.add(parent);
  return groups;
}

/** @throws RangeError for a substance that is not in the catalogue */
export function screenedBottle({ label, volumeMl, solutes }: BottleContent): ScreenedBottle {
  const unknown: string[] = [];
  const screened = solutes.map(({ substance: idOrCas, molarity }) => {
    const substance = findSubstance(idOrCas);
    if (!substance) throw new RangeError(`${idOrCas} is not in the catalogue`);
    if (!findSubstanceHazards(substance.id)) unknown.push(substance.name);
    return {
      substance,
      molarity,
      amountMol: (molarity * volumeMl) / 1000,
      groups: groupsAt(substance.id, molarity),
    };
  });
  return { label, volumeMl, solutes: screened, unknown };
}

/** Every group of a bottle; what is dissolved stands in water. */
export function groupsOf(bottle: ScreenedBottle): Set<string> {
  return new Set(['water', ...bottle.solutes.flatMap(({ groups }) => [...groups])]);
}
