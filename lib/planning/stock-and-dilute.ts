import { requirePositive } from './checks';
import type { DilutionRoute, DilutionStep, FinalVessel } from './dilution-route';
import {
  expandedOf,
  flasksOf,
  leftBehindMl,
  MAX_DILUTIONS,
  measuresOf,
  stepVariance,
  volumeInputs,
} from './dilution-route';
import type { GlassOwned } from './equipment';
import { madeVolumeInput } from './strength-inputs';
import { inputUncertainty } from './uncertainty';

export interface StockRoute {
  /** What the weighed solid is dissolved and made up in. */
  readonly stockFlask: GlassOwned;
  readonly stockMolarity: number;
  /** Mass to weigh for the stock. */
  readonly massG: number;
  /** Its inputs and uncertainty include the stock flask. */
  readonly dilution: DilutionRoute;
}

interface Candidate {
  readonly steps: readonly DilutionStep[];
  readonly stockFlask: GlassOwned;
  readonly factor: number;
  readonly massG: number;
  readonly variance: number;
}

/** (u/V)² of the stock flask. */
function madeVariance(flask: GlassOwned): number {
  return (inputUncertainty(madeVolumeInput(flask, flask.nominalMl)) / flask.nominalMl) ** 2;
}

/** Solution made but not carried on, stock flask included, mL. */
function wastedMl({ steps, stockFlask }: Candidate): number {
  return leftBehindMl(steps) + stockFlask.nominalMl - (steps[0]?.takeMl ?? 0);
}

/**
 * A route for a mass too small to weigh: weigh more into a stock flask, then dilute, with the fewest dilutions that
 * meet the tolerance; among those, little substance (in minimum weights) and little solution wasted (in volumes of the
 * batch) count alike. The mass is free, so single-volume pipettes do: the stock is made just as strong as they ask.
 *
 * @param massG - the mass that would be needed in the final vessel
 * @param minimumMassG - smallest mass the balance may weigh
 * @param molarity - strength wanted in the final vessel
 * @param maxRelative - limit for the expanded uncertainty (k = 2) of all volumes together
 * @param maxStockMolarity - what still dissolves; null if not known
 * @returns null if no route of up to `MAX_DILUTIONS` dilutions meets the tolerance
 * @throws RangeError if a figure is not positive
 */
export function planStockRoute(
  massG: number,
  minimumMassG: number,
  molarity: number,
  glass: readonly GlassOwned[],
  final: FinalVessel,
  maxRelative: number,
  maxStockMolarity: number | null,
): StockRoute | null {
  requirePositive(massG, 'the mass');
  requirePositive(minimumMassG, 'the minimum weight');
  requirePositive(molarity, 'the strength');
  requirePositive(maxRelative, 'the tolerance');
  const measures = measuresOf(glass);
  const flasks = flasksOf(glass);

  const effort = (candidate: Candidate) =>
    candidate.massG / minimumMassG + wastedMl(candidate) / final.makeMl;
  const isBetter = (a: Candidate, b: Candidate) => (effort(a) - effort(b) || a.variance - b.variance) < 0;
  let best: Candidate | null = null;
  const consider = (steps: readonly DilutionStep[], factor: number, variance: number) => {
    const first = steps[0];
    if (first === undefined || (maxStockMolarity !== null && molarity * factor > maxStockMolarity)) return;
    for (const stockFlask of flasks) {
      const stockG = (massG * factor * stockFlask.nominalMl) / final.makeMl;
      if (first.takeMl >= stockFlask.nominalMl || stockG < minimumMassG) continue;
      const total = variance + madeVariance(stockFlask);
      const candidate = { steps, stockFlask, factor, massG: stockG, variance: total };
      if (expandedOf(total) <= maxRelative && (best === null || isBetter(candidate, best))) best = candidate;
    }
  };
  /** Builds chains backwards from the final vessel, dropping those already beyond the tolerance. */
  const extend = (
    after: readonly DilutionStep[],
    factor: number,
    variance: number,
    flask: GlassOwned,
    makeMl: number,
    left: number,
  ) => {
    for (const measure of measures) {
      if (measure.nominalMl >= makeMl) continue;
      const step: DilutionStep = { measure, takeMl: measure.nominalMl, flask, makeMl };
      const sum = variance + stepVariance(step);
      if (expandedOf(sum) > maxRelative) continue;
      const steps = [step, ...after];
      const reached = (factor * makeMl) / measure.nominalMl;
      if (left === 1) consider(steps, reached, sum);
      else {
        for (const before of flasks) {
          if (before.nominalMl > measure.nominalMl)
            extend(steps, reached, sum, before, before.nominalMl, left - 1);
        }
      }
    }
  };

  for (let count = 1; count <= MAX_DILUTIONS; count += 1) {
    extend([], 1, 0, final.glass, final.makeMl, count);
    const found = best as Candidate | null;
    if (found === null) continue;
    const { steps, stockFlask, factor } = found;
    return {
      stockFlask,
      stockMolarity: molarity * factor,
      massG: found.massG,
      dilution: {
        steps,
        leftMl: wastedMl(found),
        relativeExpanded: expandedOf(found.variance),
        inputs: [...volumeInputs(steps), madeVolumeInput(stockFlask, stockFlask.nominalMl)],
      },
    };
  }
  return null;
}
