import { requirePositive } from './checks';
import type { GlassUse } from './equipment';

interface ToleranceTable {
  readonly standard: string;
  /** `[nominalMl, limitMl class A or AS, limitMl class B]` at 20 °C. */
  readonly rows: readonly (readonly [number, number, number])[];
}

/**
 * Limits of error of volumetric glass at 20 °C, by the ISO standard of each kind.
 *
 * All figures from memory; spot checks agreed with the EURACHEM/CITAC guide (100 mL flask ± 0.1 mL), and with
 * published values for the 10 mL pipette and the 50 mL burette. The piston pipette column is the systematic limit
 * of ISO 8655-2:2002, which has no classes. Burettes take the finest usual division of each size.
 */
export const GLASS_TOLERANCES: Readonly<Record<GlassUse, ToleranceTable>> = {
  flask: {
    standard: 'ISO 1042:1998 (from memory)',
    rows: [
      [1, 0.025, 0.05],
      [2, 0.025, 0.05],
      [5, 0.025, 0.05],
      [10, 0.025, 0.05],
      [20, 0.04, 0.08],
      [25, 0.04, 0.08],
      [50, 0.06, 0.12],
      [100, 0.1, 0.2],
      [200, 0.15, 0.3],
      [250, 0.15, 0.3],
      [500, 0.25, 0.5],
      [1000, 0.4, 0.8],
      [2000, 0.6, 1.2],
      [5000, 1.2, 2.4],
    ],
  },
  cylinder: {
    standard: 'ISO 4788:2005 (from memory)',
    rows: [
      [5, 0.05, 0.1],
      [10, 0.1, 0.2],
      [25, 0.25, 0.5],
      [50, 0.5, 1],
      [100, 0.5, 1],
      [250, 1, 2],
      [500, 2.5, 5],
      [1000, 5, 10],
      [2000, 10, 20],
    ],
  },
  'single-volume pipette': {
    standard: 'ISO 648:2008 (from memory)',
    rows: [
      [0.5, 0.005, 0.01],
      [1, 0.008, 0.015],
      [2, 0.01, 0.02],
      [5, 0.015, 0.03],
      [10, 0.02, 0.04],
      [20, 0.03, 0.06],
      [25, 0.03, 0.06],
      [50, 0.05, 0.1],
      [100, 0.08, 0.16],
    ],
  },
  'graduated pipette': {
    standard: 'ISO 835:2007 (from memory)',
    rows: [
      [1, 0.007, 0.01],
      [2, 0.01, 0.02],
      [5, 0.03, 0.05],
      [10, 0.05, 0.1],
      [25, 0.1, 0.2],
    ],
  },
  'piston pipette': {
    standard: 'ISO 8655-2:2002 (from memory)',
    rows: [
      [0.01, 0.00012, 0.00012],
      [0.02, 0.0002, 0.0002],
      [0.05, 0.0005, 0.0005],
      [0.1, 0.0008, 0.0008],
      [0.2, 0.0016, 0.0016],
      [0.5, 0.004, 0.004],
      [1, 0.008, 0.008],
      [2, 0.016, 0.016],
      [5, 0.04, 0.04],
      [10, 0.06, 0.06],
    ],
  },
  burette: {
    standard: 'ISO 385:2005 (from memory)',
    rows: [
      [5, 0.01, 0.02],
      [10, 0.02, 0.04],
      [25, 0.03, 0.06],
      [50, 0.05, 0.1],
      [100, 0.1, 0.2],
    ],
  },
};

/**
 * Limit of error of a piece of glass at its nominal volume, mL.
 * @param glassClass - `A` and `AS` (also `A/AS`) read the fine column; anything else, and null, the coarse one
 * @returns null where the standard has no such size
 */
export function isoToleranceMl(use: GlassUse, nominalMl: number, glassClass: string | null): number | null {
  requirePositive(nominalMl, 'the nominal volume');
  const row = GLASS_TOLERANCES[use].rows.find(([nominal]) => nominal === nominalMl);
  if (row === undefined) return null;
  return /^A/i.test(glassClass?.trim() ?? '') ? row[1] : row[2];
}
