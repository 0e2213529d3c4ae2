import { ALL_SUBSTANCES } from '@/lib/chemistry/substances';
import type { Reaction, SpeciationInput } from '@/lib/chemistry/types';

/** Random chemical systems from a seed: the same seed gives the same systems on every machine. */
export class SystemSource {
  private state: number;

  constructor(seed: number) {
    this.state = seed >>> 0;
  }

  /** Uniform in [0, 1): the mulberry32 generator (public domain). */
  uniform(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0;
    let t = this.state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.uniform();
  }

  /** A whole number from low to high, both included. */
  whole(low: number, high: number): number {
    return Math.floor(this.between(low, high + 1));
  }

  isChosen(chance: number): boolean {
    return this.uniform() < chance;
  }

  pick<T>(items: readonly T[]): T {
    const item = items[this.whole(0, items.length - 1)];
    if (item === undefined) throw new RangeError('There is nothing to pick from');
    return item;
  }
}

/** A binary fraction, so that its small multiples are exact. */
function exactAmount(source: SystemSource): number {
  return source.whole(1, 4095) * 2 ** -source.whole(12, 24);
}

const IDEAL: Omit<SpeciationInput, 'amounts' | 'reactions'> = {
  volumeL: 1,
  pH: null,
  suppress: [],
  activity: 'ideal',
  temperatureC: 25,
  headspace: { kind: 'none' },
};

/**
 * A made-up system of metals, ligands and protons that strains the digits: log β up to 60, up to eight solids,
 * totals over five powers of ten, and in two of five systems a ligand at exactly the amount that a complex needs.
 */
export function strainedSystem(source: SystemSource): SpeciationInput {
  const metals = Array.from({ length: source.whole(1, 4) }, (_, index) => ({
    id: `M${'abcd'[index]}+${(index % 3) + 1}`,
    charge: (index % 3) + 1,
  }));
  const ligands = Array.from({ length: source.whole(1, 4) }, (_, index) => ({
    id: `L${'pqrs'[index]}${['', '-', '-2', '-'][index]}`,
    charge: -([0, 1, 2, 1][index] ?? 0),
  }));
  const hasProtons = source.isChosen(0.6);
  const reactions: Reaction[] = [];
  const amounts: Record<string, number> = {};
  const named = (stem: string, charge: number) =>
    `${stem}${charge === 0 ? '' : charge > 0 ? `+${charge}` : `${charge}`}`;
  for (const { id } of [...metals, ...ligands]) amounts[id] = exactAmount(source);

  for (const metal of metals) {
    for (const ligand of ligands) {
      if (!source.isChosen(0.7)) continue;
      const most = source.whole(1, 6);
      const strength = source.between(1, 60 / most);
      let logK = 0;
      for (let count = 1; count <= most; count += 1) {
        logK = Math.min(60, logK + strength * source.between(0.6, 1));
        if (source.isChosen(0.85)) {
          const charge = metal.charge + count * ligand.charge;
          reactions.push({
            species: named(`${metal.id.slice(0, 2)}${ligand.id.slice(0, 2)}${count}`, charge),
            phase: 'aq',
            stoich: { [metal.id]: 1, [ligand.id]: count },
            logK,
          });
        }
      }
      if (source.isChosen(0.4)) amounts[ligand.id] = (amounts[metal.id] ?? 0) * source.whole(1, most);
    }
  }
  if (hasProtons) {
    amounts['H+'] = source.isChosen(0.3) ? 0 : (source.isChosen(0.5) ? 1 : -1) * exactAmount(source);
    reactions.push({ species: 'OH-', phase: 'aq', stoich: { 'H+': -1 }, logK: -14 });
    for (const ligand of ligands) {
      let logK = 0;
      for (let count = 1; count <= source.whole(0, 3); count += 1) {
        logK += source.between(1, 13);
        reactions.push({
          species: named(`H${count}${ligand.id.slice(0, 2)}`, ligand.charge + count),
          phase: 'aq',
          stoich: { 'H+': count, [ligand.id]: 1 },
          logK,
        });
      }
    }
    for (const metal of metals) {
      for (let count = 1; count <= source.whole(0, 4); count += 1) {
        reactions.push({
          species: named(`${metal.id.slice(0, 2)}OH${count}`, metal.charge - count),
          phase: 'aq',
          stoich: { [metal.id]: 1, 'H+': -count },
          logK: -count * source.between(4, 13),
        });
      }
    }
  }
  addSolids(source, metals, ligands, hasProtons, reactions);
  return { ...IDEAL, volumeL: source.pick([1, 0.5, 0.065]), amounts, reactions };
}

type Ion = { readonly id: string; readonly charge: number };

function addSolids(
  source: SystemSource,
  metals: readonly Ion[],
  ligands: readonly Ion[],
  hasProtons: boolean,
  reactions: Reaction[],
): void {
  const most = source.whole(0, 8);
  for (let count = 0; count < most; count += 1) {
    const metal = source.pick(metals);
    if (hasProtons && source.isChosen(0.3)) {
      reactions.push({
        species: `S${count}(s)`,
        phase: 's',
        stoich: { [metal.id]: 1, 'H+': -metal.charge },
        logK: -metal.charge * source.between(3, 12),
      });
      continue;
    }
    const ligand = source.pick(ligands);
    const stoich = { [metal.id]: source.whole(1, 2), [ligand.id]: source.whole(1, 3) };
    reactions.push({ species: `S${count}(s)`, phase: 's', stoich, logK: source.between(4, 40) });
  }
}

const REACTING = ALL_SUBSTANCES.filter(({ releases }) => releases !== null);

/** Two to five catalogue substances, 0.1 mmol/L to 1 mol/L each, as a bench mixture would hold them. */
export function benchMixture(source: SystemSource): SpeciationInput {
  const amounts: Record<string, number> = {};
  for (let count = source.whole(2, 5); count > 0; count -= 1) {
    const molarity = 10 ** source.between(-4, 0);
    for (const [id, share] of Object.entries(source.pick(REACTING).releases ?? {})) {
      if (id !== 'H2O') amounts[id] = (amounts[id] ?? 0) + share * molarity;
    }
  }
  return { ...IDEAL, amounts, reactions: 'catalogue', activity: 'davies' };
}
