import { findSubstance } from '../../chemistry/substances';
import type { DilutedSolute, EquilibriumState, Solute } from '../../chemistry/types';

/** Acids and bases whose salts with each other need no label; others keep their class after neutralising. */
const HARMLESS_ACIDS = new Set([
  'hydrochloric-acid',
  'nitric-acid',
  'sulfuric-acid',
  'phosphoric-acid',
  'acetic-acid',
  'formic-acid',
  'citric-acid',
  'tartaric-acid',
  'ascorbic-acid',
  'sulfamic-acid',
  'sodium-hydrogensulfate',
]);
const HARMLESS_BASES = new Set(['sodium-hydroxide', 'potassium-hydroxide', 'calcium-hydroxide']);
const NEGLIGIBLE = 1e-9;

function protonsOf(idOrCas: string): number {
  return findSubstance(idOrCas)?.releases?.['H+'] ?? 0;
}

/**
 * What a mix is classified by: acids and bases that neutralised each other no longer count as what they were, the
 * excess does, and ammonia set free from its salts counts as ammonia. Everything else counts as poured, which errs
 * to the safe side where a precipitate or a complex takes it away.
 *
 * @param diluted - solutes at their strength after mixing, before any reaction
 */
export function solutesAfterReaction(diluted: readonly DilutedSolute[], state: EquilibriumState): Solute[] {
  const acid = diluted.reduce(
    (sum, { substance, molarity }) => sum + Math.max(0, protonsOf(substance)) * molarity,
    0,
  );
  const base = diluted.reduce(
    (sum, { substance, molarity }) => sum + Math.max(0, -protonsOf(substance)) * molarity,
    0,
  );
  const used = Math.min(acid, base);
  const left = diluted.flatMap(({ substance: idOrCas, molarity }) => {
    const id = findSubstance(idOrCas)?.id ?? idOrCas;
    const share = HARMLESS_ACIDS.has(id) ? 1 - used / acid : HARMLESS_BASES.has(id) ? 1 - used / base : 1;
    return share > NEGLIGIBLE || !Number.isFinite(share)
      ? [{ substance: idOrCas, molarity: molarity * (Number.isFinite(share) ? share : 1) }]
      : [];
  });
  const poured =
    diluted.find(({ substance }) => findSubstance(substance)?.id === 'ammonia-solution')?.molarity ?? 0;
  const freed = (state.species.find(({ id }) => id === 'NH3')?.molarity ?? 0) - poured;
  return freed > NEGLIGIBLE ? [...left, { substance: 'ammonia-solution', molarity: freed }] : left;
}
