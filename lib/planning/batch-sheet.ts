import { TOLERANCE_FRACTION } from '../domain/quantities';
import type { BatchSheet, BatchSheetInput, StrengthLine } from './batch-sheet-types';
import { requirePositive } from './checks';
import { dayNumber } from './days';
import type { GlassOwned } from './equipment';
import type { MakeVessel } from './glassware';
import { balancesOf, chooseVessel, glassOf } from './glassware';
import { questionQuantities } from './sanity';
import { glasswareOf, sheetSteps } from './sheet-steps';
import type { SoluteTake } from './sheet-takes';
import { takeSolute } from './sheet-takes';
import { uncertaintyBudget } from './uncertainty';

/** Limit of error of the graduations of a beaker: common practice of the trade, 5 % of what is read. */
const BEAKER_TOLERANCE = 0.05;

function beakerFor(volumeMl: number): MakeVessel {
  const glass: GlassOwned = {
    id: 'beaker',
    name: 'graduated beaker',
    use: 'cylinder',
    nominalMl: volumeMl,
    toleranceMl: BEAKER_TOLERANCE * volumeMl,
    toleranceSource: 'graduations of a beaker, 5 %',
    count: 1,
  };
  return {
    glass,
    fills: 1,
    fillMl: volumeMl,
    makeVolumeMl: volumeMl,
    surplusMl: 0,
    relativeTolerance: BEAKER_TOLERANCE,
  };
}

function pickVessel(input: BatchSheetInput, glass: readonly GlassOwned[]) {
  const choice = chooseVessel(glass, input.volumeMl, input.tolerance);
  if (choice.outcome === 'found') return { vessel: choice.vessel, warning: null };
  if (choice.outcome === 'none-meets') {
    const percent = (100 * choice.closest.relativeTolerance).toPrecision(2);
    return {
      vessel: choice.closest,
      warning: `Nothing in the room meets the tolerance for ${input.volumeMl} mL; the closest is ${choice.closest.glass.name} (${percent} %).`,
    };
  }
  return {
    vessel: beakerFor(input.volumeMl),
    warning: 'The room owns no volumetric glass: planned for the graduations of a beaker.',
  };
}

function strengthLine(take: SoluteTake): StrengthLine {
  const { substance, molarity } = take.solute;
  const budget =
    take.inputs.length === 0
      ? null
      : uncertaintyBudget(
          molarity,
          take.inputs.map(({ input }) => input),
        );
  return { substanceId: substance.id, name: substance.name, molarity, inputs: take.inputs, budget };
}

/**
 * The sheet for making one solution once: what to take from which lot and place, in which digits and range, in which
 * glass, in which order, with which protection, and how sure the strength will be.
 *
 * Missing lots, glass or balances do not stop the plan: they appear as shortages and warnings, and the strengths
 * they concern have no budget.
 * @throws RangeError if the volume, a strength or an assay is no quantity, the day does not exist, or there is no solute
 */
export function planBatchSheet(input: BatchSheetInput): BatchSheet {
  requirePositive(input.volumeMl, 'the volume of the batch');
  dayNumber(input.onDay);
  if (input.solution.solutes.length === 0) throw new RangeError('a batch needs a solute');
  const toleranceFraction = TOLERANCE_FRACTION[input.tolerance];
  const glass = glassOf(input.equipment);
  const { vessel, warning } = pickVessel(input, glass);
  const room = {
    balances: balancesOf(input.equipment),
    glass,
    vessel,
    toleranceFraction,
    onDay: input.onDay,
  };

  const takes: SoluteTake[] = [];
  for (const solute of input.solution.solutes) {
    const position = 1 + takes.reduce((sum, take) => sum + take.lines.length, 0);
    takes.push(takeSolute(solute, input.lots, room, position));
  }
  const strengths = takes.map(strengthLine);
  const unsure = strengths.flatMap(({ name, budget }) =>
    budget !== null && budget.relativeExpandedUncertainty > toleranceFraction
      ? [
          `The strength of ${name} is only sure to ${(100 * budget.relativeExpandedUncertainty).toPrecision(2)} % (k = 2), more than the tolerance; largest part: ${budget.contributions[0]?.influence ?? ''}.`,
        ]
      : [],
  );
  return {
    solutionName: input.solution.name,
    askedVolumeMl: input.volumeMl,
    makeVolumeMl: vessel.makeVolumeMl,
    onDay: input.onDay,
    tolerance: input.tolerance,
    toleranceFraction,
    vessel: {
      name: vessel.glass.name,
      fills: vessel.fills,
      fillMl: vessel.fillMl,
      relativeTolerance: vessel.relativeTolerance,
      meetsTolerance: vessel.relativeTolerance <= toleranceFraction,
    },
    takes: takes.flatMap((take) => take.lines),
    glassware: glasswareOf(vessel, takes),
    steps: sheetSteps(input, vessel, takes),
    strengths,
    shortages: takes.flatMap((take) => (take.shortage === null ? [] : [take.shortage])),
    passedOver: takes.flatMap((take) =>
      (take.choice?.passedOver ?? []).map(({ lot, reason, message }) => ({
        lotCode: lot.code,
        reason,
        message,
      })),
    ),
    questions: questionQuantities({ solutes: input.solution.solutes, volumeMl: input.volumeMl }),
    warnings: [...(warning === null ? [] : [warning]), ...takes.flatMap((take) => take.warnings), ...unsure],
  };
}
