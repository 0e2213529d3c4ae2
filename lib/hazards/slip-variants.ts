import { ALL_SUBSTANCES, findSubstance } from '../chemistry/substances';
import type { CatalogueSubstance } from '../chemistry/substances';
import { figure } from './figures';
import { findSubstanceHazards } from './tables';
import type { BottleContent, Slip } from './types';

/** One way of handling the portions wrongly, before it is screened. */
export interface SlipVariant {
  readonly kind: Slip['kind'];
  /** What happens, to follow "If". */
  readonly clause: string;
  readonly portions: readonly BottleContent[];
  readonly isKept: boolean;
  readonly concerns: readonly string[];
}

const STRONGER_BY = 10;
/** Names that differ by so few letters stand beside each other on the shelf. */
const SIMILAR_UP_TO = 2;
const JAR_ML = 500;

/** What stands in the usual waste jars, for the slip of pouring a mix into the wrong one. */
const JARS: readonly { readonly name: string; readonly substance: string; readonly molarity: number }[] = [
  { name: 'the acid jar', substance: 'hydrochloric-acid', molarity: 1 },
  { name: 'the alkali jar', substance: 'sodium-hydroxide', molarity: 1 },
  { name: 'the bleach jar', substance: 'sodium-hypochlorite', molarity: 0.35 },
  { name: 'the solvent jar', substance: 'ethanol', molarity: 8 },
];

/** mol/L of the goods as sold, which no stock can pass; infinite for solids. */
function strongestMolarity({
  form,
  assayPercent,
  densityGPerMl,
  molarMassGPerMol,
}: CatalogueSubstance): number {
  if (form === 'solid' || assayPercent === null || densityGPerMl === null) return Infinity;
  return (assayPercent * densityGPerMl * 10) / molarMassGPerMol;
}

function tooStrong(portion: BottleContent): BottleContent {
  return {
    ...portion,
    solutes: portion.solutes.map(({ substance: id, molarity }) => {
      const substance = findSubstance(id);
      return {
        substance: id,
        molarity: Math.min(
          molarity * STRONGER_BY,
          substance ? Math.max(molarity, strongestMolarity(substance)) : Infinity,
        ),
      };
    }),
  };
}

function replaced(
  portions: readonly BottleContent[],
  index: number,
  portion: BottleContent,
): BottleContent[] {
  return portions.map((other, at) => (at === index ? portion : other));
}

/** Letters to change, add or leave out to make one word of the other. */
export function editDistance(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, index) => index);
  for (let i = 1; i <= a.length; i += 1) {
    const next = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const kept = (row[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1);
      next.push(Math.min(kept, (row[j] ?? 0) + 1, (next[j - 1] ?? 0) + 1));
    }
    row = next;
  }
  return row[b.length] ?? 0;
}

/** Substances whose name is easily read for another's, such as nitrite for nitrate. */
export function similarlyNamed(id: string): CatalogueSubstance[] {
  return ALL_SUBSTANCES.filter(
    (other) =>
      other.id !== id && findSubstanceHazards(other.id) && editDistance(other.id, id) <= SIMILAR_UP_TO,
  );
}

function name(idOrCas: string): string {
  return findSubstance(idOrCas)?.name ?? idOrCas;
}

/**
 * Every single slip with these portions.
 * @param others - further bottles of the same session, any of which may be taken for a portion
 */
export function slipVariants(
  portions: readonly BottleContent[],
  others: readonly BottleContent[],
): SlipVariant[] {
  const plain = { isKept: false };
  const each = portions.flatMap((portion, index): SlipVariant[] => {
    const concerns = [portion.label];
    const strong = tooStrong(portion);
    const strengths = strong.solutes
      .map(({ substance, molarity }) => `${figure(molarity)} mol/L ${name(substance)}`)
      .join(', ');
    const rest = portions.filter((_, at) => at !== index);
    return [
      {
        ...plain,
        kind: 'too-strong',
        clause: `${portion.label} is made ten times too strong (${strengths})`,
        portions: replaced(portions, index, strong),
        concerns,
      },
      {
        ...plain,
        kind: 'doubled',
        clause: `twice the volume of ${portion.label} is taken`,
        portions: replaced(portions, index, { ...portion, volumeMl: 2 * portion.volumeMl }),
        concerns,
      },
      ...(rest.length > 0
        ? [
            {
              ...plain,
              kind: 'left-out' as const,
              clause: `${portion.label} is left out`,
              portions: rest,
              concerns,
            },
          ]
        : []),
      ...portion.solutes.flatMap(({ substance: id, molarity }, place) => {
        const own = findSubstance(id);
        return (own ? similarlyNamed(own.id) : []).map((other) => ({
          ...plain,
          kind: 'wrong-substance' as const,
          clause: `${other.name} is taken for ${name(id)} in ${portion.label}`,
          portions: replaced(portions, index, {
            ...portion,
            solutes: portion.solutes.map((solute, at) =>
              at === place ? { substance: other.id, molarity } : solute,
            ),
          }),
          concerns,
        }));
      }),
      ...others.map((other) => ({
        ...plain,
        kind: 'wrong-bottle' as const,
        clause: `${other.label} is taken for ${portion.label}`,
        portions: replaced(portions, index, { ...other, volumeMl: portion.volumeMl }),
        concerns: [portion.label, other.label],
      })),
    ];
  });
  const pairs = portions.flatMap((first, index) =>
    portions.slice(index + 1).map((second): SlipVariant => ({
      ...plain,
      kind: 'swapped',
      clause: `${first.label} and ${second.label} are swapped`,
      portions: portions.map((portion) =>
        portion === first
          ? { ...second, volumeMl: first.volumeMl }
          : portion === second
            ? { ...first, volumeMl: second.volumeMl }
            : portion,
      ),
      concerns: [first.label, second.label],
    })),
  );
  const labels = portions.map(({ label }) => label);
  const whole: SlipVariant[] = [
    ...(portions.length > 1
      ? [
          {
            ...plain,
            kind: 'reversed' as const,
            clause: 'the portions are poured in the opposite order',
            portions: [...portions].reverse(),
            concerns: labels,
          },
        ]
      : []),
    {
      kind: 'overnight',
      clause: 'the mix is left standing overnight',
      portions,
      isKept: true,
      concerns: labels,
    },
    ...JARS.map(({ name: jar, substance, molarity }) => ({
      isKept: true,
      kind: 'wrong-jar' as const,
      clause: `the mix is poured into ${jar}`,
      portions: [...portions, { label: jar, volumeMl: JAR_ML, solutes: [{ substance, molarity }] }],
      concerns: labels,
    })),
  ];
  return [...each, ...pairs, ...whole];
}
