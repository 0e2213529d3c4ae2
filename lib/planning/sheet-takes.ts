import type { LedgerUnit } from '../domain/quantities';
import { fromMicro, toMicro } from '../domain/quantities';
import { finestBalance, minimumWeightG } from './balances';
import type { SheetLot, SheetShortage, SheetSolute, TakeLine } from './batch-sheet-types';
import type { DilutionRoute } from './dilution-route';
import { planDilution } from './dilution-route';
import type { GlassOwned } from './equipment';
import { chooseMeasure } from './glassware';
import type { LotChoice } from './lots';
import { byExpiry, chooseLots } from './lots';
import { planStockRoute } from './stock-and-dilute';
import { dilutionVolumeInput, madeVolumeInput, molarMassInput } from './strength-inputs';
import type { SheetRoom } from './take-line';
import { molPerUnit, SHARE_FOR_MEASURING, takeLine } from './take-line';
import type { BudgetInput } from './uncertainty';
import { canServeFor, weighOut } from './weigh-out';

/** A stock between bottle and batch, where the amount itself is too small to measure. */
export interface IntermediateStock {
  /** null: the bottle itself is the stock. */
  readonly stockFlask: GlassOwned | null;
  readonly stockMolarity: number;
  readonly dilution: DilutionRoute;
}

/** How one solute gets into the batch. */
export interface SoluteTake {
  readonly solute: SheetSolute;
  readonly lines: readonly TakeLine[];
  readonly measures: readonly (GlassOwned | null)[];
  readonly stock: IntermediateStock | null;
  readonly inputs: readonly { readonly position: number | null; readonly input: BudgetInput }[];
  readonly shortage: SheetShortage | null;
  readonly choice: LotChoice<SheetLot> | null;
  readonly warnings: readonly string[];
}

/** A route through an intermediate stock, if the amount per filling is too small to weigh or to measure. */
function planStock(
  solute: SheetSolute,
  lot: SheetLot,
  room: SheetRoom,
): { stock: IntermediateStock; units: number } | 'none-found' | null {
  const { vessel, toleranceFraction } = room;
  const out = weighOut(solute, vessel.fillMl, lot);
  const final = { glass: vessel.glass, makeMl: vessel.fillMl };
  const maxRelative = toleranceFraction * SHARE_FOR_MEASURING;
  if (lot.unit === 'g') {
    const finest = finestBalance(room.balances);
    if (finest === null || out.massG >= minimumWeightG(finest)) return null;
    const route = planStockRoute(
      out.massG,
      minimumWeightG(finest),
      solute.molarity,
      room.glass,
      final,
      maxRelative,
      solute.solubleMolarity,
    );
    if (route === null) return 'none-found';
    return { stock: route, units: route.massG };
  }
  if (out.volumeMl === null || chooseMeasure(room.glass, out.volumeMl, maxRelative) !== null) return null;
  const { molarity } = out.lot;
  const route =
    molarity === null || molarity <= solute.molarity
      ? null
      : planDilution(molarity / solute.molarity, room.glass, final, maxRelative);
  const first = route?.steps[0];
  if (route === null || first === undefined || molarity === null) return 'none-found';
  return { stock: { stockFlask: null, stockMolarity: molarity, dilution: route }, units: first.takeMl };
}

function shortageOf(solute: SheetSolute, unit: LedgerUnit, shortMicro: number): SheetShortage {
  return { substanceId: solute.substance.id, name: solute.substance.name, unit, shortMicro };
}

function reference(lots: readonly SheetLot[], onDay: string): SheetLot | null {
  const sorted = [...lots].sort(byExpiry);
  return (
    sorted.find(
      (lot) => !lot.held && lot.balanceMicro > 0 && (lot.expiresOn === null || lot.expiresOn >= onDay),
    ) ??
    sorted[0] ??
    null
  );
}

/**
 * The lines to take for one solute: lots soonest-expiring first, each corrected for its own assay, with balance or
 * glass, the allowed range, and a stock between where the amount is too small to measure.
 * @param firstPosition - number of the first line on the sheet
 */
export function takeSolute(
  solute: SheetSolute,
  lots: readonly SheetLot[],
  room: SheetRoom,
  firstPosition: number,
): SoluteTake {
  const serving = lots.filter(
    (lot) => canServeFor(solute.substance, lot.substance) && molPerUnit(lot) !== null,
  );
  const lead = reference(serving, room.onDay);
  const nothing = { solute, lines: [], measures: [], stock: null, inputs: [], choice: null, warnings: [] };
  if (lead === null) {
    const out = weighOut(solute, room.vessel.makeVolumeMl, {
      substance: solute.substance,
      assayPercent: null,
      densityGPerMl: null,
    });
    return { ...nothing, shortage: shortageOf(solute, 'g', toMicro(out.massG)) };
  }
  const perUnit = molPerUnit(lead) ?? Number.NaN;
  const planned = planStock(solute, lead, room);
  const stock = planned === null || planned === 'none-found' ? null : planned.stock;
  const totalMol = (solute.molarity * room.vessel.makeVolumeMl) / 1000;
  const units =
    planned === null || planned === 'none-found' ? totalMol / perUnit : planned.units * room.vessel.fills;
  const carriedShare = totalMol / perUnit / units;
  const finest = finestBalance(room.balances);
  const choice = chooseLots(serving, Math.max(1, toMicro(units)), {
    onDay: room.onDay,
    unit: lead.unit,
    worth: (lot) => (molPerUnit(lot) ?? Number.NaN) / perUnit,
    ...(lead.unit === 'g' && finest !== null ? { minimumTakeMicro: toMicro(minimumWeightG(finest)) } : {}),
  });
  const shortage = choice.shortMicro > 0 ? shortageOf(solute, lead.unit, choice.shortMicro) : null;
  const totalUnits = choice.takes.reduce((sum, take) => sum + fromMicro(take.amountMicro), 0);
  const stockMeasure =
    stock !== null && stock.stockFlask === null ? (stock.dilution.steps[0]?.measure ?? null) : null;
  const built = choice.takes.map(({ lot, amountMicro }, i) =>
    takeLine(
      { lot, units: fromMicro(amountMicro), totalUnits },
      solute,
      room,
      firstPosition + i,
      carriedShare,
      stockMeasure,
    ),
  );
  const warnings = [
    ...(planned === 'none-found'
      ? [
          `No way was found to measure so little ${solute.substance.name} within the tolerance; ask for a larger volume or a coarser class.`,
        ]
      : []),
    ...built
      .filter((entry) => !entry.isMeasured)
      .map(
        (entry) =>
          `The room owns nothing to measure ${entry.line.amountText} of ${entry.line.name} within the tolerance.`,
      ),
  ];
  const made = room.vessel.glass;
  // A bottle measured by volume shares the room's temperature with the flask; a weighed mass does not.
  const end =
    stock !== null
      ? stock.dilution.inputs
      : lead.unit === 'g'
        ? [madeVolumeInput(made, room.vessel.fillMl)]
        : [dilutionVolumeInput(made, room.vessel.fillMl, -1)];
  const isComplete =
    shortage === null &&
    built.length > 0 &&
    built.every((entry) => entry.isMeasured) &&
    planned !== 'none-found';
  const inputs = [
    ...built.flatMap((entry) => [
      ...entry.measured.map((input) => ({ position: entry.line.position, input })),
      ...entry.others.map((input) => ({ position: null, input })),
    ]),
    ...[molarMassInput(lead.substance.molarMassGPerMol), ...end].map((input) => ({ position: null, input })),
  ];
  return {
    solute,
    lines: built.map((entry) => entry.line),
    measures: built.map((entry) => entry.glass),
    stock,
    inputs: isComplete ? inputs : [],
    shortage,
    choice,
    warnings,
  };
}
