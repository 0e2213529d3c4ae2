import { requirePositive, requireWhole } from './checks';
import type { BatchSheet, StrengthLine, TakeLine } from './batch-sheet-types';
import type { UncertaintyBudget } from './uncertainty';
import { uncertaintyBudget } from './uncertainty';

/** What a difference asks for: nothing, an explanation, or making it again. */
export type Verdict = 'within' | 'explain' | 'remake';

/** Beyond this many tolerances a batch is made again rather than explained: our own rule. */
export const REMAKE_FROM_TOLERANCES = 2;

const GRAVEST_FIRST: readonly Verdict[] = ['remake', 'explain', 'within'];

function judge(relativeDeviation: number, toleranceFraction: number): Verdict {
  const deviation = Math.abs(relativeDeviation);
  // A reading exactly on the limit is within it, whatever the last binary digit says.
  if (deviation <= toleranceFraction * (1 + 1e-9)) return 'within';
  return deviation <= REMAKE_FROM_TOLERANCES * toleranceFraction * (1 + 1e-9) ? 'explain' : 'remake';
}

/**
 * Verdict on one amount as entered at the bench, against its line of the sheet.
 * @param amountMicro - integer millionths of the line's unit
 * @throws RangeError if the amount is no whole number, 0 or more
 */
export function judgeTake(line: TakeLine, toleranceFraction: number, amountMicro: number): Verdict {
  requireWhole(amountMicro, 'the amount taken');
  return judge(amountMicro / line.targetMicro - 1, toleranceFraction);
}

export interface ActualStrength {
  readonly substanceId: string;
  readonly name: string;
  readonly plannedMolarity: number;
  readonly molarity: number;
  /** Expanded, k = 2; null where the sheet had no budget for this solute. */
  readonly expandedUncertainty: number | null;
  readonly deviationPercent: number;
  readonly verdict: Verdict;
  readonly budget: UncertaintyBudget | null;
}

export interface ActualOutcome {
  readonly strengths: readonly ActualStrength[];
  /** The gravest of the strengths. */
  readonly verdict: Verdict;
}

/** The planned budget with the masses and volumes really taken in place of those planned. */
function actualBudget(strength: StrengthLine, molarity: number, ratioOf: (position: number) => number) {
  if (strength.budget === null || molarity <= 0) return null;
  const inputs = strength.inputs.map(({ position, input }) =>
    position === null ? input : { ...input, value: input.value * ratioOf(position) },
  );
  return inputs.some((input) => input.value <= 0) ? null : uncertaintyBudget(molarity, inputs);
}

/**
 * The strength a batch really has, from the amounts entered at the bench: c = Σ amount × (mol per unit) × share
 * carried on / volume, each with its expanded uncertainty, and what its deviation asks for.
 * @param actual.takes - one amount for every take line of the sheet, in integer millionths of its unit
 * @param actual.volumeMl - volume really made; null: as planned
 * @throws RangeError if a line has no amount, an amount is no whole number, or the volume is not positive
 */
export function actualStrength(
  sheet: BatchSheet,
  actual: {
    readonly takes: readonly { readonly position: number; readonly amountMicro: number }[];
    readonly volumeMl: number | null;
  },
): ActualOutcome {
  const volumeMl = actual.volumeMl ?? sheet.makeVolumeMl;
  requirePositive(volumeMl, 'the volume made');
  const entered = new Map(actual.takes.map(({ position, amountMicro }) => [position, amountMicro]));
  const amountOf = (line: TakeLine): number => {
    const amount = entered.get(line.position);
    if (amount === undefined)
      throw new RangeError(`no amount entered for line ${line.position}, ${line.name}`);
    requireWhole(amount, `the amount of ${line.name}`);
    return amount;
  };
  const strengths = sheet.strengths.map((strength): ActualStrength => {
    const lines = sheet.takes.filter((line) => line.forSubstanceId === strength.substanceId);
    const amountMol = lines.reduce(
      (sum, line) => sum + (amountOf(line) / 1e6) * line.molPerUnit * line.carriedShare,
      0,
    );
    const molarity = (1000 * amountMol) / volumeMl;
    const ratioOf = (position: number) => {
      const line = lines.find((candidate) => candidate.position === position);
      return line === undefined ? 1 : amountOf(line) / line.targetMicro;
    };
    const budget = actualBudget(strength, molarity, ratioOf);
    const deviation = molarity / strength.molarity - 1;
    return {
      substanceId: strength.substanceId,
      name: strength.name,
      plannedMolarity: strength.molarity,
      molarity,
      expandedUncertainty: budget?.expandedUncertainty ?? null,
      deviationPercent: 100 * deviation,
      verdict: judge(deviation, sheet.toleranceFraction),
      budget,
    };
  });
  const verdict =
    GRAVEST_FIRST.find((level) => strengths.some((strength) => strength.verdict === level)) ?? 'within';
  return { strengths, verdict };
}
