import { requireNotNegative, requirePercent, requirePositive } from './checks';
import { DENSITY_TABLES_20C } from './density-tables';
import type { TabulatedSolute } from './density-tables';

type Row = readonly [massPercent: number, densityGPerMl: number];

/** Whether a density table is held for a solute, given by its formula (hydrate water is no part of it). */
export function isTabulated(formula: string): formula is TabulatedSolute {
  return Object.hasOwn(DENSITY_TABLES_20C, formula);
}

/** Strongest solution in the table of a solute, % w/w. */
export function tableEndMassPercent(solute: TabulatedSolute): number {
  return (DENSITY_TABLES_20C[solute].at(-1) as Row)[0];
}

/**
 * Lagrange interpolation through the four rows around `massPercent` (two on each side, fewer choices at the ends).
 * @param rows - at least 4 rows `[massPercent, densityGPerMl]`, ascending
 */
export function interpolateRows(rows: readonly Row[], massPercent: number): number {
  const above = rows.findIndex(([w]) => w >= massPercent);
  const upper = above === -1 ? rows.length - 1 : above;
  const first = Math.min(Math.max(upper - 2, 0), rows.length - 4);
  const four = rows.slice(first, first + 4);
  return four.reduce((sum, [wi, density], i) => {
    const weight = four.reduce(
      (product, [wj], j) => (i === j ? product : (product * (massPercent - wj)) / (wi - wj)),
      1,
    );
    return sum + weight * density;
  }, 0);
}

/**
 * Density of an aqueous solution at 20 °C, g/mL, interpolated in the table of its solute.
 * @param massPercent - % w/w, from 0 to the end of the table
 * @throws RangeError outside the table: nothing is extrapolated
 */
export function densityGPerMl(solute: TabulatedSolute, massPercent: number): number {
  const end = tableEndMassPercent(solute);
  if (!(massPercent >= 0 && massPercent <= end)) {
    throw new RangeError(
      `the density of ${solute} solutions is known up to ${end} % w/w, not at ${massPercent} %`,
    );
  }
  return interpolateRows(DENSITY_TABLES_20C[solute], massPercent);
}

/**
 * Strength of a solution, mol/L, from its mass fraction: c = 10 w ρ / M.
 * @param massPercent - w, % w/w
 * @param density - ρ, g/mL
 * @param molarMassGPerMol - M of the solute as counted in w
 * @throws RangeError if a figure is not positive or w is above 100 %
 */
export function molarityFromMassPercent(
  massPercent: number,
  density: number,
  molarMassGPerMol: number,
): number {
  requirePercent(massPercent, 'the mass fraction');
  requirePositive(density, 'the density');
  requirePositive(molarMassGPerMol, 'the molar mass');
  return (10 * massPercent * density) / molarMassGPerMol;
}

/**
 * Mass fraction, % w/w, of a tabulated solution of a given strength at 20 °C.
 * Solved by bisection: strength rises with mass fraction throughout every table.
 * @throws RangeError if the strength is negative or beyond the end of the table
 */
export function massPercentFromMolarity(
  solute: TabulatedSolute,
  molarity: number,
  molarMassGPerMol: number,
): number {
  requireNotNegative(molarity, 'the strength');
  requirePositive(molarMassGPerMol, 'the molar mass');
  const strength = (w: number) => (10 * w * densityGPerMl(solute, w)) / molarMassGPerMol;
  let [low, high] = [0, tableEndMassPercent(solute)];
  // The last rows of sulfuric acid bend down, yet 10 w ρ still rises to the end of the table.
  if (molarity > strength(high)) {
    throw new RangeError(`${molarity} mol/L is stronger than the strongest tabulated ${solute} solution`);
  }
  for (let i = 0; i < 100 && high - low > 1e-13 * high; i += 1) {
    const middle = (low + high) / 2;
    if (strength(middle) < molarity) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

export interface DilutedStock {
  readonly massPercent: number;
  readonly densityGPerMl: number;
  readonly volumeMl: number;
  /** Final volume less the sum of the volumes poured; negative where the liquids contract. */
  readonly volumeChangeMl: number;
  readonly molarity: number;
}

/**
 * What results from pouring a tabulated stock into water at 20 °C: masses add, the volume follows from the table.
 * @throws RangeError if the stock lies outside the table or a volume is negative
 */
export function diluteStock(
  solute: TabulatedSolute,
  stock: { readonly massPercent: number; readonly volumeMl: number },
  waterMl: number,
  molarMassGPerMol: number,
): DilutedStock {
  requirePositive(stock.volumeMl, 'the volume of stock');
  requireNotNegative(waterMl, 'the volume of water');
  const stockG = stock.volumeMl * densityGPerMl(solute, stock.massPercent);
  const totalG = stockG + waterMl * densityGPerMl(solute, 0);
  const massPercent = (stock.massPercent * stockG) / totalG;
  const density = densityGPerMl(solute, massPercent);
  const volumeMl = totalG / density;
  return {
    massPercent,
    densityGPerMl: density,
    volumeMl,
    volumeChangeMl: volumeMl - stock.volumeMl - waterMl,
    molarity: molarityFromMassPercent(massPercent, density, molarMassGPerMol),
  };
}
