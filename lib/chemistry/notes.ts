import redoxWatch from './data/redox-watch.json';
import { VALID_UP_TO } from './activity';
import type { ReactionSystem } from './reaction-system';
import { findReaction, FLAG_MEANINGS } from './species-catalogue';
import type { EquilibriumState, Note, SpeciationInput } from './types';

type Facts = Omit<EquilibriumState, 'notes' | 'converged'>;

/** A species must hold this share of the most abundant one before its flags or sources are worth a line. */
const TELLING_SHARE = 1e-3;
/** Sources further apart than this in log K are named. */
const DISAGREE_LOG = 0.5;
/** H+ counts as present for a redox warning below this pH. */
const ACID_BELOW_PH = 6;
const PRESENT_MOLARITY = 1e-6;

/** What the reader must know before trusting the figures. */
export function speciationNotes(system: ReactionSystem, input: SpeciationInput, state: Facts): Note[] {
  const notes: Note[] = [];
  const valid = VALID_UP_TO[input.activity];
  if (state.ionicStrength > valid) {
    notes.push({
      code: 'ionic-strength-out-of-range',
      message: `The ionic strength is ${state.ionicStrength.toPrecision(2)} mol/L; the ${input.activity} model is held to be good to ${valid}.`,
    });
  }
  if (input.reactions !== 'catalogue') return notes;
  if (system.moved.length > 0) {
    notes.push({
      code: 'constants-moved',
      message: `Moved from 25 °C: ${listed(system.moved)}. The others stand at 25 °C.`,
    });
  }
  if (system.leftOut.length > 0) {
    notes.push({
      code: 'too-slow',
      message: `Left out because they form too slowly at room temperature: ${listed(system.leftOut)}.`,
    });
  }
  notes.push(...redoxNotes(input, state), ...flagNotes(state), ...disagreementNotes(state));
  return notes;
}

function listed(ids: readonly string[]): string {
  return ids.length > 6 ? `${ids.slice(0, 6).join(', ')} and ${ids.length - 6} more` : ids.join(', ');
}

/** Couples that would react by electron transfer, which the model does not know. */
function redoxNotes(input: SpeciationInput, state: Facts): Note[] {
  const isPresent = (id: string) => {
    if (id === 'H+') return state.pH !== null && state.pH < ACID_BELOW_PH;
    if (id === 'OH-') return state.pH !== null && state.pH > 14 - ACID_BELOW_PH;
    const amount =
      input.amounts[id] ??
      (state.species.find((species) => species.id === id)?.molarity ?? 0) * input.volumeL;
    return amount / input.volumeL > PRESENT_MOLARITY;
  };
  return redoxWatch.pairs
    .filter((pair) => pair.with.every(isPresent))
    .map((pair) => ({
      code: pair.kind === 'redox' ? 'redox-not-modelled' : 'not-modelled',
      message: `Not modelled: ${pair.what}.`,
    }));
}

function tellingSpecies(state: Facts): string[] {
  const most = state.species[0]?.molarity ?? 0;
  const dissolved = state.species
    .filter(({ molarity }) => molarity > TELLING_SHARE * most)
    .map(({ id }) => id);
  return [...dissolved, ...state.solids.filter(({ moles }) => moles > 0).map(({ id }) => id)];
}

const TOLD_FLAGS = [
  'slow',
  'slow-to-form',
  'slow-when-cold',
  'air-oxidised',
  'redox-slow',
  'redox-fast',
  'disproportionates',
  'low-confidence',
  'estimate',
  'from-memory',
  'solvent-dependent',
  'decomposes-NOx',
  'decomposes-S-SO2',
];

function flagNotes(state: Facts): Note[] {
  return tellingSpecies(state).flatMap((id) =>
    (findReaction(id)?.flags ?? [])
      .filter((flag) => TOLD_FLAGS.includes(flag))
      .map((flag) => ({ code: `species-${flag}`, message: `${id}: ${FLAG_MEANINGS[flag] ?? flag}` })),
  );
}

function disagreementNotes(state: Facts): Note[] {
  return tellingSpecies(state).flatMap((id) => {
    const reaction = findReaction(id);
    const rivals =
      reaction?.alternatives.filter(({ ionicStrength }) => ionicStrength === null || ionicStrength === 0) ??
      [];
    if (!reaction || rivals.length === 0) return [];
    const values = [reaction.logK, ...rivals.map(({ logK }) => logK)];
    const spread = Math.max(...values) - Math.min(...values);
    if (spread <= DISAGREE_LOG) return [];
    return [
      {
        code: 'sources-disagree',
        message: `${id}: published log K runs from ${Math.min(...values).toFixed(2)} to ${Math.max(...values).toFixed(2)}; ${reaction.logK.toFixed(2)} is used.`,
      },
    ];
  });
}
