import { repeatabilityG } from './balances';
import type { BalanceOwned, GlassOwned } from './equipment';
import type { BudgetInput, Influence } from './uncertainty';

/** Cubic expansion of water near 20 °C, per °C. @see EURACHEM/CITAC guide CG 4, example A1 */
export const WATER_EXPANSION_PER_C = 2.1e-4;
/** Half-width of the room's temperature around the 20 °C of the glass, °C: common practice for an unconditioned room. */
export const ROOM_TEMPERATURE_HALF_WIDTH_C = 4;
/**
 * Half-width of a molar mass, g/mol: the widest abridged uncertainty (± 0.02) among the elements usual in a prep
 * room except lithium, selenium and lead, which are wider. @see IUPAC abridged standard atomic weights 2021
 */
export const MOLAR_MASS_HALF_WIDTH_G_PER_MOL = 0.02;
/** Half-width of an assay without a certificate, % absolute: common practice for a catalogue figure. */
export const CATALOGUE_ASSAY_HALF_WIDTH_PERCENT = 0.5;
/** Half-width of an assay on a lot's certificate, % absolute: common practice for titrimetric certificates. */
export const CERTIFICATE_ASSAY_HALF_WIDTH_PERCENT = 0.1;

/** A weighed mass: repeatability, and the rounding of two readings (tared and loaded). */
export function massInput(balance: BalanceOwned, massG: number, exponent = 1): BudgetInput {
  const rounding = balance.readabilityG / 2;
  return {
    name: 'mass',
    unit: 'g',
    value: massG,
    exponent,
    influences: [
      {
        name: `repeatability of ${balance.name}`,
        distribution: 'normal',
        standardUncertainty: repeatabilityG(balance),
      },
      { name: 'rounding of the tared reading', distribution: 'rectangular', halfWidth: rounding },
      { name: 'rounding of the loaded reading', distribution: 'rectangular', halfWidth: rounding },
    ],
  };
}

/** The limit of error of a piece of glass: triangular, since its extremes are rare. */
function limitOfError(glass: GlassOwned): Influence {
  return {
    name: `limit of error of ${glass.name}`,
    distribution: 'triangular',
    halfWidth: glass.toleranceMl,
  };
}

/** One volume of a dilution. Both volumes share the room's temperature, which so cancels in their ratio. */
export function dilutionVolumeInput(glass: GlassOwned, volumeMl: number, exponent: number): BudgetInput {
  return {
    name: `volume in ${glass.name}`,
    unit: 'mL',
    value: volumeMl,
    exponent,
    influences: [limitOfError(glass)],
  };
}

/** The volume a weighed mass is made up to: limit of error and the expansion of water. */
export function madeVolumeInput(glass: GlassOwned, volumeMl: number): BudgetInput {
  const temperature: Influence = {
    name: `temperature within ${ROOM_TEMPERATURE_HALF_WIDTH_C} °C`,
    distribution: 'rectangular',
    halfWidth: volumeMl * ROOM_TEMPERATURE_HALF_WIDTH_C * WATER_EXPANSION_PER_C,
  };
  return {
    name: `volume in ${glass.name}`,
    unit: 'mL',
    value: volumeMl,
    exponent: -1,
    influences: [limitOfError(glass), temperature],
  };
}

/** The assay of a lot: rectangular around the certificate's figure, or more widely around the catalogue's. */
export function assayInput(
  assayPercent: number,
  source: 'certificate' | 'catalogue' | 'assumed',
  exponent = 1,
): BudgetInput {
  const halfWidth =
    source === 'certificate' ? CERTIFICATE_ASSAY_HALF_WIDTH_PERCENT : CATALOGUE_ASSAY_HALF_WIDTH_PERCENT;
  return {
    name: 'assay',
    unit: '%',
    value: assayPercent,
    exponent,
    influences: [{ name: `assay, ${source}`, distribution: 'rectangular', halfWidth }],
  };
}

export function molarMassInput(molarMassGPerMol: number): BudgetInput {
  return {
    name: 'molar mass',
    unit: 'g/mol',
    value: molarMassGPerMol,
    exponent: -1,
    influences: [
      { name: 'atomic weights', distribution: 'rectangular', halfWidth: MOLAR_MASS_HALF_WIDTH_G_PER_MOL },
    ],
  };
}

/** The density that turns a volume of a liquid lot into a mass: stated to two decimals, so ± 0.005 g/mL. */
export function densityInput(densityGPerMl: number, exponent: number): BudgetInput {
  return {
    name: 'density',
    unit: 'g/mL',
    value: densityGPerMl,
    exponent,
    influences: [{ name: 'last digit of the density', distribution: 'rectangular', halfWidth: 0.005 }],
  };
}
