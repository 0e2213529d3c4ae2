import { hasClass, percentText, reaches, specificMinimum } from './mixture';
import type { AssignedClass, Ingredient, Mixture, Regime } from './mixture';

type Limits = Readonly<Record<string, number>>;

/** Limits that one ingredient alone must reach, per cent (CLP Annex I tables; HazCom appendix A). */
const ALONE: Readonly<Record<Regime, Limits>> = {
  CLP: {
    'Resp. Sens. 1': 1,
    'Resp. Sens. 1B': 1,
    'Resp. Sens. 1A': 0.1,
    'Skin Sens. 1': 1,
    'Skin Sens. 1B': 1,
    'Skin Sens. 1A': 0.1,
    'Muta. 1A': 0.1,
    'Muta. 1B': 0.1,
    'Muta. 2': 1,
    'Carc. 1A': 0.1,
    'Carc. 1B': 0.1,
    'Carc. 2': 1,
    'Repr. 1A': 0.3,
    'Repr. 1B': 0.3,
    'Repr. 2': 3,
  },
  UN: {
    'Resp. Sens. 1': 1,
    'Resp. Sens. 1B': 1,
    'Resp. Sens. 1A': 0.1,
    'Skin Sens. 1': 1,
    'Skin Sens. 1B': 1,
    'Skin Sens. 1A': 0.1,
    'Muta. 1A': 0.1,
    'Muta. 1B': 0.1,
    'Muta. 2': 1,
    'Carc. 1A': 0.1,
    'Carc. 1B': 0.1,
    'Carc. 2': 1,
    'Repr. 1A': 0.3,
    'Repr. 1B': 0.3,
    'Repr. 2': 3,
  },
  HazCom: {
    'Resp. Sens. 1': 0.1,
    'Resp. Sens. 1B': 1,
    'Resp. Sens. 1A': 0.1,
    'Skin Sens. 1': 0.1,
    'Skin Sens. 1B': 1,
    'Skin Sens. 1A': 0.1,
    'Muta. 1A': 0.1,
    'Muta. 1B': 0.1,
    'Muta. 2': 1,
    'Carc. 1A': 0.1,
    'Carc. 1B': 0.1,
    'Carc. 2': 0.1,
    'Repr. 1A': 0.1,
    'Repr. 1B': 0.1,
    'Repr. 2': 0.1,
  },
};
/** Families of classes of which only the gravest is kept. */
const FAMILIES = ['Resp. Sens.', 'Skin Sens.', 'Muta.', 'Carc.', 'Repr.'];
const STOT_GRAVE_FROM = 10;
const STOT_MILD_FROM = 1;
const STOT_3_FROM = 20;
const STOT_3_COUNTS_FROM = 1;

/** `Repr. 1B (FD)` and `Carc. 1B (i)` by their class without the effect. */
function plain(name: string): string {
  return name.replace(/\s*\(.*\)$/, '');
}

function because(ingredient: Ingredient, name: string, limit: number): AssignedClass {
  return {
    class: name,
    because: `${percentText(ingredient.percent)} ${ingredient.name}: ${name} from ${percentText(limit)}`,
  };
}

/** Sensitisers and the long-term classes: each ingredient stands alone, the gravest of a family counts. */
export function longTermClasses({ ingredients, regime }: Mixture): AssignedClass[] {
  return FAMILIES.flatMap((family) => {
    const found = ingredients.flatMap((ingredient) =>
      ingredient.classes
        .filter((name) => name.startsWith(family))
        .flatMap((name) => {
          const limit = specificMinimum(ingredient, name) ?? ALONE[regime][plain(name)];
          return limit !== undefined && reaches(ingredient.percent, limit)
            ? [because(ingredient, name, limit)]
            : [];
        }),
    );
    return found.sort((a, b) => a.class.localeCompare(b.class)).slice(0, 1);
  });
}

/** Specific organs, once and repeatedly; and the transient effects on airways and mind. */
export function organClasses({ ingredients, regime }: Mixture): AssignedClass[] {
  const found: AssignedClass[] = [];
  for (const kind of ['STOT SE', 'STOT RE']) {
    const grave = ingredients.filter((ingredient) => hasClass(ingredient, `${kind} 1`));
    const candidates = [
      ...grave.flatMap((ingredient) => {
        const limit =
          specificMinimum(ingredient, `${kind} 1`) ??
          (regime === 'HazCom' ? STOT_MILD_FROM : STOT_GRAVE_FROM);
        return reaches(ingredient.percent, limit) ? [because(ingredient, `${kind} 1`, limit)] : [];
      }),
      ...grave.flatMap((ingredient) => {
        const limit = specificMinimum(ingredient, `${kind} 2`) ?? STOT_MILD_FROM;
        return reaches(ingredient.percent, limit) ? [because(ingredient, `${kind} 2`, limit)] : [];
      }),
      ...ingredients
        .filter((ingredient) => hasClass(ingredient, `${kind} 2`))
        .flatMap((ingredient) => {
          const limit =
            specificMinimum(ingredient, `${kind} 2`) ??
            (regime === 'HazCom' ? STOT_MILD_FROM : STOT_GRAVE_FROM);
          return reaches(ingredient.percent, limit) ? [because(ingredient, `${kind} 2`, limit)] : [];
        }),
    ];
    found.push(...candidates.slice(0, 1));
  }
  for (const effect of ['respiratory', 'narcotic']) {
    const name = `STOT SE 3 (${effect})`;
    const counted = ingredients.filter(
      (ingredient) =>
        (ingredient.classes.includes(name) || specificMinimum(ingredient, name) !== null) &&
        reaches(ingredient.percent, STOT_3_COUNTS_FROM),
    );
    const shares = counted.reduce(
      (sum, ingredient) => sum + ingredient.percent / (specificMinimum(ingredient, name) ?? STOT_3_FROM),
      0,
    );
    const [first] = counted;
    if (first && reaches(shares, 1))
      found.push(because(first, name, specificMinimum(first, name) ?? STOT_3_FROM));
  }
  return found;
}

/** Harm to water life, by the summation method. HazCom knows none. */
export function aquaticClasses({ ingredients, regime }: Mixture): AssignedClass[] {
  if (regime === 'HazCom') return [];
  const sum = (name: string, weight: (ingredient: Ingredient) => number) =>
    ingredients
      .filter((ingredient) => ingredient.classes.includes(name))
      .reduce((total, ingredient) => total + ingredient.percent * weight(ingredient), 0);
  const one = () => 1;
  const acute1 = sum('Aquatic Acute 1', ({ mAcute }) => mAcute);
  const acute2 = sum('Aquatic Acute 2', one);
  const acute3 = sum('Aquatic Acute 3', one);
  const chronic1 = sum('Aquatic Chronic 1', ({ mChronic }) => mChronic);
  const plainChronic1 = sum('Aquatic Chronic 1', one);
  const chronic2 = sum('Aquatic Chronic 2', one);
  const chronic3 = sum('Aquatic Chronic 3', one);
  const chronic4 = sum('Aquatic Chronic 4', one);
  const THRESHOLD = 25;
  const named = ingredients
    .filter(({ classes }) => classes.some((name) => name.startsWith('Aquatic')))
    .map(({ name, percent }) => `${percentText(percent)} ${name}`)
    .join(', ');
  const say = (name: string, value: number): AssignedClass => ({
    class: name,
    because: `${named}: weighted sum ${Number(value.toPrecision(3))} %, ${name} from ${THRESHOLD} %`,
  });
  const acute: readonly (readonly [string, number])[] = [
    ['Aquatic Acute 1', acute1],
    ...(regime === 'UN'
      ? ([
          ['Aquatic Acute 2', 10 * acute1 + acute2],
          ['Aquatic Acute 3', 100 * acute1 + 10 * acute2 + acute3],
        ] as const)
      : []),
  ];
  const chronic: readonly (readonly [string, number])[] = [
    ['Aquatic Chronic 1', chronic1],
    ['Aquatic Chronic 2', 10 * chronic1 + chronic2],
    ['Aquatic Chronic 3', 100 * chronic1 + 10 * chronic2 + chronic3],
    ['Aquatic Chronic 4', plainChronic1 + chronic2 + chronic3 + chronic4],
  ];
  return [acute, chronic].flatMap((steps) => {
    const met = steps.find(([, value]) => reaches(value, THRESHOLD));
    return met ? [say(...met)] : [];
  });
}

const ASPIRATION_FROM = 10;
const ASPIRATION_VISCOSITY = 20.5;

/** Flammable, oxidising and metal-corrosive solutions: from data, never from sums. */
export function physicalClasses({ ingredients, flashPointC, viscosity, regime }: Mixture): AssignedClass[] {
  const found: AssignedClass[] = [];
  if (flashPointC !== null && (flashPointC <= 60 || (regime !== 'CLP' && flashPointC <= 93))) {
    const category = flashPointC < 23 ? 2 : flashPointC <= 60 ? 3 : 4;
    found.push({
      class: `Flam. Liq. ${category}`,
      because: `flash point about ${Math.round(flashPointC)} °C`,
    });
  }
  for (const ingredient of ingredients) {
    const oxidising = ingredient.specificLimits.filter(
      (limit) =>
        limit.class.startsWith('Ox. Liq.') &&
        reaches(ingredient.percent, limit.min) &&
        (limit.max === undefined || ingredient.percent < limit.max),
    );
    const [gravest] = oxidising.sort((a, b) => a.class.localeCompare(b.class));
    if (gravest) found.push(because(ingredient, gravest.class, gravest.min));
    const from = ingredient.corrosiveToMetalsFromPercent;
    if (
      from !== null &&
      reaches(ingredient.percent, from) &&
      !found.some((entry) => entry.class === 'Met. Corr. 1')
    )
      found.push(because(ingredient, 'Met. Corr. 1', from));
  }
  const aspirated = ingredients
    .filter((ingredient) => hasClass(ingredient, 'Asp. Tox. 1') && ingredient.percent >= 1)
    .reduce((sum, { percent }) => sum + percent, 0);
  if (viscosity !== null && viscosity <= ASPIRATION_VISCOSITY && reaches(aspirated, ASPIRATION_FROM))
    found.push({ class: 'Asp. Tox. 1', because: `${percentText(aspirated)} of it, thin enough` });
  return found;
}
