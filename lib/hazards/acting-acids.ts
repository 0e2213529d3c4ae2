import { speciate } from '../chemistry/speciation';
import { componentAmounts } from '../chemistry/mixing';
import type { EquilibriumState } from '../chemistry/types';
import type { ScreenedSolute } from './contents';

/** What acid makes of a group, as a species of the equilibrium model. */
const FREED_SPECIES: Readonly<Record<string, string>> = {
  cyanide: 'HCN',
  sulfide: 'H2S',
  sulfite: 'SO2(aq)',
  fluoride: 'HF',
  hypochlorite: 'HClO',
  nitrite: 'HNO2',
};
/** More of it than the source alone would hold by this factor means that something acts as an acid. */
const FREED_BY_FACTOR = 2;
/** What has no species in the model meets an acid where the rest of the mix, without it, is below this pH. */
const ACID_BELOW_PH = 5;

/** Equilibrium of some solutes in a volume; null where nothing dissolved is modelled or none was found. */
function stateOf(solutes: readonly ScreenedSolute[], volumeMl: number): EquilibriumState | null {
  const parts = solutes.map(({ substance, amountMol }) => ({
    substance: substance.id,
    molarity: (amountMol * 1000) / volumeMl,
  }));
  const amounts = componentAmounts({ label: '', solutes: parts, volumeMl });
  if (Object.keys(amounts).length === 0) return null;
  const outcome = speciate({
    volumeL: volumeMl / 1000,
    amounts,
    reactions: 'catalogue',
    pH: null,
    suppress: [],
    activity: 'davies',
    temperatureC: 25,
    headspace: { kind: 'none' },
  });
  return outcome.converged ? outcome : null;
}

function molarityOf(state: EquilibriumState | null, id: string): number {
  return state?.species.find((species) => species.id === id)?.molarity ?? 0;
}

/**
 * Whether anything else in the mix does to a source what an acid would: salts of hydrolysing metals,
 * dihydrogenphosphates and the like are acids by what they do, not by name. Read off the computed composition:
 * the freed species stands higher than the source alone would hold at the same dilution.
 *
 * @param group - the reactive group of the source, such as `cyanide`
 */
export function actsAsAcid(
  group: string,
  solutes: readonly ScreenedSolute[],
  volumeMl: number,
  state: EquilibriumState | null,
): boolean {
  const others = solutes.filter(({ groups }) => !groups.has(group));
  if (others.length === 0) return false;
  const freed = FREED_SPECIES[group];
  if (freed && state) {
    const alone = stateOf(
      solutes.filter(({ groups }) => groups.has(group)),
      volumeMl,
    );
    return molarityOf(state, freed) > FREED_BY_FACTOR * molarityOf(alone, freed);
  }
  const rest = stateOf(others, volumeMl);
  return rest?.pH !== null && rest?.pH !== undefined && rest.pH < ACID_BELOW_PH;
}
