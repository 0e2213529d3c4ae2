import type { ActivityLaw } from './solver/problem';
import { debyeHuckel } from './temperature';
import type { ActivityModel } from './types';

/** Highest ionic strength, mol/L, each model is held to be good for. */
export const VALID_UP_TO: Readonly<Record<ActivityModel, number>> = {
  ideal: Infinity,
  davies: 0.5,
  'extended-debye-huckel': 0.1,
};

/** The empirical term of Davies' equation; 0.3 is his value of 1962. */
const DAVIES_B = 0.3;
/** Beyond this, far outside its range, Davies' equation turns upward without bound; it is held here. */
const HELD_FROM = 1;
/** Salting out of neutral species, log γ = 0.1 I: common practice. */
const NEUTRAL_SLOPE = 0.1;
const LN10 = Math.LN10;

/** Sizes for ions that have none of their own, pm, by charge; common practice. */
export function defaultIonSizePm(charge: number): number {
  const size = Math.abs(charge);
  if (size <= 1) return 400;
  if (size === 2) return charge > 0 ? 600 : 450;
  return 500;
}

interface Solute {
  readonly charge: number;
  readonly ionSizePm: number | null;
}

/** ln γ of one solute and its derivative by the ionic strength, from I and √I. */
interface Coefficient {
  lnGamma(strength: number, root: number): number;
  slope(strength: number, root: number): number;
}

const NEUTRAL: Coefficient = {
  lnGamma: (strength) => NEUTRAL_SLOPE * LN10 * Math.min(strength, HELD_FROM),
  slope: (strength) => (strength < HELD_FROM ? NEUTRAL_SLOPE * LN10 : 0),
};

function daviesCoefficient(charge: number, a: number): Coefficient {
  const factor = -a * charge * charge * LN10;
  const atHeld = factor * (1 / 2 - DAVIES_B);
  return {
    lnGamma: (strength, root) =>
      strength < HELD_FROM ? factor * (root / (1 + root) - DAVIES_B * strength) : atHeld,
    slope: (strength, root) =>
      strength < HELD_FROM ? factor * (1 / (2 * root * (1 + root) ** 2) - DAVIES_B) : 0,
  };
}

function extendedCoefficient(charge: number, sizeAngstrom: number, a: number, b: number): Coefficient {
  const factor = -a * charge * charge * LN10;
  return {
    lnGamma: (_, root) => (factor * root) / (1 + b * sizeAngstrom * root),
    slope: (_, root) => factor / (2 * root * (1 + b * sizeAngstrom * root) ** 2),
  };
}

function coefficientOf(
  model: Exclude<ActivityModel, 'ideal'>,
  { charge, ionSizePm }: Solute,
  temperatureC: number,
): Coefficient {
  if (charge === 0) return NEUTRAL;
  const { a, b } = debyeHuckel(temperatureC);
  return model === 'davies'
    ? daviesCoefficient(charge, a)
    : extendedCoefficient(charge, (ionSizePm ?? defaultIonSizePm(charge)) / 100, a, b);
}

/**
 * ln γ of one species.
 * @param ionicStrength - mol/L, ≥ 0
 * @see Davies, Ion Association (1962); Kielland, J. Am. Chem. Soc. 59 (1937) 1675
 */
export function lnGamma(
  model: ActivityModel,
  charge: number,
  ionSizePm: number | null,
  ionicStrength: number,
  temperatureC: number,
): number {
  if (model === 'ideal' || ionicStrength === 0) return 0;
  return coefficientOf(model, { charge, ionSizePm }, temperatureC).lnGamma(
    ionicStrength,
    Math.sqrt(ionicStrength),
  );
}

/**
 * The coefficients of all dissolved species as the solver wants them.
 * @param soluteCount - dissolved species and, after them, gases, whose γ is 1
 * @returns null where every γ is 1
 */
export function activityLaw(
  model: ActivityModel,
  dissolved: readonly Solute[],
  soluteCount: number,
  temperatureC: number,
): ActivityLaw | null {
  if (model === 'ideal' || dissolved.every(({ charge }) => charge === 0)) return null;
  const keyOf = ({ charge, ionSizePm }: Solute) =>
    `${charge} ${model === 'davies' || charge === 0 ? '' : (ionSizePm ?? '')}`;
  const keys = [...new Set(dissolved.map(keyOf))];
  const kinds = keys.map((key) =>
    coefficientOf(
      model,
      dissolved.find((solute) => keyOf(solute) === key) ?? { charge: 0, ionSizePm: null },
      temperatureC,
    ),
  );
  const kindOf = Int32Array.from(dissolved, (solute) => keys.indexOf(keyOf(solute)));
  const strengthPerMol = new Float64Array(soluteCount);
  const values = new Float64Array(kinds.length);
  const slopes = new Float64Array(kinds.length);
  return {
    strengthPerMol,
    setVolume(volumeL) {
      dissolved.forEach(({ charge }, index) => {
        strengthPerMol[index] = (charge * charge) / (2 * volumeL);
      });
    },
    fill(strength, out, slope) {
      const root = Math.sqrt(strength);
      kinds.forEach((kind, index) => {
        values[index] = kind.lnGamma(strength, root);
        slopes[index] = kind.slope(strength, root);
      });
      for (let solute = 0; solute < kindOf.length; solute += 1) {
        const kind = kindOf[solute] ?? 0;
        out[solute] = values[kind] ?? 0;
        slope[solute] = slopes[kind] ?? 0;
      }
    },
  };
}
