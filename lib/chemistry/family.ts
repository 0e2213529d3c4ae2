import { componentAmounts } from './mixing';
import { PreparedSystem } from './prepared-system';
import type { SolvedPoint } from './prepared-system';
import type { MixturePoint } from './system-problem';
import type { MixInput, NotConverged, SpeciationInput } from './types';

/** Mixtures along one variable x: reactions, temperature and vessel stay, volume and amounts are linear in x. */
export interface MixtureFamily {
  readonly settings: Omit<SpeciationInput, keyof MixturePoint>;
  at(x: number): MixturePoint;
}

function settingsOf({ activity, temperatureC }: MixInput): MixtureFamily['settings'] {
  return { reactions: 'catalogue', suppress: [], activity, temperatureC, headspace: { kind: 'none' } };
}

function portionOf(mix: MixInput, index: number): MixInput['portions'][number] {
  const portion = mix.portions[index];
  if (!portion) throw new RangeError(`There is no portion ${index}`);
  return portion;
}

function pointOf({ portions }: Pick<MixInput, 'portions'>): MixturePoint {
  const amounts: Record<string, number> = {};
  for (const portion of portions) {
    for (const [id, mol] of Object.entries(componentAmounts(portion))) amounts[id] = (amounts[id] ?? 0) + mol;
  }
  return { volumeL: portions.reduce((sum, { volumeMl }) => sum + volumeMl, 0) / 1000, amounts, pH: null };
}

/**
 * The mix with another volume of one portion.
 * @param portion - its place in the list; x is its volume in mL
 * @throws RangeError where there is no such portion
 */
export function volumeFamily(mix: MixInput, portion: number): MixtureFamily {
  const varied = portionOf(mix, portion);
  const others = mix.portions.filter((_, index) => index !== portion);
  return {
    settings: settingsOf(mix),
    at: (volumeMl) => pointOf({ portions: volumeMl > 0 ? [...others, { ...varied, volumeMl }] : others }),
  };
}

/**
 * The mix with another strength of one solute.
 * @param solute - its place in the portion; x is its molarity
 * @throws RangeError where there is no such portion or solute
 */
export function strengthFamily(mix: MixInput, portion: number, solute: number): MixtureFamily {
  const varied = portionOf(mix, portion);
  if (!varied.solutes[solute]) throw new RangeError(`There is no solute ${solute}`);
  const withStrength = (molarity: number) => ({
    ...varied,
    solutes: varied.solutes.map((each, index) => (index === solute ? { ...each, molarity } : each)),
  });
  return {
    settings: settingsOf(mix),
    at: (molarity) =>
      pointOf({
        portions: mix.portions.map((each, index) => (index === portion ? withStrength(molarity) : each)),
      }),
  };
}

/** One litre more or less of everything else, with another amount of one component; x is mol. */
export function totalFamily(input: SpeciationInput, component: string): MixtureFamily {
  const { volumeL, amounts, pH, ...settings } = input;
  return { settings, at: (mol) => ({ volumeL, amounts: { ...amounts, [component]: mol }, pH }) };
}

/** The same mixture at another held pH. */
export function phFamily(input: SpeciationInput): MixtureFamily {
  const { volumeL, amounts, pH: _, ...settings } = input;
  return { settings, at: (pH) => ({ volumeL, amounts, pH }) };
}

/** Solves points of a family, each from the last one with the same components. */
export class FamilySolver {
  private readonly prepared = new Map<string, PreparedSystem>();

  constructor(readonly family: MixtureFamily) {}

  /** @throws RangeError for a point that `speciate` would refuse, such as one of no volume */
  solve(x: number): SolvedPoint | NotConverged {
    const point = this.family.at(x);
    const key = Object.keys(point.amounts)
      .filter((id) => point.amounts[id] !== 0)
      .sort()
      .join(' ');
    let prepared = this.prepared.get(key);
    if (!prepared) {
      prepared = new PreparedSystem({ ...this.family.settings, ...point });
      this.prepared.set(key, prepared);
    }
    if (!(point.volumeL > 0)) throw new RangeError('The volume must be positive');
    return prepared.solve(point);
  }

  /** d amounts and d volume per unit of x: the family is linear in it. */
  slope(
    from: number,
    to: number,
  ): { readonly amounts: Readonly<Record<string, number>>; readonly volumeL: number; readonly pH: number } {
    const [start, end] = [this.family.at(from), this.family.at(to)];
    const ids = new Set([...Object.keys(start.amounts), ...Object.keys(end.amounts)]);
    const per = (a: number, b: number) => (b - a) / (to - from);
    return {
      amounts: Object.fromEntries(
        [...ids].map((id) => [id, per(start.amounts[id] ?? 0, end.amounts[id] ?? 0)]),
      ),
      volumeL: per(start.volumeL, end.volumeL),
      pH: per(start.pH ?? 0, end.pH ?? 0),
    };
  }
}
