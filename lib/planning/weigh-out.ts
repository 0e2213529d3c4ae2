import type { Substance } from '../chemistry/types';
import { requirePercent, requirePositive } from './checks';
import { densityGPerMl as tabulatedDensity, isTabulated, tableEndMassPercent } from './density';

/** What is known of the bottle a substance is taken from. */
export interface LotMaterial {
  /** What the bottle holds; may be another hydrate of what the recipe names. */
  readonly substance: Substance;
  /** % w/w on the lot's certificate; null: the catalogue's figure is used. */
  readonly assayPercent: number | null;
  /** On the certificate or label; null: from the density table of the solute, else the catalogue's figure. */
  readonly densityGPerMl: number | null;
}

export type AssaySource = 'certificate' | 'catalogue' | 'assumed';

/** How much solute one gram, and one millilitre, of a lot really holds. */
export interface LotStrength {
  readonly assayPercent: number;
  readonly assaySource: AssaySource;
  readonly molPerG: number;
  /** null for solids, and for liquids of unknown density. */
  readonly densityGPerMl: number | null;
  readonly densitySource: 'certificate' | 'density table at 20 °C' | 'catalogue' | null;
  /** Strength of a liquid as a stock, mol/L; null where its density is not known. */
  readonly molarity: number | null;
}

function released(substance: Substance): string {
  const amounts = Object.entries(substance.releases ?? {}).filter(
    ([component, amount]) => component !== 'H2O' && amount !== 0,
  );
  return JSON.stringify(amounts.sort(([a], [b]) => (a < b ? -1 : 1)));
}

/**
 * Whether a bottle can serve for what a recipe names: the same substance, or one that releases the same things in
 * the same amounts per formula unit (another hydrate, or the anhydrous form).
 */
export function canServeFor(recipe: Substance, bottle: Substance): boolean {
  if (recipe.id === bottle.id) return true;
  return recipe.releases !== null && bottle.releases !== null && released(recipe) === released(bottle);
}

function densityOf(
  lot: LotMaterial,
  assayPercent: number,
): Pick<LotStrength, 'densityGPerMl' | 'densitySource'> {
  const { substance } = lot;
  if (substance.form === 'solid') return { densityGPerMl: null, densitySource: null };
  if (lot.densityGPerMl !== null) return { densityGPerMl: lot.densityGPerMl, densitySource: 'certificate' };
  // The catalogue's density belongs to the catalogue's assay; a lot of another assay follows the table.
  const isOther = lot.assayPercent !== null && lot.assayPercent !== substance.assayPercent;
  if (
    isTabulated(substance.formula) &&
    assayPercent <= tableEndMassPercent(substance.formula) &&
    (isOther || substance.densityGPerMl === null)
  ) {
    return {
      densityGPerMl: tabulatedDensity(substance.formula, assayPercent),
      densitySource: 'density table at 20 °C',
    };
  }
  return substance.densityGPerMl === null
    ? { densityGPerMl: null, densitySource: null }
    : { densityGPerMl: substance.densityGPerMl, densitySource: 'catalogue' };
}

/**
 * The strength of a lot as it stands on the shelf.
 * @throws RangeError if the assay or density is out of range
 */
export function lotStrength(lot: LotMaterial): LotStrength {
  const { substance } = lot;
  requirePositive(substance.molarMassGPerMol, `the molar mass of ${substance.name}`);
  const assayPercent = lot.assayPercent ?? substance.assayPercent ?? 100;
  requirePercent(assayPercent, `the assay of ${substance.name}`);
  const assaySource =
    lot.assayPercent !== null ? 'certificate' : substance.assayPercent !== null ? 'catalogue' : 'assumed';
  const molPerG = assayPercent / 100 / substance.molarMassGPerMol;
  const { densityGPerMl, densitySource } = densityOf(lot, assayPercent);
  if (densityGPerMl !== null) requirePositive(densityGPerMl, `the density of ${substance.name}`);
  return {
    assayPercent,
    assaySource,
    molPerG,
    densityGPerMl,
    densitySource,
    molarity: densityGPerMl === null ? null : 1000 * molPerG * densityGPerMl,
  };
}

export interface WeighOut {
  readonly amountMol: number;
  /** Mass of the lot's material, corrected for hydrate and assay. */
  readonly massG: number;
  /** Volume of a liquid lot, by C1V1 with its density; null for solids and unknown densities. */
  readonly volumeMl: number | null;
  /** Mass if the recipe's own substance were pure: what an uncorrected recipe would say. */
  readonly uncorrectedG: number;
  readonly lot: LotStrength;
}

/**
 * How much of a lot makes a volume of solution of a given strength.
 *
 * m = c V M / w, with M the molar mass of what the bottle holds and w its assay; for liquids V1 = m / ρ, which is
 * c V / c1.
 * @param solute - strength in mol of formula units per litre of solution
 * @throws RangeError if a figure is not positive, or the bottle can't serve for what the recipe names
 */
export function weighOut(
  solute: { readonly substance: Substance; readonly molarity: number },
  volumeMl: number,
  lot: LotMaterial,
): WeighOut {
  requirePositive(solute.molarity, `the strength of ${solute.substance.name}`);
  requirePositive(volumeMl, 'the volume');
  if (!canServeFor(solute.substance, lot.substance)) {
    throw new RangeError(`a bottle of ${lot.substance.name} can't serve for ${solute.substance.name}`);
  }
  const strength = lotStrength(lot);
  const amountMol = (solute.molarity * volumeMl) / 1000;
  const massG = amountMol / strength.molPerG;
  return {
    amountMol,
    massG,
    volumeMl: strength.densityGPerMl === null ? null : massG / strength.densityGPerMl,
    uncorrectedG: amountMol * solute.substance.molarMassGPerMol,
    lot: strength,
  };
}

/**
 * Volume of a stock to dilute, mL, by C1V1 = C2V2.
 * @throws RangeError if a figure is not positive or the stock is weaker than what is wanted
 */
export function stockVolumeMl(stockMolarity: number, molarity: number, volumeMl: number): number {
  requirePositive(stockMolarity, 'the strength of the stock');
  requirePositive(molarity, 'the strength wanted');
  requirePositive(volumeMl, 'the volume');
  if (molarity > stockMolarity)
    throw new RangeError(`${molarity} mol/L can't be diluted from ${stockMolarity} mol/L`);
  return (molarity * volumeMl) / stockMolarity;
}
