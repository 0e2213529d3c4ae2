import { findSpecies } from './species-catalogue';
import type { Appearance, SolidState, SpeciesState } from './types';

/**
 * What the eye will see. An approximation: each coloured species has one representative colour at one
 * representative strength (both from memory of trade descriptions); absorbances, −ln of each channel, are
 * scaled by concentration and added, as by Beer's law along one path of about 5 cm.
 */

/** Strength, mol/L, at which a species shows its catalogue colour; 0.1 where nothing else is said. */
const USUAL_STRENGTH = 0.1;
/** Strongly coloured species show theirs at far less; orders of magnitude from memory. */
const STRONG_COLOURS: readonly (readonly [pattern: RegExp, strength: number])[] = [
  [/^MnO4-/, 5e-4],
  [/SCN/, 2e-3],
  [/^I3-$|^I2\(aq\)$/, 2e-3],
  [/CrO4|Cr2O7/, 0.02],
  [/NH3\)[3-9]/, 0.03],
  [/en\)/, 0.03],
  [/Cl4-2$|Cl\d/, 0.05],
  [/Sal|HDMG/, 2e-3],
  [/^Fe\(CN\)6-3/, 0.02],
  [/^FeOH|^Fe\(OH\)/, 0.02],
];
/** Solids below this mass are not seen. */
const SEEN_FROM_GRAMS = 1e-4;
const SEEN_FROM_ABSORBANCE = 0.012;

type Rgb = readonly [number, number, number];

function rgbOf(hex: string): Rgb {
  const value = Number.parseInt(hex.slice(1), 16);
  return [(value >> 16) & 255, (value >> 8) & 255, value & 255];
}

function hexOf(rgb: Rgb): string {
  return `#${rgb.map((channel) => Math.round(channel).toString(16).padStart(2, '0')).join('')}`;
}

function strengthFor(id: string): number {
  return STRONG_COLOURS.find(([pattern]) => pattern.test(id))?.[1] ?? USUAL_STRENGTH;
}

/** What of a state is looked at. */
interface Seen {
  readonly species: readonly Pick<SpeciesState, 'id' | 'molarity'>[];
  readonly solids: readonly Pick<SolidState, 'id' | 'grams'>[];
}

/** Colour of the solution, in words too, and each solid that would be seen, heaviest first. */
export function appearanceOf(state: Seen): Appearance {
  const absorbance: [number, number, number] = [0, 0, 0];
  let strongest = '';
  let strongestShare = 0;
  for (const { id, molarity } of state.species) {
    const species = findSpecies(id);
    if (!species || species.hex.toUpperCase() === '#FFFFFF') continue;
    const scale = molarity / strengthFor(id);
    const part = rgbOf(species.hex).map((channel) => -Math.log(Math.max(channel, 4) / 255) * scale);
    part.forEach((value, channel) => {
      absorbance[channel] = (absorbance[channel] ?? 0) + value;
    });
    const share = Math.max(...part);
    if (share > strongestShare) {
      strongestShare = share;
      strongest = species.colour.replace(/\s*\(.*\)$/, '');
    }
  }
  const glass: Rgb = [244, 244, 240];
  const rgb = glass.map(
    (channel, index) => channel * Math.exp(-Math.min(absorbance[index] ?? 0, 5)),
  ) as unknown as Rgb;
  const deepest = Math.max(...absorbance);
  return {
    solution: { hex: hexOf(rgb), words: wordsFor(deepest, strongest) },
    solids: state.solids
      .filter(({ grams }) => grams !== null && grams >= SEEN_FROM_GRAMS)
      .sort((a, b) => (b.grams ?? 0) - (a.grams ?? 0))
      .map(({ id, grams }) => {
        const species = findSpecies(id);
        return {
          id,
          name: species ? `${species.colour} ${species.name}` : id,
          hex: species?.hex ?? '#ffffff',
          grams: grams ?? 0,
        };
      }),
  };
}

function wordsFor(deepest: number, colour: string): string {
  if (deepest < SEEN_FROM_ABSORBANCE || colour === '') return 'colourless';
  const plain = colour.replace(/^(?:pale|deep|dark|very pale|intense) /, '');
  if (deepest < 0.15) return `very pale ${plain}`;
  if (deepest < 0.5) return `pale ${plain}`;
  if (deepest > 2) return `deep ${plain}`;
  return plain;
}
