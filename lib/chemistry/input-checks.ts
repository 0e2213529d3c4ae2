import { gasId } from './reaction-system';
import { findReaction, isMasterComponent } from './species-catalogue';
import type { Reaction, SpeciationInput } from './types';

/** The tables of water's constants end here. */
const LOWEST_C = 0;
const HIGHEST_C = 60;
/** Beyond this no double holds the amounts. */
const LARGEST_LOG_K = 300;

/**
 * @throws RangeError for a volume that is not positive, an amount that is not finite or negative (but H+), a
 *   component or gas the catalogue does not know, a species formed twice, or a constant beyond 1e±300
 */
export function checkInput({
  volumeL,
  amounts,
  reactions,
  pH,
  temperatureC,
  headspace,
}: SpeciationInput): void {
  if (!(volumeL > 0) || !Number.isFinite(volumeL)) throw new RangeError('The volume must be positive');
  if (pH !== null && !Number.isFinite(pH)) throw new RangeError('The pH must be finite');
  if (!(temperatureC >= LOWEST_C && temperatureC <= HIGHEST_C))
    throw new RangeError(`The temperature must be ${LOWEST_C} to ${HIGHEST_C} °C`);
  for (const [id, amount] of Object.entries(amounts)) {
    if (!Number.isFinite(amount) || (amount < 0 && id !== 'H+'))
      throw new RangeError(`The amount of ${id} must be finite and not negative`);
    if (reactions === 'catalogue' && !isMasterComponent(id))
      throw new RangeError(`${id} is not a component of the catalogue`);
  }
  if (reactions !== 'catalogue') checkReactions(reactions, amounts);
  if (headspace.kind === 'sealed' && !(headspace.volumeL > 0 && Number.isFinite(headspace.volumeL)))
    throw new RangeError('The headspace must be positive');
  if (headspace.kind === 'open') {
    for (const [gas, bar] of Object.entries(headspace.partialPressuresBar)) {
      if (!(bar > 0 && Number.isFinite(bar)))
        throw new RangeError(`The partial pressure of ${gas} must be positive`);
      const isKnown =
        reactions === 'catalogue'
          ? findReaction(gasId(gas)) !== null
          : reactions.some(({ species }) => species === gasId(gas));
      if (!isKnown) throw new RangeError(`No reaction forms ${gasId(gas)}`);
    }
  }
}

function checkReactions(reactions: readonly Reaction[], amounts: SpeciationInput['amounts']): void {
  const taken = new Set([...Object.keys(amounts), ...reactions.flatMap(({ stoich }) => Object.keys(stoich))]);
  for (const { species, logK, stoich } of reactions) {
    if (taken.has(species)) throw new RangeError(`${species} stands twice`);
    taken.add(species);
    if (!(Math.abs(logK) <= LARGEST_LOG_K))
      throw new RangeError(`log K of ${species} must lie within ±${LARGEST_LOG_K}`);
    if (!Object.values(stoich).every(Number.isFinite))
      throw new RangeError(`The coefficients of ${species} must be finite`);
  }
}
