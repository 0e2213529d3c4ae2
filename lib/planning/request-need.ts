import type { Solute, Substance } from '../chemistry/types';
import { requireNotNegative, requirePositive, requireWhole } from './checks';

/** One line of a request, in what the instructor says. */
export type RequestLine =
  | {
      readonly kind: 'solution';
      readonly solutionId: string;
      readonly volumePerBenchMl: number;
      /** Benches' worth to spare, beyond those that are there. */
      readonly spareBenches: number;
    }
  | {
      readonly kind: 'demonstration';
      readonly demonstrationId: string;
      readonly portions: readonly { readonly solutionId: string; readonly volumeMl: number }[];
      readonly performances: number;
    };

export interface SolutionNeed {
  readonly solutionId: string;
  readonly volumeMl: number;
  /** Where it comes from, one entry per line or portion. */
  readonly parts: readonly { readonly volumeMl: number; readonly reason: string }[];
}

/**
 * Volume of each solution that one session needs: per bench × (benches + spare), and portions × performances.
 * @param benches - benches of the session, a whole number above 0
 * @returns one need per solution, in the order first asked for
 * @throws RangeError if a count is no whole number or a volume is not positive
 */
export function solutionNeeds(lines: readonly RequestLine[], benches: number): SolutionNeed[] {
  requireWhole(benches, 'the number of benches');
  requirePositive(benches, 'the number of benches');
  const parts = new Map<string, { volumeMl: number; reason: string }[]>();
  const add = (solutionId: string, volumeMl: number, reason: string) => {
    parts.set(solutionId, [...(parts.get(solutionId) ?? []), { volumeMl, reason }]);
  };
  for (const line of lines) {
    if (line.kind === 'solution') {
      requirePositive(line.volumePerBenchMl, 'the volume per bench');
      requireWhole(line.spareBenches, 'the spare');
      const sets = benches + line.spareBenches;
      const spare = line.spareBenches === 0 ? '' : ` and ${line.spareBenches} to spare`;
      add(
        line.solutionId,
        line.volumePerBenchMl * sets,
        `${line.volumePerBenchMl} mL for each of ${benches} benches${spare}`,
      );
    } else {
      requireWhole(line.performances, 'the number of performances');
      requirePositive(line.performances, 'the number of performances');
      for (const portion of line.portions) {
        requirePositive(portion.volumeMl, 'the volume of a portion');
        const times = line.performances === 1 ? 'once' : `${line.performances} times`;
        add(
          portion.solutionId,
          portion.volumeMl * line.performances,
          `${portion.volumeMl} mL shown ${times}`,
        );
      }
    }
  }
  return [...parts].map(([solutionId, given]) => ({
    solutionId,
    volumeMl: given.reduce((sum, part) => sum + part.volumeMl, 0),
    parts: given,
  }));
}

export interface SubstanceNeed {
  readonly substance: Substance;
  readonly amountMol: number;
  /** Of the catalogue's own substance at 100 %; the lot's assay comes in when it is chosen. */
  readonly pureG: number;
}

/**
 * Mass of each substance behind volumes of solutions.
 * @param solutions - volume and recipe of each
 * @param substanceOf - the catalogue's entry for a solute's id or CAS number; null if unknown
 * @throws RangeError if a substance is unknown or a figure is negative
 */
export function substanceNeeds(
  solutions: readonly { readonly volumeMl: number; readonly solutes: readonly Solute[] }[],
  substanceOf: (idOrCas: string) => Substance | null,
): SubstanceNeed[] {
  const amounts = new Map<string, { substance: Substance; amountMol: number }>();
  for (const { volumeMl, solutes } of solutions) {
    requireNotNegative(volumeMl, 'the volume of a solution');
    for (const solute of solutes) {
      requireNotNegative(solute.molarity, `the strength of ${solute.substance}`);
      const substance = substanceOf(solute.substance);
      if (substance === null) throw new RangeError(`no substance "${solute.substance}" in the catalogue`);
      const before = amounts.get(substance.id)?.amountMol ?? 0;
      amounts.set(substance.id, { substance, amountMol: before + (solute.molarity * volumeMl) / 1000 });
    }
  }
  return [...amounts.values()].map((need) => ({
    ...need,
    pureG: need.amountMol * need.substance.molarMassGPerMol,
  }));
}
