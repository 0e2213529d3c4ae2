import { findSubstance } from '../../chemistry/substances';
import type { Solute } from '../../chemistry/types';
import { findSubstanceHazards } from '../tables';
import type { SubstanceHazards } from '../tables';
import type { Classification } from '../types';
import { classifyMixture } from './classify-mixture';
import { flashPointOf } from './flash-points';
import type { Ingredient, Regime, Route } from './mixture';
import { hazardStatements, pictogramsFor, precautionsFor, signalWordFor } from './statements';
import { supplementalCodes } from './supplemental';

export interface SolutionToClassify {
  readonly solutes: readonly Solute[];
  /** g/mL as measured; the safe estimate is used where absent. */
  readonly densityGPerMl?: number | null;
  readonly pH?: number | null;
  readonly regime?: Regime;
}

/** g of chlorine per mol of hypochlorite: its limits count active chlorine. */
const ACTIVE_CHLORINE_G_PER_MOL = 70.9;
/** Percent by mass from which a solution keeps H290; practice of suppliers differs, values from their sheets (from memory). */
const METAL_CORROSION_FROM: Readonly<Record<string, number>> = {
  'hydrochloric-acid': 0.1,
  'sodium-hydroxide': 0.5,
  'potassium-hydroxide': 0.5,
};
const METAL_CORROSION_USUALLY_FROM = 1;
/** Percent from which an EUH statement is carried over (CLP Annex II; acid-sensitive salts by common practice). */
const SUPPLEMENTAL_FROM: Readonly<Record<string, number>> = {
  'EUH032:sodium-cyanide': 0.1,
  'EUH032:potassium-cyanide': 0.1,
  'EUH032:sodium-azide': 0.1,
  'EUH031:sodium-hypochlorite': 5,
  EUH071: 5,
};
const SUPPLEMENTAL_USUALLY_FROM = 1;
const ACID_OR_BASE_GROUPS = [
  'acid_mineral_nonox',
  'acid_mineral_ox',
  'acid_organic',
  'base_strong',
  'base_weak',
  'ammonia_or_ammonium',
];

/** Solutes that make water lighter, so that a density of 1 would not be on the safe side: g/mL at w % by mass. */
const LIGHTER: Readonly<Record<string, (percent: number) => number>> = {
  'ammonia-solution': (percent) => 0.998 - 0.0038 * percent,
  ethanol: () => 0.785,
  methanol: () => 0.785,
  'propan-2-ol': () => 0.785,
  acetone: () => 0.785,
};

/**
 * Per cent by mass from mol/L: w = 100 c M / (1000 ρ). Without a measured density ρ = 1, which overstates w for
 * everything that makes water denser and so errs to the safe side.
 */
export function massPercent(
  substanceId: string,
  molarity: number,
  molarMassGPerMol: number,
  densityGPerMl?: number | null,
): number {
  const grams = molarity * molarMassGPerMol;
  const lighter = LIGHTER[substanceId];
  let percent = grams / (10 * (densityGPerMl ?? 1));
  if (densityGPerMl === undefined || densityGPerMl === null) {
    for (let round = 0; lighter && round < 5; round += 1) percent = grams / (10 * lighter(percent));
  }
  return Math.min(percent, 100);
}

/**
 * Proposed classification and label elements of an aqueous solution, by calculation from its solutes.
 * @throws RangeError for a substance that is not in the catalogue
 */
export function classifySolution({
  solutes,
  densityGPerMl,
  pH,
  regime = 'CLP',
}: SolutionToClassify): Classification {
  const incomplete: string[] = [];
  const ingredients: Ingredient[] = [];
  for (const { substance: idOrCas, molarity } of solutes) {
    const substance = findSubstance(idOrCas);
    if (!substance) throw new RangeError(`${idOrCas} is not in the catalogue`);
    const hazards = findSubstanceHazards(substance.id);
    if (!hazards) {
      incomplete.push(substance.name);
      continue;
    }
    const mass =
      substance.id === 'sodium-hypochlorite' ? ACTIVE_CHLORINE_G_PER_MOL : substance.molarMassGPerMol;
    ingredients.push(
      ingredientOf(
        shortName(substance.name),
        hazards,
        massPercent(substance.id, molarity, mass, densityGPerMl),
      ),
    );
  }
  const flammable = solutes.flatMap(({ substance: idOrCas, molarity }) => {
    const substance = findSubstance(idOrCas);
    return substance
      ? [
          {
            id: substance.id,
            percent: massPercent(substance.id, molarity, substance.molarMassGPerMol, densityGPerMl),
          },
        ]
      : [];
  });
  const mixture = {
    ingredients,
    pH: pH ?? null,
    flashPointC: flashPointOf(flammable),
    viscosity: null,
    regime,
  };
  const classes = classifyMixture(mixture);
  return {
    signalWord: signalWordFor(classes),
    pictograms: pictogramsFor(classes, regime),
    hazards: hazardStatements(classes),
    precautions: precautionsFor(classes),
    supplemental: supplementalCodes(mixture, classes),
    incomplete,
  };
}

/** The name without the strength of the goods as sold. */
function shortName(name: string): string {
  return name.replace(/\s+\d+(?:\.\d+)?\s*%.*$/, '');
}

const ROUTES: readonly Route[] = ['oral', 'dermal', 'inh_vapour', 'inh_mist', 'inh_gas'];

function ingredientOf(name: string, hazards: SubstanceHazards, percent: number): Ingredient {
  return {
    name,
    percent,
    classes: hazards.classes,
    specificLimits: hazards.specificLimits,
    acuteToxicity: acuteToxicityOf(hazards),
    mAcute: hazards.mFactors?.m_acute ?? 1,
    mChronic: hazards.mFactors?.m_chronic ?? 1,
    isAcidOrBase: hazards.groups.some((group) => ACID_OR_BASE_GROUPS.includes(group)),
    isNonAdditive: false,
    corrosiveToMetalsFromPercent: hazards.classes.includes('Met. Corr. 1')
      ? (METAL_CORROSION_FROM[hazards.id] ?? METAL_CORROSION_USUALLY_FROM)
      : null,
    supplemental: hazards.euh.map((code) => ({
      code,
      fromPercent:
        SUPPLEMENTAL_FROM[`${code}:${hazards.id}`] ?? SUPPLEMENTAL_FROM[code] ?? SUPPLEMENTAL_USUALLY_FROM,
    })),
  };
}

/** Estimates as given; where only the class is known, its category. */
function acuteToxicityOf(hazards: SubstanceHazards): Partial<Record<Route, number | string>> {
  const given: Partial<Record<Route, number | string>> = {};
  for (const route of ROUTES) {
    const value = hazards.acuteToxicity?.[route];
    if (value !== undefined) given[route] = value;
  }
  for (const name of hazards.classes) {
    const [, category, way] = /^Acute Tox\. (\d) (oral|dermal|inhalation)$/.exec(name) ?? [];
    if (!category || !way) continue;
    if (way === 'inhalation') {
      if (!given.inh_vapour && !given.inh_mist && !given.inh_gas) given.inh_mist = `cat${category}`;
    } else given[way as Route] ??= `cat${category}`;
  }
  return given;
}
