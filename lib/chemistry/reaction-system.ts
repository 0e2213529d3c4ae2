import { chargeOf, massOf, molarMass, withoutPhase } from './formula';
import { ALL_SPECIES, findReaction, findSpecies, formsOnTheBench, reactionsAmong } from './species-catalogue';
import { logKwShift, vantHoff } from './temperature';
import type { Reaction, SpeciationInput } from './types';

/** A reaction with what the calculation needs to know of its product. */
export interface SystemReaction extends Reaction {
  readonly charge: number;
  readonly ionSizePm: number | null;
}
export interface SystemComponent {
  readonly id: string;
  readonly charge: number;
  readonly ionSizePm: number | null;
}

/** A mixture as a set of components and reactions, at its temperature. */
export interface ReactionSystem {
  readonly components: readonly SystemComponent[];
  readonly aqueous: readonly SystemReaction[];
  readonly solids: readonly SystemReaction[];
  readonly gases: readonly SystemReaction[];
  /** Species whose constant was moved from 25 °C, and whether by table or by enthalpy. */
  readonly moved: readonly string[];
  /** Slow or inert species that were left out though their components are present. */
  readonly leftOut: readonly string[];
}

/** `CO2` and `CO2(g)` name the same gas. */
export function gasId(name: string): string {
  return name.endsWith('(g)') ? name : `${name}(g)`;
}

/**
 * Gathers the reactions that can matter and the components they are formed from.
 *
 * With the catalogue, H+ is always a component. With a given list, a component that no reaction mentions is
 * inert, and H+ takes part only where a reaction, a total or an open gas names it.
 * A component of amount zero that nothing can supply is left out with everything that contains it.
 */
export function buildSystem(input: SpeciationInput): ReactionSystem {
  const isCatalogue = input.reactions === 'catalogue';
  const suppressed = new Set(input.suppress);
  const openGases =
    input.headspace.kind === 'open' ? Object.keys(input.headspace.partialPressuresBar).map(gasId) : [];
  const present = new Set(
    Object.keys(input.amounts).filter((id) => id !== 'H2O' && (input.amounts[id] !== 0 || id === 'H+')),
  );
  if (isCatalogue) {
    present.add('H+');
    for (const gas of openGases)
      for (const id of Object.keys(findReaction(gas)?.stoich ?? {})) if (id !== 'H2O') present.add(id);
  }
  const offered: readonly Reaction[] =
    input.reactions === 'catalogue' ? catalogueReactions(present) : input.reactions;
  const kept = offered.filter(({ species }) => !suppressed.has(species));
  if (!isCatalogue)
    for (const { stoich } of kept) for (const id of Object.keys(stoich)) if (id !== 'H2O') present.add(id);

  const reactions = reachable(kept, present, input, openGases);
  const described = reactions.list.map((reaction) => describe(reaction, isCatalogue, input.temperatureC));
  const leftOut = isCatalogue
    ? reactionsAmong(present)
        .filter((reaction) => reaction.flags.includes('kinetically-inert'))
        .map(({ species }) => species)
    : [];
  return {
    components: [...reactions.present].map((id) => ({
      id,
      charge: speciesCharge(id),
      ionSizePm: findSpecies(id)?.ionSizePm ?? null,
    })),
    aqueous: described.filter(({ phase }) => phase === 'aq'),
    solids: described.filter(({ phase }) => phase === 's' || phase === 'l'),
    gases: described.filter(({ phase }) => phase === 'g'),
    moved:
      isCatalogue && input.temperatureC !== 25
        ? described.filter(({ species }) => isMoved(species)).map(({ species }) => species)
        : [],
    leftOut,
  };
}

function catalogueReactions(present: ReadonlySet<string>): Reaction[] {
  return reactionsAmong(present)
    .filter(formsOnTheBench)
    .map(({ species, stoich, logK }) => ({
      species,
      stoich,
      logK,
      phase: findSpecies(species)?.phase ?? 'aq',
    }));
}

/** Takes out, until nothing changes, components that are absent and what is formed from them. */
function reachable(
  reactions: readonly Reaction[],
  present: ReadonlySet<string>,
  input: SpeciationInput,
  openGases: readonly string[],
) {
  const left = new Set(present);
  let list = [...reactions];
  const isSupplied = (id: string) =>
    (input.amounts[id] ?? 0) !== 0 ||
    (id === 'H+' && (input.pH !== null || list.some(({ stoich }) => (stoich['H+'] ?? 0) < 0))) ||
    list.some(({ stoich, phase }) => phase === 'aq' && (stoich[id] ?? 0) < 0) ||
    openGases.some((gas) => (list.find(({ species }) => species === gas)?.stoich[id] ?? 0) !== 0);
  for (;;) {
    const absent = [...left].filter((id) => !isSupplied(id));
    if (absent.length === 0) return { present: left, list };
    for (const id of absent) left.delete(id);
    list = list.filter(({ stoich }) => !absent.some((id) => (stoich[id] ?? 0) !== 0));
  }
}

function isMoved(species: string): boolean {
  return species === 'OH-' || (findReaction(species)?.enthalpyKJ ?? null) !== null;
}

function describe(reaction: Reaction, isCatalogue: boolean, temperatureC: number): SystemReaction {
  const known = isCatalogue ? findSpecies(reaction.species) : null;
  return {
    ...reaction,
    logK: isCatalogue ? atTemperature(reaction, temperatureC) : reaction.logK,
    charge: known?.charge ?? speciesCharge(reaction.species),
    ionSizePm: known?.ionSizePm ?? null,
  };
}

function atTemperature({ species, logK }: Reaction, temperatureC: number): number {
  if (temperatureC === 25) return logK;
  if (species === 'OH-') return logK + logKwShift(temperatureC);
  const enthalpy = findReaction(species)?.enthalpyKJ ?? null;
  return enthalpy === null ? logK : vantHoff(logK, enthalpy, temperatureC);
}

function speciesCharge(id: string): number {
  return findSpecies(id)?.charge ?? chargeOf(id);
}

const massByCatalogueId = new Map(ALL_SPECIES.map(({ id, composition }) => [id, massOf(composition)]));

/** g/mol of a species; null where its id is a name and no formula. */
export function molarMassOf(id: string): number | null {
  const known = massByCatalogueId.get(id);
  if (known !== undefined) return known;
  try {
    return molarMass(withoutPhase(id));
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}
