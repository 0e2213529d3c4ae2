import { densityGPerMl, isTabulated, molarityFromMassPercent, tableEndMassPercent } from './density';

/** Why a stated stock can't be right. */
export interface StockDoubt {
  readonly code: 'beyond-table' | 'density-off' | 'strength-off';
  readonly message: string;
}

/** Labels give density to two decimals, so a gap of 2 % is more than their rounding. */
const ALLOWED_GAP = 0.02;
/** Stocks are sold a little stronger than a table's last row (sodium hydroxide 50.5 %), not much. */
const ALLOWED_BEYOND_TABLE = 1.02;

/**
 * Whether mass fraction, density and strength of a stock agree with each other (c = 10 w ρ / M) and, where a table
 * is held, with the densities of that solute.
 * @param stock.molarity - as stated, or null if only mass fraction and density are known
 * @returns doubts; empty when nothing disagrees
 */
export function doubtsAboutStock(stock: {
  readonly formula: string;
  readonly molarMassGPerMol: number;
  readonly massPercent: number;
  readonly densityGPerMl: number;
  readonly molarity: number | null;
}): StockDoubt[] {
  const doubts: StockDoubt[] = [];
  const { formula, massPercent } = stock;
  const implied = molarityFromMassPercent(massPercent, stock.densityGPerMl, stock.molarMassGPerMol);
  if (stock.molarity !== null && Math.abs(implied / stock.molarity - 1) > ALLOWED_GAP) {
    doubts.push({
      code: 'strength-off',
      message: `${massPercent} % and ${stock.densityGPerMl} g/mL make ${implied.toPrecision(3)} mol/L of ${formula}, not ${stock.molarity}.`,
    });
  }
  if (!isTabulated(formula)) return doubts;
  const end = tableEndMassPercent(formula);
  if (massPercent > end * ALLOWED_BEYOND_TABLE) {
    doubts.push({
      code: 'beyond-table',
      message: `${formula} solutions are tabulated up to ${end} %; ${massPercent} % is not an ordinary stock.`,
    });
    return doubts;
  }
  const expected = densityGPerMl(formula, Math.min(massPercent, end));
  if (Math.abs(stock.densityGPerMl / expected - 1) > ALLOWED_GAP) {
    doubts.push({
      code: 'density-off',
      message: `${formula} of ${massPercent} % has a density of ${expected.toFixed(3)} g/mL, not ${stock.densityGPerMl}.`,
    });
  }
  return doubts;
}
