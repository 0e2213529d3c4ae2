import type { Substance } from '../chemistry/types';
import { requirePositive } from './checks';
import type { TemperatureRise } from './dissolution-heat';
import { dilutionRise, dissolutionRise } from './dissolution-heat';

/** How a substance must be brought into water. */
export type AdditionKind = 'strong acid' | 'strong base' | 'oxidiser' | 'plain';

const STRONG_ACIDS = [
  '7647-01-0',
  '7664-93-9',
  '7697-37-2',
  '7601-90-3',
  '7664-38-2',
  '64-19-7',
  '64-18-6',
  '7664-39-3',
  '10035-10-6',
];
const STRONG_BASES = ['1310-73-2', '1310-58-3', '1310-65-2'];
const OXIDISERS = [
  '7722-84-1',
  '7681-52-9',
  '7722-64-7',
  '7789-00-6',
  '7778-50-9',
  '7727-21-1',
  '7727-54-0',
  '7775-09-9',
  '7758-01-2',
];

/** Largest warming that one portion may bring, °C: our own choice, so that the vessel stays touchable. */
export const MAX_RISE_PER_PORTION_C = 10;
/** Fewest portions of a strong acid or base, also where little heat is expected or none is known. */
const FEWEST_PORTIONS = 3;
/** Above this the vessel is stood in iced water throughout. */
export const ICE_BATH_FROM_RISE_C = 30;
/** From room temperature this comes within reach of boiling where the liquids meet. */
export const BOILING_DANGER_FROM_RISE_C = 60;
/** Worth a word on the sheet. */
const NOTEWORTHY_RISE_C = 3;

/** How a substance is to be added, by its CAS number. */
export function additionKind(substance: Substance): AdditionKind {
  if (STRONG_ACIDS.includes(substance.cas)) return 'strong acid';
  if (STRONG_BASES.includes(substance.cas)) return 'strong base';
  return OXIDISERS.includes(substance.cas) ? 'oxidiser' : 'plain';
}

export interface Addition {
  readonly kind: AdditionKind;
  readonly portions: number;
  /** null where no enthalpy is held. */
  readonly rise: TemperatureRise | null;
  readonly needsIceBath: boolean;
  readonly isNoteworthy: boolean;
}

/**
 * In how many portions to add something to the water in the vessel, by the adiabatic rise all of it would bring.
 * @param massG - of the lot's material
 * @param assayPercent - % w/w of the solute in it
 * @throws RangeError if a figure is not positive
 */
export function planAddition(
  substance: Substance,
  massG: number,
  assayPercent: number,
  waterMl: number,
): Addition {
  requirePositive(massG, `the mass of ${substance.name}`);
  requirePositive(waterMl, 'the water in the vessel');
  const { formula, molarMassGPerMol } = substance;
  const kind = additionKind(substance);
  const rise =
    substance.form === 'solid'
      ? dissolutionRise(formula, (massG * assayPercent) / 100 / molarMassGPerMol, waterMl)
      : dilutionRise({ formula, molarMassGPerMol, massPercent: assayPercent, massG }, waterMl);
  const byHeat = Math.ceil(Math.max(rise?.riseC ?? 0, 0) / MAX_RISE_PER_PORTION_C);
  const riseC = rise?.riseC ?? 0;
  return {
    kind,
    rise,
    portions: Math.max(byHeat, kind === 'plain' ? 1 : FEWEST_PORTIONS),
    needsIceBath: riseC >= ICE_BATH_FROM_RISE_C,
    isNoteworthy: Math.abs(riseC) >= NOTEWORTHY_RISE_C,
  };
}
