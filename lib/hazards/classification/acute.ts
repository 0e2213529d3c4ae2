import { percentText } from './mixture';
import type { AssignedClass, Ingredient, Mixture, Route } from './mixture';

/** Upper ends of categories 1–4 (GHS table 3.1.1): mg/kg, mg/kg, mg/L, mg/L, ppm. */
const CATEGORY_LIMITS: Readonly<Record<Route, readonly number[]>> = {
  oral: [5, 50, 300, 2000],
  dermal: [50, 200, 1000, 2000],
  inh_vapour: [0.5, 2, 10, 20],
  inh_mist: [0.05, 0.5, 1, 5],
  inh_gas: [100, 500, 2500, 20_000],
};
/** Point estimates for a category alone (GHS table 3.1.2). */
const POINT_ESTIMATES: Readonly<Record<Route, readonly number[]>> = {
  oral: [0.5, 5, 100, 500],
  dermal: [5, 50, 300, 1100],
  inh_vapour: [0.05, 0.5, 3, 11],
  inh_mist: [0.005, 0.05, 0.5, 1.5],
  inh_gas: [10, 100, 700, 4500],
};
const CATEGORY_5_MG_KG = 5000;
const CATEGORY_5_ESTIMATE = 2500;
/** Ingredients of unknown toxicity change the formula above this sum. */
const UNKNOWN_MATTERS_FROM = 10;
/** Relevant from: categories 1–3 and category 4. */
const CUTOFF_GRAVE = 0.1;
const CUTOFF_MILD = 1;

const NAME: Readonly<Record<Route, string>> = {
  oral: 'oral',
  dermal: 'dermal',
  inh_vapour: 'inhalation',
  inh_mist: 'inhalation',
  inh_gas: 'inhalation',
};

function estimateOf(ingredient: Ingredient, route: Route): number | null {
  const given = ingredient.acuteToxicity[route];
  if (typeof given === 'number') return given;
  const category = /^cat(\d)$/.exec(given ?? '')?.[1];
  if (category === '5') return CATEGORY_5_ESTIMATE;
  if (category) return POINT_ESTIMATES[route][Number(category) - 1] ?? null;
  return null;
}

function categoryOf(route: Route, estimate: number): number | null {
  const index = CATEGORY_LIMITS[route].findIndex((limit) => estimate <= limit * (1 + 1e-9));
  return index < 0 ? null : index + 1;
}

/** The mixture's own estimate for a route, by 100/ATE = Σ C/ATE. */
export function mixtureEstimate(mixture: Mixture, route: Route): number | null {
  const countsCategory5 = mixture.regime !== 'CLP' && (route === 'oral' || route === 'dermal');
  let sum = 0;
  let unknown = 0;
  for (const ingredient of mixture.ingredients) {
    if (ingredient.acuteToxicity[route] === 'unknown' && ingredient.percent >= 1)
      unknown += ingredient.percent;
    const estimate = estimateOf(ingredient, route);
    if (estimate === null) continue;
    const category = categoryOf(route, estimate);
    if (category === null && !(countsCategory5 && estimate <= CATEGORY_5_MG_KG)) continue;
    if (ingredient.percent < (category !== null && category <= 3 ? CUTOFF_GRAVE : CUTOFF_MILD)) continue;
    sum += ingredient.percent / estimate;
  }
  if (sum === 0) return null;
  return (unknown > UNKNOWN_MATTERS_FROM ? 100 - unknown : 100) / sum;
}

/** Acute toxicity by each route; of the states of inhalation the graver one. */
export function acuteClasses(mixture: Mixture): AssignedClass[] {
  const best = new Map<string, { category: number; because: string }>();
  for (const route of Object.keys(CATEGORY_LIMITS) as Route[]) {
    const estimate = mixtureEstimate(mixture, route);
    const category = estimate === null ? null : categoryOf(route, estimate);
    if (estimate === null || category === null) continue;
    const name = NAME[route];
    const counted = mixture.ingredients.filter((ingredient) => estimateOf(ingredient, route) !== null);
    const because = `${counted.map((ingredient) => `${percentText(ingredient.percent)} ${ingredient.name}`).join(', ')}: estimate ${Number(estimate.toPrecision(3))} ${route.startsWith('inh') ? (route === 'inh_gas' ? 'ppm' : 'mg/L') : 'mg/kg'}`;
    const before = best.get(name);
    if (!before || category < before.category) best.set(name, { category, because });
  }
  return [...best].map(([name, { category, because }]) => ({
    class: `Acute Tox. ${category} ${name}`,
    because,
  }));
}
