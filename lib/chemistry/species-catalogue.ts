import reactionData from './data/reactions.json';
import speciesData from './data/species.json';
import type { Composition } from './formula';
import type { Phase } from './types';

export interface Species {
  readonly id: string;
  readonly name: string;
  readonly phase: Phase;
  readonly charge: number;
  readonly composition: Composition;
  readonly colour: string;
  /** sRGB impression, from memory of trade descriptions. */
  readonly hex: string;
  readonly isMaster: boolean;
  /** Kielland's parameter; absent for neutral species. */
  readonly ionSizePm: number | null;
  readonly ionSizeSource: string | null;
  readonly note: string | null;
}

export interface ConstantAlternative {
  readonly logK: number;
  /** mol/L; null where the source does not say. */
  readonly ionicStrength: number | null;
  readonly source: string;
}

/** Formation of a species from the masters, with where the constant comes from. */
export interface CatalogueReaction {
  readonly species: string;
  readonly stoich: Readonly<Record<string, number>>;
  readonly logK: number;
  readonly ionicStrength: number;
  readonly enthalpyKJ: number | null;
  readonly stepwiseLogK: number | null;
  readonly source: string;
  readonly alternatives: readonly ConstantAlternative[];
  readonly flags: readonly string[];
  readonly note: string | null;
}

interface RawSpecies {
  id: string;
  name: string;
  phase: string;
  charge: number;
  composition: Record<string, number | undefined>;
  colour: string;
  hex: string;
  master?: boolean;
  ionSizePm?: number;
  ionSizeSource?: string;
  note?: string;
}
interface RawReaction {
  species: string;
  stoich: Record<string, number | undefined>;
  logK: number;
  source: number;
  ionicStrength?: number | null;
  enthalpyKJ?: number;
  stepwiseLogK?: number;
  alternatives?: { logK: number; ionicStrength?: number | null; source: number }[];
  flags?: string[];
  note?: string;
}

const sources: readonly string[] = reactionData.sources;
const sourceText = (index: number) => sources[index] ?? 'not stated';

export const ALL_SPECIES: readonly Species[] = (speciesData.species as RawSpecies[]).map((raw) => ({
  id: raw.id,
  name: raw.name,
  phase: raw.phase as Phase,
  charge: raw.charge,
  composition: raw.composition as Composition,
  colour: raw.colour,
  hex: raw.hex,
  isMaster: raw.master ?? false,
  ionSizePm: raw.ionSizePm ?? null,
  ionSizeSource: raw.ionSizeSource ?? null,
  note: raw.note ?? null,
}));

export const ALL_REACTIONS: readonly CatalogueReaction[] = (reactionData.reactions as RawReaction[]).map(
  (raw) => ({
    species: raw.species,
    stoich: raw.stoich as Readonly<Record<string, number>>,
    logK: raw.logK,
    ionicStrength: raw.ionicStrength ?? 0,
    enthalpyKJ: raw.enthalpyKJ ?? null,
    stepwiseLogK: raw.stepwiseLogK ?? null,
    source: sourceText(raw.source),
    alternatives: (raw.alternatives ?? []).map(({ logK, ionicStrength, source }) => ({
      logK,
      ionicStrength: ionicStrength === undefined ? 0 : ionicStrength,
      source: sourceText(source),
    })),
    flags: raw.flags ?? [],
    note: raw.note ?? null,
  }),
);

/** What each flag of a reaction means, in a sentence. */
export const FLAG_MEANINGS: Readonly<Record<string, string>> = reactionData.flags;

const speciesById = new Map(ALL_SPECIES.map((species) => [species.id, species]));
const reactionBySpecies = new Map(ALL_REACTIONS.map((reaction) => [reaction.species, reaction]));

export function findSpecies(id: string): Species | null {
  return speciesById.get(id) ?? null;
}
export function findReaction(species: string): CatalogueReaction | null {
  return reactionBySpecies.get(species) ?? null;
}

/** Components an amount can be given for: every master but water. */
export function isMasterComponent(id: string): boolean {
  return id !== 'H2O' && (speciesById.get(id)?.isMaster ?? false);
}

/** Flags of species that do not come about when solutions are poured together at room temperature. */
const NOT_ON_THE_BENCH = [
  'off-by-default',
  'does-not-form-on-bench',
  'needs-heat-or-ageing',
  'kinetically-inert',
  'ill-defined',
];

export function formsOnTheBench(reaction: CatalogueReaction): boolean {
  return !reaction.flags.some((flag) => NOT_ON_THE_BENCH.includes(flag));
}

/** Masters a reaction asks for, besides water and H+, which are always there. */
function mastersOf({ stoich }: CatalogueReaction): string[] {
  return Object.keys(stoich).filter((id) => id !== 'H2O' && id !== 'H+');
}

interface FiledReaction {
  readonly reaction: CatalogueReaction;
  readonly masters: readonly string[];
}

/** The reactions filed under the first master they ask for, in the order of the catalogue. */
const reactionsByMaster = ALL_REACTIONS.reduce((files, reaction) => {
  const masters = mastersOf(reaction);
  const file = files.get(masters[0] ?? '') ?? [];
  file.push({ reaction, masters });
  return files.set(masters[0] ?? '', file);
}, new Map<string, FiledReaction[]>());

/** The reactions whose masters are all among the given components; H+ and water are always there. */
export function reactionsAmong(components: ReadonlySet<string>): CatalogueReaction[] {
  return ['', ...components].flatMap((id) =>
    (reactionsByMaster.get(id) ?? [])
      .filter(({ masters }) => masters.every((master) => components.has(master)))
      .map(({ reaction }) => reaction),
  );
}
