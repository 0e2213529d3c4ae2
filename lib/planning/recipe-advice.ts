import type { CatalogueSubstance } from '../chemistry/substances';
import { solubilityOf } from '../chemistry/solubility';
import { questionQuantities } from './sanity';

export interface RecipeAdvice {
  /** Days that the shortest-lived solute keeps; null where nothing is known of any. */
  readonly shelfLifeDays: number | null;
  /** Why it keeps no longer, and how to keep it; null where there is nothing to say. */
  readonly storageNote: string | null;
  /** What should be confirmed before the recipe is used. */
  readonly questions: readonly string[];
}

/** Questions are asked as for a litre, the usual batch of a prep room. */
const USUAL_BATCH_ML = 1000;

/**
 * What the catalogue knows of a recipe: how long it keeps, how to keep it, and which strengths look odd.
 * Lives and notes are those of the substances' data, common practice of the trade.
 * @param solutes - catalogue substances with their strength in mol/L
 */
export function adviseRecipe(
  solutes: readonly { readonly substance: CatalogueSubstance; readonly molarity: number }[],
): RecipeAdvice {
  const lives = solutes.flatMap(({ substance: { solutionLifeDays } }) => solutionLifeDays ?? []);
  const notes = [...new Set(solutes.flatMap(({ substance: { solutionNote } }) => solutionNote ?? []))];
  return {
    shelfLifeDays: lives.length > 0 ? Math.min(...lives) : null,
    storageNote: notes.length > 0 ? capitalised(notes.join('; ')) : null,
    questions: questionQuantities({
      solutes: solutes.map(({ substance, molarity }) => ({
        substance,
        molarity,
        solubleMolarity: solubilityOf(substance)?.molarity ?? null,
      })),
      volumeMl: USUAL_BATCH_ML,
    }).map(({ message }) => message),
  };
}

function capitalised(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}.`;
}
