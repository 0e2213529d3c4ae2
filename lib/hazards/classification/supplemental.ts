import { hasClass, reaches, specificMinimum } from './mixture';
import type { AssignedClass, Ingredient, Mixture } from './mixture';

/** Per cent from which a sensitiser is named though the mixture is not classified for it (CLP Annex II 2.8). */
const ELICITS_FROM: Readonly<Record<string, number>> = {
  'Skin Sens. 1': 0.1,
  'Skin Sens. 1B': 0.1,
  'Skin Sens. 1A': 0.01,
  'Resp. Sens. 1': 0.1,
  'Resp. Sens. 1B': 0.1,
  'Resp. Sens. 1A': 0.01,
};
const LONG_TERM_SHEET_FROM = 0.1;
const OTHER_SHEET_FROM = 1;
const PHYSICAL = ['Flam.', 'Ox.', 'Met. Corr.', 'Self-heat.'];

/** Kinds of sensitiser that an ingredient can still provoke; from a tenth of its own limit where it has one. */
function elicits({ classes, percent, ...rest }: Ingredient): ('Skin' | 'Resp.')[] {
  return (['Skin', 'Resp.'] as const).filter((kind) =>
    classes.some((name) => {
      const general = ELICITS_FROM[name];
      if (general === undefined || !name.startsWith(kind)) return false;
      const own = specificMinimum({ classes, percent, ...rest }, name);
      return reaches(percent, own === null ? general : own / 10);
    }),
  );
}

/** Whether an unclassified mixture still owes its user a data sheet on request (CLP Annex II 2.10). */
function needsDataSheet(ingredient: Ingredient): boolean {
  const isLongTerm = ['Carc.', 'Repr.', 'Lact.'].some((family) => hasClass(ingredient, family));
  const hasOther =
    ingredient.classes.some((name) => !PHYSICAL.some((family) => name.startsWith(family))) ||
    ingredient.specificLimits.some(({ class: name }) => !PHYSICAL.some((family) => name.startsWith(family)));
  return (
    elicits(ingredient).length > 0 ||
    (isLongTerm && reaches(ingredient.percent, LONG_TERM_SHEET_FROM)) ||
    (hasOther && reaches(ingredient.percent, OTHER_SHEET_FROM))
  );
}

/** EUH statements, which only CLP knows, for a mixture already classified. */
export function supplementalCodes(
  { ingredients, regime }: Mixture,
  classes: readonly AssignedClass[],
): string[] {
  if (regime !== 'CLP') return [];
  const codes = new Set(
    ingredients.flatMap(({ percent, supplemental }) =>
      supplemental.filter(({ fromPercent }) => reaches(percent, fromPercent)).map(({ code }) => code),
    ),
  );
  const isClassed = (family: string) => classes.some(({ class: name }) => name.startsWith(family));
  if (ingredients.flatMap(elicits).some((kind) => !isClassed(`${kind} Sens.`))) codes.add('EUH208');
  if (classes.length === 0 && ingredients.some(needsDataSheet)) codes.add('EUH210');
  if (isClassed('Skin ')) codes.delete('EUH066');
  return [...codes].sort();
}
