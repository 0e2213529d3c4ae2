import type { Mix } from '../chemistry/types';
import type { ScreenedBottle } from './contents';
import type { Finding, Severity } from './types';

/** Enthalpy of neutralisation of strong acid and strong base, kJ/mol of water: textbook value. */
const NEUTRALISATION_KJ_PER_MOL = 55.8;
/** Heat capacity of water, J/(g K). */
const HEAT_CAPACITY_OF_WATER = 4.18;
/** Heat capacity of sulfuric acid by % by mass, J/(g K), rounded handbook values from memory, good to about a tenth. */
const HEAT_CAPACITY_OF_SULFURIC: readonly (readonly [percent: number, joules: number])[] = [
  [0, HEAT_CAPACITY_OF_WATER],
  [10, 3.8],
  [20, 3.4],
  [30, 3],
  [40, 2.7],
  [50, 2.4],
  [60, 2.1],
  [70, 1.9],
  [80, 1.75],
  [90, 1.55],
  [98, 1.42],
];

/**
 * Integral heat of diluting sulfuric acid to r mol of water per mol, kJ/mol released; from memory of the
 * textbook table.
 */
const SULFURIC_DILUTION: readonly (readonly [r: number, kJ: number])[] = [
  [0, 0],
  [0.5, 15.73],
  [1, 28.07],
  [1.5, 36.9],
  [2, 41.92],
  [3, 48.99],
  [4, 54.06],
  [5, 58.03],
  [10, 67.03],
  [20, 71.5],
  [25, 72.3],
  [50, 73.34],
  [100, 73.97],
  [1000, 78.58],
];
/** g/mL of sulfuric acid solutions by mol/L, rounded handbook values from memory; only the water content rests on it. */
const sulfuricDensity = (molarity: number) =>
  1 + 0.06 * Math.min(molarity, 14) + 0.001 * Math.max(0, molarity - 14);

function interpolated(table: readonly (readonly [number, number])[], at: number): number {
  const above = table.findIndex(([x]) => x >= at);
  if (above < 0) return table.at(-1)?.[1] ?? 0;
  const [x1 = 0, y1 = 0] = table[above] ?? [];
  const [x0 = 0, y0 = 0] = table[above - 1] ?? [x1, y1];
  return x1 === x0 ? y1 : y0 + ((y1 - y0) * (at - x0)) / (x1 - x0);
}

/** kJ set free by neutralising strong acid with strong base among the portions. */
export function neutralisationKJ(bottles: readonly ScreenedBottle[]): number {
  let acid = 0;
  let base = 0;
  for (const { solutes } of bottles) {
    for (const { substance, amountMol, groups } of solutes) {
      const hydrogen = substance.releases?.['H+'] ?? 0;
      if (hydrogen > 0 && !groups.has('ammonia_or_ammonium')) acid += hydrogen * amountMol;
      if (hydrogen < 0 || groups.has('ammonia_or_ammonium'))
        base += Math.max(-hydrogen, groups.has('ammonia_or_ammonium') && hydrogen === 0 ? 1 : 0) * amountMol;
    }
  }
  return Math.min(acid, base) * NEUTRALISATION_KJ_PER_MOL;
}

/** kJ set free by diluting sulfuric acid stronger than 2 mol/L. */
export function dilutionKJ(bottles: readonly ScreenedBottle[], finalVolumeMl: number): number {
  let heat = 0;
  for (const { solutes, volumeMl } of bottles) {
    for (const { substance, molarity, amountMol } of solutes) {
      if (substance.id !== 'sulfuric-acid' || molarity <= 2) continue;
      const gramsAcid = amountMol * substance.molarMassGPerMol;
      const waterBefore = Math.max(0, volumeMl * sulfuricDensity(molarity) - gramsAcid) / 18.015;
      const waterAfter = waterBefore + (finalVolumeMl - volumeMl) / 18.015;
      heat +=
        amountMol *
        (interpolated(SULFURIC_DILUTION, waterAfter / amountMol) -
          interpolated(SULFURIC_DILUTION, waterBefore / amountMol));
    }
  }
  return heat;
}

/** J/K of the whole mix: water, or sulfuric acid where it is strong. */
function heatCapacityJPerK(bottles: readonly ScreenedBottle[], finalVolumeMl: number): number {
  let grams = finalVolumeMl;
  let gramsAcid = 0;
  for (const { solutes, volumeMl } of bottles) {
    for (const { substance, molarity, amountMol } of solutes) {
      if (substance.id !== 'sulfuric-acid') continue;
      gramsAcid += amountMol * substance.molarMassGPerMol;
      grams += volumeMl * (sulfuricDensity(molarity) - 1);
    }
  }
  return grams * interpolated(HEAT_CAPACITY_OF_SULFURIC, (100 * gramsAcid) / grams);
}

/** Adiabatic rise in K, all heat staying in the liquid; heats of diluting other acids and bases are left out. */
export function adiabaticRiseK(bottles: readonly ScreenedBottle[], finalVolumeMl: number): number {
  return (
    ((neutralisationKJ(bottles) + dilutionKJ(bottles, finalVolumeMl)) * 1000) /
    heatCapacityJPerK(bottles, finalVolumeMl)
  );
}

/** How grave a rise is; thresholds are ours, to be confirmed locally. */
export function heatSeverity(riseK: number, startC: number): Severity | null {
  const hottest = startC + riseK;
  if (hottest > 95) return 'review';
  if (riseK > 40 || hottest > 70) return 'controlled';
  return riseK > 20 ? 'caution' : null;
}

/** A finding where the mix grows hot. */
export function heatFinding(bottles: readonly ScreenedBottle[], mix: Mix, startC: number): Finding | null {
  const rise = adiabaticRiseK(bottles, mix.finalVolumeMl);
  const hottest = startC + rise;
  const severity = heatSeverity(rise, startC);
  if (!severity) return null;
  return {
    rule: 'heat',
    severity,
    scope: 'mix',
    title: hottest > 95 ? 'The mix may boil' : 'The mix grows hot',
    reason: `Neutralisation and dilution set free enough heat for a rise of about ${Math.round(rise)} K, to ${Math.round(hottest)} °C, if none is lost.`,
    mustNot: 'Do not pour all at once, and never water into strong acid.',
    gas: null,
    precautions: [
      'Pour in portions with stirring and cooling',
      'Eye protection, gloves, a vessel twice as large as the mix',
    ],
    alternative: 'Weaker solutions give the same change with less heat',
    source:
      'Heat of neutralisation 55.8 kJ/mol (textbook value); dilution table of sulfuric acid (from memory)',
    concerns: bottles.map(({ label }) => label),
  };
}
