import type { SpecificLimit } from '../tables';

export type Regime = 'CLP' | 'HazCom' | 'UN';
export type Route = 'oral' | 'dermal' | 'inh_vapour' | 'inh_mist' | 'inh_gas';

/** What a mixture is made of, per cent by mass. */
export interface Ingredient {
  readonly name: string;
  readonly percent: number;
  /** Such as `Skin Corr. 1A`, `STOT SE 3 (respiratory)`. */
  readonly classes: readonly string[];
  readonly specificLimits: readonly SpecificLimit[];
  /** mg/kg or mg/L, `cat3` for a category alone, `NC` for known not toxic, `unknown`. */
  readonly acuteToxicity: Partial<Readonly<Record<Route, number | string>>>;
  readonly mAcute: number;
  readonly mChronic: number;
  /** An acid or base whose limits already take its pH into account. */
  readonly isAcidOrBase: boolean;
  /** Counts from 1 % (corrosive) or 3 % (irritant) instead of by sums. */
  readonly isNonAdditive: boolean;
  readonly corrosiveToMetalsFromPercent: number | null;
  readonly supplemental: readonly { readonly code: string; readonly fromPercent: number }[];
}
export interface Mixture {
  readonly ingredients: readonly Ingredient[];
  readonly pH: number | null;
  /** °C, closed cup; null where nothing burns. */
  readonly flashPointC: number | null;
  /** mm²/s at 40 °C; null for aqueous solutions. */
  readonly viscosity: number | null;
  readonly regime: Regime;
  /** True where data show that an extreme pH does not corrode. */
  readonly isPhOverridden?: boolean;
}

/** A class of the mixture, with the reason in a few words. */
export interface AssignedClass {
  readonly class: string;
  readonly because: string;
}

/** 2.0 % computed in floating point must count as 2.0 %. */
const EQUAL = 1e-9;

export function reaches(value: number, limit: number): boolean {
  return value >= limit * (1 - EQUAL);
}

export function percentText(percent: number): string {
  return `${Number(percent.toPrecision(percent < 1 ? 2 : 3))} %`;
}

/** The lowest specific limit an ingredient has for a class; null where it has none. */
export function specificMinimum(ingredient: Ingredient, className: string): number | null {
  const found = ingredient.specificLimits.filter((limit) => limit.class === className).map(({ min }) => min);
  return found.length > 0 ? Math.min(...found) : null;
}

export function hasClass(ingredient: Ingredient, prefix: string): boolean {
  return ingredient.classes.some((name) => name.startsWith(prefix));
}
