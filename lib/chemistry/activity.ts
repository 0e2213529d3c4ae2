import { debyeHuckel } from './temperature';
import type { ActivityModel } from './types';

/** Highest ionic strength, mol/L, each model is held to be good for. */
export const VALID_UP_TO: Readonly<Record<ActivityModel, number>> = { ideal: Infinity, davies: 0.5, 'extended-debye-huckel': 0.1 };

/** The empirical term of Davies' equation; 0.3 is his value of 1962. */
const DAVIES_B = 0.3;
/** Beyond this, far outside its range, Davies' equation turns upward without bound; it is held here. */
const DAVIES_HELD_FROM = 1;
/** Salting out of neutral species, log γ = 0.1 I: common practice. */
const NEUTRAL_SLOPE = 0.1;

/** Sizes for ions that have none of their own, pm, by charge; common practice. */
export function defaultIonSizePm(charge: number): number {
  const size = Math.abs(charge);
  if (size <= 1) return 400;
  if (size === 2) return charge > 0 ? 600 : 450;
  return 500;
}

/**
 * ln γ of one species.
 * @param ionicStrength - mol/L, ≥ 0
 * @see Davies, Ion Association (1962); Kielland, J. Am. Chem. Soc. 59 (1937) 1675
 */
export function lnGamma(model: ActivityModel, charge: number, ionSizePm: number | null, ionicStrength: number, temperatureC: number): number {
  if (model === 'ideal' || ionicStrength === 0) return 0;
  if (charge === 0) return NEUTRAL_SLOPE * Math.min(ionicStrength, DAVIES_HELD_FROM) * Math.LN10;
  const { a, b } = debyeHuckel(temperatureC);
  const squared = charge * charge;
  if (model === 'davies') {
    const held = Math.min(ionicStrength, DAVIES_HELD_FROM);
    const root = Math.sqrt(held);
    return -a * squared * (root / (1 + root) - DAVIES_B * held) * Math.LN10;
  }
  const root = Math.sqrt(ionicStrength);
  const sizeAngstrom = (ionSizePm ?? defaultIonSizePm(charge)) / 100;
  return ((-a * squared * root) / (1 + b * sizeAngstrom * root)) * Math.LN10;
}
