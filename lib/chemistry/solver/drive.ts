import type { EquilibriumProblem } from './problem';
import { Tableau } from './tableau';

/**
 * Where to start: the reaction driven to completion. With constants far from one the equilibrium lies close
 * to a corner at which only n species or solids are left. That corner minimises Σ −lnK_j n_j under the mass
 * balances, a linear program; the simplex method walks to it from the components.
 */

/** Lets an artificial stock of a component leave whenever anything real can replace it. */
const ARTIFICIAL_LNK = -1e5;
const SAME = 1e-11;

/** @returns the tableau in the basis of that corner, or null where no amounts ≥ 0 fit the totals */
export function driveToCompletion(problem: EquilibriumProblem): Tableau | null {
  const { componentCount: n, soluteCount, phaseCount } = problem;
  const real = soluteCount + phaseCount;
  const short: number[] = [];
  const opposites: number[] = [];
  let scale = Number.MIN_VALUE;
  problem.totals.forEach((total, component) => {
    scale = Math.max(scale, Math.abs(total));
    if (total >= 0) return;
    const opposite = oppositeOf(problem, component);
    if (opposite < 0) short.push(component);
    else opposites.push(component, opposite);
  });
  const widened = short.length === 0 ? problem : withArtificial(problem, short);
  const table = new Tableau(widened, real + short.length);
  for (let k = 0; k < opposites.length; k += 2) table.pivot(opposites[k] ?? 0, opposites[k + 1] ?? 0);
  const free = new Uint8Array(real + short.length);
  problem.isReservoir.forEach((isReservoir, phase) => {
    if (!isReservoir) return;
    const column = soluteCount + phase;
    free[column] = 1;
    const row = largestRow(table, column, free);
    if (row >= 0) table.pivot(row, column);
  });
  short.forEach((component, index) => {
    const row = table.rowOf[component] ?? -1;
    if (row >= 0 && (table.totals[row] ?? 0) < 0) table.pivot(row, real + index);
  });

  for (let step = 0; step < 50 * (n + 2); step += 1) {
    const column = bestColumn(table, real, step > 20 * n);
    if (column < 0) break;
    const row = limitingRow(table, column, free, scale);
    if (row < 0) break;
    table.pivot(row, column);
  }
  for (let row = 0; row < n; row += 1) {
    if ((table.basis[row] ?? 0) < real) continue;
    if ((table.totals[row] ?? 0) > SAME * scale) return null;
    const column = anyColumn(table, row, real, free);
    if (column < 0) return null;
    table.pivot(row, column);
  }
  table.narrowTo(problem);
  return table;
}

/** A solute that is a component with its sign turned, as OH- is of H+; −1 where there is none. */
function oppositeOf(
  { componentCount: n, soluteCount, stoich }: EquilibriumProblem,
  component: number,
): number {
  for (let solute = n; solute < soluteCount; solute += 1) {
    if ((stoich[solute * n + component] ?? 0) >= 0) continue;
    let isAlone = true;
    for (let i = 0; i < n; i += 1) if (i !== component && stoich[solute * n + i] !== 0) isAlone = false;
    if (isAlone) return solute;
  }
  return -1;
}

function withArtificial(problem: EquilibriumProblem, short: readonly number[]): EquilibriumProblem {
  const { componentCount: n, stoich, lnK } = problem;
  const widerStoich = new Float64Array(stoich.length + short.length * n);
  widerStoich.set(stoich);
  const widerLnK = new Float64Array(lnK.length + short.length);
  widerLnK.set(lnK);
  widerLnK.fill(ARTIFICIAL_LNK, lnK.length);
  short.forEach((component, index) => {
    widerStoich[stoich.length + index * n + component] = -1;
  });
  return { ...problem, stoich: widerStoich, lnK: widerLnK };
}

/** The conversion that gains most; in a row of idle steps the first that gains, so that none repeat for ever. */
function bestColumn(table: Tableau, real: number, takeFirst: boolean): number {
  let best = -1;
  let gain = 1e-9;
  for (let column = 0; column < real; column += 1) {
    if ((table.rowOf[column] ?? -1) >= 0) continue;
    const lnK = table.lnK[column] ?? 0;
    if (lnK > gain) {
      best = column;
      if (takeFirst) return best;
      gain = lnK;
    }
  }
  return best;
}

/** The basis element that runs out first as a column grows; −1 where nothing limits it. */
function limitingRow(table: Tableau, column: number, free: Uint8Array, scale: number): number {
  let best = -1;
  let least = Infinity;
  let bestEntry = 0;
  for (let row = 0; row < table.n; row += 1) {
    const entry = table.at(row, column);
    if (entry <= 1e-9 || free[table.basis[row] ?? 0] === 1) continue;
    const ratio = Math.max(0, table.totals[row] ?? 0) / entry;
    if (ratio < least - SAME * scale || (ratio <= least + SAME * scale && entry > bestEntry)) {
      best = row;
      least = Math.min(least, ratio);
      bestEntry = entry;
    }
  }
  return best;
}

function largestRow(table: Tableau, column: number, free: Uint8Array): number {
  let best = -1;
  let largest = 1e-9;
  for (let row = 0; row < table.n; row += 1) {
    const size = Math.abs(table.at(row, column));
    if (size > largest && free[table.basis[row] ?? 0] !== 1) {
      best = row;
      largest = size;
    }
  }
  return best;
}

/** Any real column that can stand for a basis element of amount zero. */
function anyColumn(table: Tableau, row: number, real: number, free: Uint8Array): number {
  for (let column = 0; column < real; column += 1) {
    if ((table.rowOf[column] ?? -1) < 0 && free[column] !== 1 && Math.abs(table.at(row, column)) > 1e-9)
      return column;
  }
  return -1;
}
