import { requirePositive } from './checks';
import type { GlassOwned } from './equipment';
import { hasScale, SMALLEST_SHARE_OF_SCALE } from './glassware';
import { dilutionVolumeInput } from './strength-inputs';
import type { BudgetInput } from './uncertainty';
import { COVERAGE_FACTOR, inputUncertainty } from './uncertainty';

/** One dilution: what is taken of the solution before, and what it is made up in. */
export interface DilutionStep {
  readonly measure: GlassOwned;
  readonly takeMl: number;
  readonly flask: GlassOwned;
  readonly makeMl: number;
}

export interface DilutionRoute {
  readonly steps: readonly DilutionStep[];
  /** Relative expanded uncertainty (k = 2) of the volumes alone. */
  readonly relativeExpanded: number;
  readonly inputs: readonly BudgetInput[];
  /** Solution made but not carried on, mL. */
  readonly leftMl: number;
}

/** The vessel of the last step and the volume made in it. */
export interface FinalVessel {
  readonly glass: GlassOwned;
  readonly makeMl: number;
}

export const MAX_DILUTIONS = 3;

/** (u/x)² of one volume. */
export function volumeVariance(glass: GlassOwned, volumeMl: number): number {
  return (inputUncertainty(dilutionVolumeInput(glass, volumeMl, 1)) / volumeMl) ** 2;
}

export function stepVariance(step: DilutionStep): number {
  return volumeVariance(step.measure, step.takeMl) + volumeVariance(step.flask, step.makeMl);
}

/** Relative expanded uncertainty from a sum of relative variances. */
export function expandedOf(variance: number): number {
  return COVERAGE_FACTOR * Math.sqrt(variance);
}

export function volumeInputs(steps: readonly DilutionStep[]): BudgetInput[] {
  return steps.flatMap((step) => [
    dilutionVolumeInput(step.measure, step.takeMl, 1),
    dilutionVolumeInput(step.flask, step.makeMl, -1),
  ]);
}

/** Solution left behind in the flasks between the steps, mL. */
export function leftBehindMl(steps: readonly DilutionStep[]): number {
  return steps.reduce((sum, step, i) => sum + step.makeMl - (steps[i + 1]?.takeMl ?? step.makeMl), 0);
}

/** The finest piece of each size, smallest first: others of that size only add permutations. */
export function finestOfEachSize(glass: readonly GlassOwned[]): GlassOwned[] {
  const finest = new Map<string, GlassOwned>();
  for (const piece of glass) {
    const key = `${hasScale(piece)} ${piece.nominalMl}`;
    const held = finest.get(key);
    if (held === undefined || piece.toleranceMl < held.toleranceMl) finest.set(key, piece);
  }
  return [...finest.values()].sort(
    (a, b) => a.nominalMl - b.nominalMl || Number(hasScale(a)) - Number(hasScale(b)),
  );
}

/** Pipettes and burettes: what a dilution is measured with. */
export function measuresOf(glass: readonly GlassOwned[]): GlassOwned[] {
  return finestOfEachSize(glass.filter((piece) => piece.use !== 'flask' && piece.use !== 'cylinder'));
}

export function flasksOf(glass: readonly GlassOwned[]): GlassOwned[] {
  return finestOfEachSize(glass.filter((piece) => piece.use === 'flask'));
}

function delivers(measure: GlassOwned, takeMl: number): boolean {
  if (takeMl > measure.nominalMl * (1 + 1e-9)) return false;
  return hasScale(measure)
    ? takeMl >= SMALLEST_SHARE_OF_SCALE * measure.nominalMl * (1 - 1e-9)
    : Math.abs(takeMl / measure.nominalMl - 1) < 1e-6;
}

/** Every chain of exactly `count` steps that dilutes by `factor` and ends in the final vessel. */
function chainsOf(
  measures: readonly GlassOwned[],
  flasks: readonly GlassOwned[],
  final: FinalVessel,
  factor: number,
  count: number,
): DilutionStep[][] {
  if (factor <= 1) return [];
  if (count === 1) {
    const takeMl = final.makeMl / factor;
    return measures
      .filter((measure) => delivers(measure, takeMl))
      .map((measure) => [{ measure, takeMl, flask: final.glass, makeMl: final.makeMl }]);
  }
  return flasks.flatMap((flask) =>
    measures
      .filter((measure) => measure.nominalMl < flask.nominalMl)
      .flatMap((measure) => {
        const step: DilutionStep = { measure, takeMl: measure.nominalMl, flask, makeMl: flask.nominalMl };
        const rest = (factor * step.takeMl) / step.makeMl;
        return chainsOf(measures, flasks, final, rest, count - 1)
          .filter(([next]) => next !== undefined && next.takeMl < flask.nominalMl)
          .map((after) => [step, ...after]);
      }),
  );
}

/**
 * The fewest dilutions that bring a stock down by `factor` into the final vessel, with the volumes' own expanded
 * uncertainty (k = 2) within `maxRelative`; among those the one that leaves least behind, then the surest.
 * @param factor - stock strength over final strength, above 1
 * @param glass - the room's volumetric glass
 * @returns null if none of up to `MAX_DILUTIONS` steps meets the tolerance
 * @throws RangeError if the factor does not exceed 1 or the tolerance is not positive
 */
export function planDilution(
  factor: number,
  glass: readonly GlassOwned[],
  final: FinalVessel,
  maxRelative: number,
): DilutionRoute | null {
  requirePositive(maxRelative, 'the tolerance');
  if (!Number.isFinite(factor) || factor <= 1)
    throw new RangeError(`a dilution by ${factor} dilutes nothing`);
  const measures = measuresOf(glass);
  const flasks = flasksOf(glass);
  for (let count = 1; count <= MAX_DILUTIONS; count += 1) {
    const fitting = chainsOf(measures, flasks, final, factor, count)
      .map((steps) => ({
        steps,
        leftMl: leftBehindMl(steps),
        relativeExpanded: expandedOf(steps.reduce((sum, step) => sum + stepVariance(step), 0)),
      }))
      .filter((route) => route.relativeExpanded <= maxRelative)
      .sort((a, b) => a.leftMl - b.leftMl || a.relativeExpanded - b.relativeExpanded);
    const best = fitting[0];
    if (best !== undefined) return { ...best, inputs: volumeInputs(best.steps) };
  }
  return null;
}
