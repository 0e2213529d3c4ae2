/**
 * Uncertainty of a result that is a product of powers, y = k Π x_i^(p_i), by the law of propagation:
 * (u(y)/y)² = Σ (p_i u(x_i)/x_i)².
 *
 * @see JCGM 100:2008 (GUM), 5.1.6, and EURACHEM/CITAC guide CG 4 (QUAM), section 8
 */

/** What is known of one influence, and by which distribution it becomes a standard uncertainty. */
export type Influence =
  | { readonly name: string; readonly distribution: 'normal'; readonly standardUncertainty: number }
  | { readonly name: string; readonly distribution: 'normal-95'; readonly halfWidth: number }
  | { readonly name: string; readonly distribution: 'rectangular'; readonly halfWidth: number }
  | { readonly name: string; readonly distribution: 'triangular'; readonly halfWidth: number };

/** One input of the product, in any unit; influences in the same unit. */
export interface BudgetInput {
  readonly name: string;
  readonly unit: string;
  readonly value: number;
  /** p: 1 for a factor, −1 for a divisor; a share between 0 and 1 for one part of a sum. */
  readonly exponent: number;
  readonly influences: readonly Influence[];
}

export interface Contribution {
  readonly input: string;
  readonly influence: string;
  readonly distribution: Influence['distribution'];
  /** In the unit of the input. */
  readonly standardUncertainty: number;
  /** |p| u(x)/x: its part of the relative uncertainty of the result. */
  readonly relative: number;
  /** Its share of the variance, %. */
  readonly sharePercent: number;
}

export interface UncertaintyBudget {
  readonly value: number;
  readonly standardUncertainty: number;
  readonly relativeStandardUncertainty: number;
  readonly coverageFactor: number;
  readonly expandedUncertainty: number;
  readonly relativeExpandedUncertainty: number;
  /** Largest first. */
  readonly contributions: readonly Contribution[];
}

export const COVERAGE_FACTOR = 2;

/**
 * Standard uncertainty of one influence: rectangular a/√3, triangular a/√6, 95 % interval a/1.96.
 * @throws RangeError if the figure is negative or not finite
 */
export function standardUncertaintyOf(influence: Influence): number {
  const figure = influence.distribution === 'normal' ? influence.standardUncertainty : influence.halfWidth;
  if (!Number.isFinite(figure) || figure < 0)
    throw new RangeError(`the uncertainty of ${influence.name} is ${figure}`);
  const divisor = { normal: 1, 'normal-95': 1.96, rectangular: Math.sqrt(3), triangular: Math.sqrt(6) };
  return figure / divisor[influence.distribution];
}

/** Combined standard uncertainty of one input, in its unit. */
export function inputUncertainty(input: BudgetInput): number {
  return Math.hypot(...input.influences.map(standardUncertaintyOf));
}

/**
 * The budget of a result.
 * @param value - the result itself, from the caller's own model; only relative parts are taken from the inputs
 * @throws RangeError if the value or an input is not positive and finite
 */
export function uncertaintyBudget(
  value: number,
  inputs: readonly BudgetInput[],
  coverageFactor = COVERAGE_FACTOR,
): UncertaintyBudget {
  for (const [name, figure] of [
    ['the result', value] as const,
    ...inputs.map((i) => [i.name, i.value] as const),
  ]) {
    if (!Number.isFinite(figure) || figure <= 0)
      throw new RangeError(`${name} must be above 0 for a budget, not ${figure}`);
  }
  const parts = inputs.flatMap((input) =>
    input.influences.map((influence) => {
      const standardUncertainty = standardUncertaintyOf(influence);
      const relative = (Math.abs(input.exponent) * standardUncertainty) / input.value;
      return {
        input: input.name,
        influence: influence.name,
        distribution: influence.distribution,
        standardUncertainty,
        relative,
      };
    }),
  );
  const relativeStandardUncertainty = Math.hypot(...parts.map((part) => part.relative));
  const variance = relativeStandardUncertainty ** 2;
  const contributions = parts
    .map((part) => ({ ...part, sharePercent: variance === 0 ? 0 : (100 * part.relative ** 2) / variance }))
    .sort((a, b) => b.relative - a.relative);
  return {
    value,
    standardUncertainty: value * relativeStandardUncertainty,
    relativeStandardUncertainty,
    coverageFactor,
    expandedUncertainty: value * coverageFactor * relativeStandardUncertainty,
    relativeExpandedUncertainty: coverageFactor * relativeStandardUncertainty,
    contributions,
  };
}
