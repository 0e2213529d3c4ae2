import type { SolvedPoint } from './prepared-system';

const LN10 = Math.LN10;

/** What can be asked of a mixture, as one number. */
export type Quantity =
  | { readonly kind: 'pH' }
  /** mol/L of one dissolved species, such as the free ion. */
  | { readonly kind: 'molarity'; readonly species: string }
  /** Share, 0 to 1, of all there is of a component that is bound in one species or solid. */
  | { readonly kind: 'share'; readonly component: string; readonly species: string }
  /** mol/L of a component in all dissolved species. */
  | { readonly kind: 'dissolved'; readonly component: string }
  /** mol of a solid; where there is none, its saturation index, which is negative. */
  | { readonly kind: 'solid'; readonly solid: string }
  /** Equilibrium partial pressure, bar. */
  | { readonly kind: 'pressure'; readonly gas: string };

/** mol/L; 0 for a species the mixture does not have. */
export function molarityIn({ prepared, solution, point }: SolvedPoint, species: string): number {
  const column = prepared.columnOf.get(species);
  return column === undefined ? 0 : (solution.amounts[column] ?? 0) / point.volumeL;
}

export function phOf({ prepared, solution, point }: SolvedPoint): number | null {
  const row = prepared.columnOf.get('H+');
  return row === undefined ? point.pH : -(solution.lnActivity[row] ?? 0) / LN10;
}

function dissolvedIn({ prepared, solution, point }: SolvedPoint, component: string): number {
  const { components, aqueous } = prepared.system;
  const own = components.findIndex(({ id }) => id === component);
  const bound = aqueous.reduce(
    (sum, { stoich }, index) =>
      sum + (stoich[component] ?? 0) * (solution.amounts[components.length + index] ?? 0),
    0,
  );
  return ((own < 0 ? 0 : (solution.amounts[own] ?? 0)) + bound) / point.volumeL;
}

function shareIn(solved: SolvedPoint, component: string, species: string): number {
  const { prepared, solution, point } = solved;
  const total = point.amounts[component] ?? 0;
  if (total === 0) return 0;
  if (species === component) return (molarityIn(solved, species) * point.volumeL) / total;
  const { aqueous, solids } = prepared.system;
  const solid = solids.findIndex((each) => each.species === species);
  const count =
    (solid >= 0 ? solids[solid] : aqueous.find((each) => each.species === species))?.stoich[component] ?? 0;
  const mol = solid >= 0 ? (solution.phaseAmounts[solid] ?? 0) : molarityIn(solved, species) * point.volumeL;
  return (count * mol) / total;
}

/** The value of a quantity at a solved point; NaN for a pH where there is no H+, −∞ for a solid that can't form. */
export function valueOf(solved: SolvedPoint, quantity: Quantity): number {
  const { prepared, solution } = solved;
  switch (quantity.kind) {
    case 'pH':
      return phOf(solved) ?? NaN;
    case 'molarity':
      return molarityIn(solved, quantity.species);
    case 'share':
      return shareIn(solved, quantity.component, quantity.species);
    case 'dissolved':
      return dissolvedIn(solved, quantity.component);
    case 'solid': {
      const index = prepared.system.solids.findIndex(({ species }) => species === quantity.solid);
      if (index < 0) return -Infinity;
      const mol = solution.phaseAmounts[index] ?? 0;
      return mol > 0 ? mol : Math.min(0, (solution.lnSaturation[index] ?? 0) / LN10);
    }
    case 'pressure': {
      const gas = prepared.system.gases.find(({ species }) => species === quantity.gas);
      if (!gas) return 0;
      const rowOf = (id: string) => prepared.columnOf.get(id);
      const ln = Object.entries(gas.stoich).reduce(
        (sum, [id, count]) => sum + count * (solution.lnActivity[rowOf(id) ?? -1] ?? 0),
        gas.logK * LN10,
      );
      return Math.exp(ln);
    }
  }
}
