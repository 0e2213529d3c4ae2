import solubilityData from './data/solubility.json';
import type { Substance } from './types';

interface Solubility {
  /** Of the salt alone in pure water; an estimate good to about 10 %. */
  readonly molarity: number;
  readonly temperatureC: number;
  readonly source: string;
}

const byFormula = new Map<string, Solubility>(
  solubilityData.salts.map(({ formula, approxLimitMolarity, limitTemperatureC, source }) => [
    formula,
    { molarity: approxLimitMolarity, temperatureC: limitTemperatureC, source },
  ]),
);

/** The formula without its water of crystallisation, as `CuSO4` of `CuSO4.5H2O`. */
function anhydrous(formula: string): string {
  return formula.split('.')[0] ?? formula;
}

/** How much of a substance dissolves in water; null where no figure is held, as for what mixes freely. */
export function solubilityOf({ formula }: Pick<Substance, 'formula'>): Solubility | null {
  return byFormula.get(anhydrous(formula)) ?? null;
}
