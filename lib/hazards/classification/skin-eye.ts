import { hasClass, percentText, reaches, specificMinimum } from './mixture';
import type { AssignedClass, Ingredient, Mixture } from './mixture';

/** Generic limits of additivity, per cent (GHS tables 3.2.3 and 3.3.3). */
const CORROSIVE_FROM = 5;
const IRRITANT_FROM = 10;
const CORROSIVE_IRRITATES_FROM = 1;
const EYE_DAMAGE_FROM = 3;
const EYE_DAMAGE_IRRITATES_FROM = 1;
/** Limits for ingredients that do not add up (tables 3.2.4 and 3.3.4). */
const NON_ADDITIVE_CORROSIVE_FROM = 1;
const NON_ADDITIVE_IRRITANT_FROM = 3;
const ACID_PH = 2;
const ALKALI_PH = 11.5;

const SUBCATEGORIES = ['1A', '1B', '1C'] as const;

function isCorrosive(ingredient: Ingredient): boolean {
  return hasClass(ingredient, 'Skin Corr.');
}

/** Lowest limit from which an ingredient corrodes skin at this subcategory or a milder one. */
function corrosionLimit(ingredient: Ingredient, upTo: number): number | null {
  if (!isCorrosive(ingredient)) return null;
  const own = SUBCATEGORIES.findIndex((sub) => ingredient.classes.includes(`Skin Corr. ${sub}`));
  const specific = SUBCATEGORIES.slice(0, upTo + 1).flatMap(
    (sub) => specificMinimum(ingredient, `Skin Corr. ${sub}`) ?? [],
  );
  const general = specificMinimum(ingredient, 'Skin Corr. 1');
  if (general !== null) specific.push(general);
  if (specific.length > 0) return Math.min(...specific);
  const hasAny = ingredient.specificLimits.some((limit) => limit.class.startsWith('Skin Corr.'));
  if (hasAny) return null;
  return own <= upTo ? CORROSIVE_FROM : null;
}

function anyCorrosionLimit(ingredient: Ingredient): number {
  return corrosionLimit(ingredient, 2) ?? CORROSIVE_FROM;
}

function sumOfShares(
  ingredients: readonly Ingredient[],
  limitOf: (ingredient: Ingredient) => number | null,
): number {
  return ingredients.reduce((sum, ingredient) => {
    const limit = limitOf(ingredient);
    return limit === null ? sum : sum + ingredient.percent / limit;
  }, 0);
}

function reasonFor(
  ingredients: readonly Ingredient[],
  limitOf: (ingredient: Ingredient) => number | null,
  className: string,
): string {
  return ingredients
    .flatMap((ingredient) => {
      const limit = limitOf(ingredient);
      return limit === null
        ? []
        : [`${percentText(ingredient.percent)} ${ingredient.name}: ${className} from ${percentText(limit)}`];
    })
    .join('; ');
}

function skinIrritationLimit(ingredient: Ingredient): number | null {
  const specific = specificMinimum(ingredient, 'Skin Irrit. 2');
  if (specific !== null) return specific;
  if (isCorrosive(ingredient)) return Math.min(CORROSIVE_IRRITATES_FROM, anyCorrosionLimit(ingredient));
  return hasClass(ingredient, 'Skin Irrit. 2') ? IRRITANT_FROM : null;
}

function eyeDamageLimit(ingredient: Ingredient): number | null {
  if (!isCorrosive(ingredient) && !hasClass(ingredient, 'Eye Dam. 1')) return null;
  const specific = specificMinimum(ingredient, 'Eye Dam. 1');
  if (specific !== null) return specific;
  const irritantBand = ingredient.specificLimits.find((limit) => limit.class === 'Eye Irrit. 2');
  if (irritantBand?.max !== undefined) return irritantBand.max;
  const hasCorrosiveLimit = ingredient.specificLimits.some((limit) => limit.class.startsWith('Skin Corr.'));
  return hasCorrosiveLimit ? Math.min(EYE_DAMAGE_FROM, anyCorrosionLimit(ingredient)) : EYE_DAMAGE_FROM;
}

function eyeIrritationLimit(ingredient: Ingredient): number | null {
  const specific = specificMinimum(ingredient, 'Eye Irrit. 2');
  if (specific !== null) return specific;
  if (isCorrosive(ingredient) || hasClass(ingredient, 'Eye Dam. 1')) return EYE_DAMAGE_IRRITATES_FROM;
  return hasClass(ingredient, 'Eye Irrit. 2') ? IRRITANT_FROM : null;
}

/** One acid or base with limits of its own alone touches skin or eye: its pH is already in those limits. */
function isSettledByLimits(ingredients: readonly Ingredient[]): boolean {
  const touching = ingredients.filter(
    (ingredient) => skinIrritationLimit(ingredient) !== null || eyeIrritationLimit(ingredient) !== null,
  );
  const [only] = touching;
  return (
    touching.length === 1 &&
    only !== undefined &&
    only.isAcidOrBase &&
    only.specificLimits.some((limit) => limit.class.startsWith('Skin') || limit.class.startsWith('Eye'))
  );
}

/** Skin corrosion or irritation, and eye damage or irritation. */
export function skinAndEyeClasses(mixture: Mixture): AssignedClass[] {
  const { ingredients, pH } = mixture;
  const isExtreme = pH !== null && (pH <= ACID_PH || pH >= ALKALI_PH) && !mixture.isPhOverridden;
  if (isExtreme && !isSettledByLimits(ingredients)) {
    const because = `pH ${pH.toFixed(1)} is ${pH <= ACID_PH ? `${ACID_PH} or less` : `${ALKALI_PH} or more`}`;
    return [
      { class: 'Skin Corr. 1', because },
      { class: 'Eye Dam. 1', because },
    ];
  }
  const skin = skinClass(ingredients);
  const isSkinCorrosive = skin?.class.startsWith('Skin Corr.') ?? false;
  const eye =
    isSkinCorrosive && skin
      ? { class: 'Eye Dam. 1', because: `goes with ${skin.class}` }
      : eyeClass(ingredients);
  return [skin, eye].filter((found): found is AssignedClass => found !== null);
}

function skinClass(ingredients: readonly Ingredient[]): AssignedClass | null {
  const alone = nonAdditive(ingredients, 'Skin Corr.', 'Skin Irrit. 2', 'Skin Corr. 1');
  if (alone) return alone;
  for (let upTo = 0; upTo < SUBCATEGORIES.length; upTo += 1) {
    const limitOf = (ingredient: Ingredient) => corrosionLimit(ingredient, upTo);
    const name = `Skin Corr. ${SUBCATEGORIES[upTo]}`;
    if (reaches(sumOfShares(ingredients, limitOf), 1))
      return { class: name, because: reasonFor(ingredients, limitOf, name) };
  }
  const unsorted = ingredients.filter((ingredient) => ingredient.classes.includes('Skin Corr. 1'));
  if (reaches(sumOfShares(unsorted, anyCorrosionLimit), 1))
    return { class: 'Skin Corr. 1', because: reasonFor(unsorted, anyCorrosionLimit, 'Skin Corr. 1') };
  if (reaches(sumOfShares(ingredients, skinIrritationLimit), 1)) {
    return { class: 'Skin Irrit. 2', because: reasonFor(ingredients, skinIrritationLimit, 'Skin Irrit. 2') };
  }
  return null;
}

function eyeClass(ingredients: readonly Ingredient[]): AssignedClass | null {
  const alone = nonAdditive(ingredients, 'Eye Dam. 1', 'Eye Irrit. 2', 'Eye Dam. 1');
  if (alone) return alone;
  if (reaches(sumOfShares(ingredients, eyeDamageLimit), 1))
    return { class: 'Eye Dam. 1', because: reasonFor(ingredients, eyeDamageLimit, 'Eye Dam. 1') };
  if (reaches(sumOfShares(ingredients, eyeIrritationLimit), 1)) {
    return { class: 'Eye Irrit. 2', because: reasonFor(ingredients, eyeIrritationLimit, 'Eye Irrit. 2') };
  }
  return null;
}

function nonAdditive(
  ingredients: readonly Ingredient[],
  grave: string,
  mild: string,
  result: string,
): AssignedClass | null {
  for (const ingredient of ingredients.filter(({ isNonAdditive }) => isNonAdditive)) {
    const said = `${percentText(ingredient.percent)} ${ingredient.name}, which does not add up`;
    if (hasClass(ingredient, grave) && reaches(ingredient.percent, NON_ADDITIVE_CORROSIVE_FROM))
      return { class: result, because: said };
    if (hasClass(ingredient, mild) && reaches(ingredient.percent, NON_ADDITIVE_IRRITANT_FROM))
      return { class: mild, because: said };
  }
  return null;
}
