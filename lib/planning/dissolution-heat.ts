import { requireNotNegative, requirePositive } from './checks';

/**
 * Heat set free when something is dissolved or diluted, and the temperature it can reach if none is lost.
 * An estimate for choosing portions and cooling, not a measurement.
 */
export const WATER_HEAT_CAPACITY_J_PER_G_K = 4.18;

/**
 * Enthalpy of solution at infinite dilution, kJ/mol at 25 °C, by formula; positive: the solution cools.
 * Source: Parker, NSRDS-NBS 2 (1965), as printed in the CRC Handbook; those named in FROM_MEMORY from memory of the
 * CRC Handbook.
 */
export const SOLUTION_ENTHALPY_KJ_PER_MOL: Readonly<Record<string, number>> = {
  NaOH: -44.51,
  KOH: -57.61,
  LiOH: -23.56,
  NaCl: 3.88,
  NaNO3: 20.5,
  NaNO2: 13.89,
  NH4Cl: 14.78,
  NH4NO3: 25.69,
  NH4SCN: 22.59,
  AgNO3: 22.59,
  LiCl: -37.03,
  NaI: -7.53,
  NaCN: 1.21,
  KCl: 17.22,
  KI: 20.33,
  KNO3: 34.89,
  CaCl2: -81.3,
  Na2CO3: -26.7,
  K2CO3: -30.9,
};

/**
 * Heat set free on diluting an acid of molality m (mol per kg water) to infinite dilution, kJ/mol at 25 °C:
 * `[molality, heat]`, ascending; molality Infinity is the pure acid. Source: Parker, NSRDS-NBS 2 (1965), as printed in the CRC Handbook, Enthalpy of
 * Dilution of Acids. Sulfuric acid: integral heats of solution in Felder and Rousseau, Elementary Principles of
 * Chemical Processes, table B.11, from memory, counted from infinite dilution (96.19 kJ/mol), with
 * m = 55.51 / (mol water per mol acid).
 */
const DILUTION_HEAT_KJ_PER_MOL: Readonly<Record<string, readonly (readonly [number, number])[]>> = {
  HCl: [
    [0, 0],
    [1, 1.695],
    [2, 2.623],
    [3, 3.506],
    [4, 4.402],
    [5, 5.318],
    [6, 6.268],
    [7, 7.217],
    [8, 8.201],
    [9, 9.213],
    [10, 10.24],
    [15, 15.4],
    [20, 19.87],
    [55.506, 48.83],
  ],
  HNO3: [
    [0, 0],
    [1, 0.506],
    [2, 0.527],
    [3, 0.665],
    [4, 0.958],
    [5, 1.31],
    [6, 1.749],
    [7, 2.251],
    [8, 2.791],
    [9, 3.368],
    [10, 3.933],
    [15, 6.883],
    [20, 9.498],
    [55.506, 19.73],
    [Number.POSITIVE_INFINITY, 33.28],
  ],
  HClO4: [
    [0, 0],
    [1, -0.201],
    [2, -0.623],
    [4, -0.787],
    [6, -0.351],
    [8, 0.611],
    [10, 2.013],
    [15, 7.92],
    [20, 13.81],
    [Number.POSITIVE_INFINITY, 88.76],
  ],
  CH3COOH: [
    [0, 0],
    [1.5, 0.678],
    [3, 1.025],
    [6, 1.54],
    [10, 1.824],
    [20, 2.075],
    [55.506, 2.167],
    [Number.POSITIVE_INFINITY, 1.51],
  ],
  H2SO4: [
    [0, 0],
    [0.05551, 17.62],
    [0.11102, 19.46],
    [0.55506, 22.22],
    [1.11012, 22.85],
    [2.22, 23.89],
    [5.5506, 29.16],
    [11.1012, 38.16],
    [13.8765, 42.13],
    [18.502, 47.2],
    [27.753, 54.27],
    [37.004, 59.29],
    [55.506, 68.12],
    [111.012, 80.46],
    [Number.POSITIVE_INFINITY, 96.19],
  ],
};

/** Water per kilogram, mol. */
const WATER_MOL_PER_KG = 55.508;

/** Mole fraction of the acid from its molality; 1 for the pure acid. */
function moleFraction(molality: number): number {
  return molality === Number.POSITIVE_INFINITY ? 1 : molality / (molality + WATER_MOL_PER_KG);
}

/** Linear in mole fraction between rows: near a straight line in molality when dilute, in water per acid when strong. */
function heatToInfiniteDilution(rows: readonly (readonly [number, number])[], fraction: number): number {
  const above = rows.findIndex(([molality]) => moleFraction(molality) >= fraction);
  if (above <= 0) return above === 0 ? (rows[0]?.[1] ?? 0) : (rows.at(-1)?.[1] ?? 0);
  const [low, high] = [
    rows[above - 1] as readonly [number, number],
    rows[above] as readonly [number, number],
  ];
  const [x1, x2] = [moleFraction(low[0]), moleFraction(high[0])];
  return low[1] + ((high[1] - low[1]) * (fraction - x1)) / (x2 - x1);
}

export interface TemperatureRise {
  /** Adiabatic rise, °C; negative where the solution cools. */
  readonly riseC: number;
  readonly heatKj: number;
  readonly basis: 'dilution of a stock' | 'dissolution at infinite dilution';
  readonly source: string;
}

const SOURCE_PARKER = 'Parker, NSRDS-NBS 2 (1965), as printed in the CRC Handbook';
const SOURCE_FELDER =
  'Felder and Rousseau, Elementary Principles of Chemical Processes, table B.11, from memory';
const FROM_MEMORY = ['KCl', 'KI', 'KNO3', 'CaCl2', 'Na2CO3', 'K2CO3'];

/**
 * Adiabatic temperature rise on adding a stock of an acid to water. Heat capacity is that of the water alone, so
 * the rise is estimated on the high side.
 * @param stock - mass and mass fraction of what is added
 * @param waterMl - water already in the vessel
 * @returns null where no figures are held for the formula
 * @throws RangeError if a figure is out of range
 */
export function dilutionRise(
  stock: {
    readonly formula: string;
    readonly molarMassGPerMol: number;
    readonly massPercent: number;
    readonly massG: number;
  },
  waterMl: number,
): TemperatureRise | null {
  requirePositive(waterMl, 'the water in the vessel');
  requirePositive(stock.massG, 'the mass of stock');
  if (!(stock.massPercent > 0 && stock.massPercent <= 100))
    throw new RangeError(`a stock of ${stock.massPercent} %`);
  const rows = DILUTION_HEAT_KJ_PER_MOL[stock.formula];
  if (rows === undefined) return null;
  const amountMol = (stock.massG * stock.massPercent) / 100 / stock.molarMassGPerMol;
  const waterG = waterMl + stock.massG * (1 - stock.massPercent / 100);
  const waterMol = (grams: number) => (grams * WATER_MOL_PER_KG) / 1000;
  const ownWaterMol = waterMol(stock.massG * (1 - stock.massPercent / 100));
  const before = amountMol / (amountMol + ownWaterMol);
  const after = amountMol / (amountMol + waterMol(waterG));
  const perMolKj = heatToInfiniteDilution(rows, before) - heatToInfiniteDilution(rows, after);
  const heatKj = amountMol * perMolKj;
  return {
    heatKj,
    riseC: (1000 * heatKj) / (waterG * WATER_HEAT_CAPACITY_J_PER_G_K),
    basis: 'dilution of a stock',
    source: stock.formula === 'H2SO4' ? SOURCE_FELDER : SOURCE_PARKER,
  };
}

/**
 * Adiabatic temperature rise on dissolving a solid, by its enthalpy of solution at infinite dilution.
 * @param formula - anhydrous formula as in the table; hydrates are not held
 * @returns null where no figure is held
 */
export function dissolutionRise(formula: string, amountMol: number, waterMl: number): TemperatureRise | null {
  requireNotNegative(amountMol, 'the amount');
  requirePositive(waterMl, 'the water in the vessel');
  const enthalpy = SOLUTION_ENTHALPY_KJ_PER_MOL[formula];
  if (enthalpy === undefined) return null;
  const heatKj = -enthalpy * amountMol;
  return {
    heatKj,
    riseC: (1000 * heatKj) / (waterMl * WATER_HEAT_CAPACITY_J_PER_G_K),
    basis: 'dissolution at infinite dilution',
    source: FROM_MEMORY.includes(formula) ? 'CRC Handbook, from memory' : SOURCE_PARKER,
  };
}
