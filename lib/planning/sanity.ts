import type { Substance } from '../chemistry/types';
import { lotStrength } from './weigh-out';

/** Something a person should confirm or correct before a request becomes a batch. */
export type QuantityQuestion = {
  readonly substanceId: string | null;
  readonly message: string;
} & (
  | { readonly code: 'not-a-quantity'; readonly field: 'molarity' | 'volumeMl' }
  | { readonly code: 'impossible-strength'; readonly molarity: number; readonly strongestMolarity: number }
  | { readonly code: 'above-solubility'; readonly molarity: number; readonly solubleMolarity: number }
  | { readonly code: 'unusual-strength'; readonly molarity: number; readonly perhapsMolarity: number | null }
  | { readonly code: 'large-mass'; readonly massG: number; readonly usualG: number }
  | { readonly code: 'unusual-volume'; readonly volumeMl: number; readonly perhapsMl: number | null }
);

/** Nothing holds more solute than this per litre of solution, whatever its solubility: denser than any salt brine. */
const MOST_SOLUTE_G_PER_L = 2500;
/** Above this a strength in mol/L is more often meant in mmol/L. Common practice. */
const STRONG_MOLARITY = 15;
const WEAK_MOLARITY = 1e-6;
/** What a teaching prep room takes of one substance for one batch at most without a second look, g. Common practice. */
const USUAL_MASS_G = 1000;
/** The same for compounds of dear or very toxic elements. Common practice. */
const GUARDED_MASS_G = 100;
const GUARDED_ELEMENTS = /(Ag|Au|Pt|Pd|Hg|Cd|Tl|As|Pb|Cr|Be|Os|CN)(?![a-z])/;
const LARGE_VOLUME_ML = 25_000;
const SMALL_VOLUME_ML = 1;

function strongest(substance: Substance): number {
  const { molarity } = lotStrength({ substance, assayPercent: null, densityGPerMl: null });
  return molarity ?? MOST_SOLUTE_G_PER_L / substance.molarMassGPerMol;
}

function aboutStrength(
  substance: Substance,
  molarity: number,
  solubleMolarity: number | null,
): QuantityQuestion[] {
  const substanceId = substance.id;
  const strongestMolarity = strongest(substance);
  if (molarity > strongestMolarity * (1 + 1e-9)) {
    const limit = strongestMolarity.toPrecision(3);
    return [
      {
        code: 'impossible-strength',
        substanceId,
        molarity,
        strongestMolarity,
        message: `${molarity} mol/L of ${substance.name} can't be made: at most about ${limit} mol/L. Is mmol/L meant (${molarity / 1000} mol/L)?`,
      },
    ];
  }
  if (solubleMolarity !== null && molarity > solubleMolarity) {
    return [
      {
        code: 'above-solubility',
        substanceId,
        molarity,
        solubleMolarity,
        message: `${molarity} mol/L of ${substance.name} is more than dissolves (about ${solubleMolarity.toPrecision(3)} mol/L).`,
      },
    ];
  }
  if (molarity > STRONG_MOLARITY || molarity < WEAK_MOLARITY) {
    const perhapsMolarity = molarity > STRONG_MOLARITY ? molarity / 1000 : null;
    const hint = perhapsMolarity === null ? 'Is the unit right?' : `Is ${perhapsMolarity} mol/L meant?`;
    return [
      {
        code: 'unusual-strength',
        substanceId,
        molarity,
        perhapsMolarity,
        message: `${molarity} mol/L of ${substance.name} is unusual. ${hint}`,
      },
    ];
  }
  return [];
}

function aboutMass(substance: Substance, molarity: number, volumeMl: number): QuantityQuestion[] {
  const massG = (molarity * volumeMl * substance.molarMassGPerMol) / 1000;
  const usualG = GUARDED_ELEMENTS.test(substance.formula) ? GUARDED_MASS_G : USUAL_MASS_G;
  if (massG <= usualG) return [];
  const mass = massG >= 1000 ? `${(massG / 1000).toPrecision(3)} kg` : `${massG.toPrecision(3)} g`;
  return [
    {
      code: 'large-mass',
      substanceId: substance.id,
      massG,
      usualG,
      message: `This takes ${mass} of ${substance.name}; more than ${usualG} g of it is unusual. Are strength and volume right?`,
    },
  ];
}

/**
 * Whether strengths and volume asked for are of a sensible magnitude. Nothing is thrown: what is not a quantity at
 * all is a question too, so that a form can show everything at once.
 * @param solution.solutes - `solubleMolarity` where a solubility is known, else null
 * @returns questions; empty if nothing looks odd
 */
export function questionQuantities(solution: {
  readonly solutes: readonly {
    readonly substance: Substance;
    readonly molarity: number;
    readonly solubleMolarity: number | null;
  }[];
  readonly volumeMl: number;
}): QuantityQuestion[] {
  const { volumeMl } = solution;
  const questions: QuantityQuestion[] = [];
  const isVolume = Number.isFinite(volumeMl) && volumeMl > 0;
  if (!isVolume) {
    questions.push({
      code: 'not-a-quantity',
      field: 'volumeMl',
      substanceId: null,
      message: `A volume of ${volumeMl} mL can't be made.`,
    });
  } else if (volumeMl > LARGE_VOLUME_ML || volumeMl < SMALL_VOLUME_ML) {
    const perhapsMl = volumeMl > LARGE_VOLUME_ML ? volumeMl / 1000 : volumeMl * 1000;
    questions.push({
      code: 'unusual-volume',
      substanceId: null,
      volumeMl,
      perhapsMl,
      message: `${volumeMl} mL is unusual. Is ${perhapsMl} mL meant?`,
    });
  }
  for (const { substance, molarity, solubleMolarity } of solution.solutes) {
    if (!Number.isFinite(molarity) || molarity <= 0) {
      const message = `A strength of ${molarity} mol/L of ${substance.name} can't be made.`;
      questions.push({ code: 'not-a-quantity', field: 'molarity', substanceId: substance.id, message });
      continue;
    }
    questions.push(...aboutStrength(substance, molarity, solubleMolarity));
    if (isVolume) questions.push(...aboutMass(substance, molarity, volumeMl));
  }
  return questions;
}
