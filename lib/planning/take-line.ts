import { toMicro } from '../domain/quantities';
import { chooseBalance, finestBalance, massText, minimumWeightG, shownMassG } from './balances';
import type { SheetLot, SheetSolute, TakeLine } from './batch-sheet-types';
import type { BalanceOwned, GlassOwned } from './equipment';
import type { MakeVessel } from './glassware';
import { chooseMeasure } from './glassware';
import { assayInput, densityInput, dilutionVolumeInput, massInput } from './strength-inputs';
import type { BudgetInput } from './uncertainty';
import { lotStrength } from './weigh-out';

/** What a sheet is planned with. */
export interface SheetRoom {
  readonly balances: readonly BalanceOwned[];
  readonly glass: readonly GlassOwned[];
  readonly vessel: MakeVessel;
  readonly toleranceFraction: number;
  readonly onDay: string;
}

/** Half of the tolerance goes to measuring one thing out; the other half is for volume, assay and the rest. */
export const SHARE_FOR_MEASURING = 0.5;

/** mol in one ledger unit of a lot; null for a lot in mL whose density is not known. */
export function molPerUnit(lot: SheetLot): number | null {
  const strength = lotStrength(lot);
  if (lot.unit === 'g') return strength.molPerG;
  return strength.molarity === null ? null : strength.molarity / 1000;
}

/** Volume as a scale of this limit of error can be read: no digit finer than the limit. */
function shownVolumeMl(glass: GlassOwned, volumeMl: number): { value: number; text: string } {
  const decimals = Math.max(0, Math.ceil(-Math.log10(glass.toleranceMl) - 1e-9));
  const text = volumeMl.toFixed(decimals);
  return { value: Number(text), text: `${text} mL` };
}

/** What is taken of one lot, in its ledger unit, out of all that is taken for the solute. */
export interface TakenAmount {
  readonly lot: SheetLot;
  readonly units: number;
  readonly totalUnits: number;
}

/** The balance for a mass; the finest one below every minimum weight; null above every capacity. */
function balanceFor(balances: readonly BalanceOwned[], massG: number): BalanceOwned | null {
  const chosen = chooseBalance(balances, massG);
  if (chosen !== null) return chosen;
  const finest = finestBalance(balances);
  return finest !== null && massG < minimumWeightG(finest) ? finest : null;
}

/** A take line with what it is measured by and what that adds to the budget. */
export interface BuiltLine {
  readonly line: TakeLine;
  readonly glass: GlassOwned | null;
  readonly measured: readonly BudgetInput[];
  readonly others: readonly BudgetInput[];
  readonly isMeasured: boolean;
}

/**
 * The line of the sheet for what is taken of one lot.
 * @param carriedShare - part of what is taken that ends in the batch
 * @param stockMeasure - the piece that takes the bottle's own liquid as a stock; its error is part of the route's
 */
export function takeLine(
  amount: TakenAmount,
  solute: SheetSolute,
  room: SheetRoom,
  position: number,
  carriedShare: number,
  stockMeasure: GlassOwned | null,
): BuiltLine {
  const { lot, units } = amount;
  const { fills } = room.vessel;
  const strength = lotStrength(lot);
  const density = strength.densityGPerMl;
  const perFill = units / fills;
  const isWeighed = lot.unit === 'g';
  const balance = isWeighed ? balanceFor(room.balances, perFill) : null;
  const measure = isWeighed
    ? null
    : chooseMeasure(room.glass, perFill, room.toleranceFraction * SHARE_FOR_MEASURING);
  const glass = stockMeasure ?? measure?.glass ?? null;
  const show = (value: number) => {
    if (balance !== null) return { value: shownMassG(balance, value), text: massText(balance, value) };
    if (glass !== null) return shownVolumeMl(glass, value);
    return { value, text: `${value.toPrecision(4)} ${lot.unit}` };
  };
  const deliveries = stockMeasure === null ? (measure?.deliveries ?? 1) : 1;
  const target = show(units);
  const low = units * (1 - room.toleranceFraction);
  const high = units * (1 + room.toleranceFraction);
  const isOtherHydrate = lot.substance.id !== solute.substance.id;
  const notes = [
    `corrected for ${strength.assayPercent} % (${strength.assaySource})`,
    ...(isOtherHydrate
      ? [`weighed as ${lot.substance.formula} in place of ${solute.substance.formula}`]
      : []),
    ...(density === null ? [] : [`${density.toFixed(3)} g/mL (${strength.densitySource ?? ''})`]),
    ...(deliveries > 1 ? [`in ${deliveries} deliveries of ${show(perFill / deliveries).text}`] : []),
    ...(fills > 1 ? [`for ${fills} fillings, ${show(perFill).text} each`] : []),
  ];
  const line: TakeLine = {
    position,
    forSubstanceId: solute.substance.id,
    substanceId: lot.substance.id,
    name: lot.substance.name,
    formula: lot.substance.formula,
    lotId: lot.id,
    lotCode: lot.code,
    place: lot.place,
    unit: lot.unit,
    targetMicro: toMicro(target.value),
    lowMicro: toMicro(low),
    highMicro: toMicro(high),
    massG: isWeighed ? units : units * (density ?? Number.NaN),
    volumeMl: density === null ? null : isWeighed ? units / density : units,
    amountText: target.text,
    rangeText: `${show(low).text} to ${show(high).text}`,
    measuredWith: balance?.name ?? glass?.name ?? null,
    assayPercent: strength.assayPercent,
    assaySource: strength.assaySource,
    molPerUnit: molPerUnit(lot) ?? Number.NaN,
    carriedShare,
    note: `${notes.join('; ')}.`,
  };
  const share = units / amount.totalUnits;
  const measured: BudgetInput[] = [];
  if (balance !== null) measured.push(massInput(balance, perFill, share));
  else if (glass !== null && stockMeasure === null) {
    measured.push(dilutionVolumeInput(glass, perFill / deliveries, share));
  }
  const others = [
    assayInput(strength.assayPercent, strength.assaySource, share),
    ...(isWeighed || density === null ? [] : [densityInput(density, share)]),
  ];
  return { line, glass, measured, others, isMeasured: balance !== null || glass !== null };
}
