import type { ToleranceClass } from '../domain/quantities';
import { TOLERANCE_FRACTION } from '../domain/quantities';
import { requirePositive } from './checks';
import type { BalanceOwned, EquipmentItem, GlassOwned, GlassUse } from './equipment';
import { GLASS_TOLERANCES, isoToleranceMl } from './glass-tolerances';

/** Scales are used at half their capacity or more. @see UKAS LAB 15, section 2.9.2 */
export const SMALLEST_SHARE_OF_SCALE = 0.5;

/** Making the whole volume once more than asked counts as this many fillings: our own weighing of waste and work. */
const SURPLUS_IN_FILLINGS = 2;

const SCALED: readonly GlassUse[] = ['cylinder', 'graduated pipette', 'piston pipette', 'burette'];

function useOf(item: EquipmentItem): GlassUse | null {
  if (item.kind === 'flask' || item.kind === 'cylinder' || item.kind === 'burette') return item.kind;
  return item.kind === 'pipette' ? (`${item.delivery ?? 'single-volume'} pipette` as const) : null;
}

/** The balances among a room's equipment; those without readability or capacity can't be planned with. */
export function balancesOf(equipment: readonly EquipmentItem[]): BalanceOwned[] {
  return equipment.flatMap(({ id, kind, name, capacityG, readabilityG, repeatabilityG, count }) =>
    kind === 'balance' && capacityG !== null && readabilityG !== null && count > 0
      ? [{ id, name, capacityG, readabilityG, repeatabilityG }]
      : [],
  );
}

/**
 * The volumetric glass among a room's equipment, with its limit of error: as stated, else by the ISO table.
 * Beakers and bottles measure nothing; a size that no standard knows and that states no tolerance is left out.
 */
export function glassOf(equipment: readonly EquipmentItem[]): GlassOwned[] {
  return equipment.flatMap((item) => {
    const use = useOf(item);
    if (use === null || item.capacityMl === null || item.count <= 0) return [];
    const tolerance = item.toleranceMl ?? isoToleranceMl(use, item.capacityMl, item.glassClass);
    if (tolerance === null) return [];
    const toleranceSource =
      item.toleranceMl === null ? GLASS_TOLERANCES[use].standard : 'as stated for this piece';
    return [
      {
        id: item.id,
        name: item.name,
        use,
        nominalMl: item.capacityMl,
        toleranceMl: tolerance,
        toleranceSource,
        count: item.count,
      },
    ];
  });
}

/** Whether a piece delivers any volume up to its nominal one, not only that. */
export function hasScale(glass: GlassOwned): boolean {
  return SCALED.includes(glass.use);
}

export interface MakeVessel {
  readonly glass: GlassOwned;
  /** How many times the vessel is filled; 1 unless the volume is larger than the largest vessel. */
  readonly fills: number;
  /** Volume of each filling, mL: the mark of a flask, or a reading on a cylinder. */
  readonly fillMl: number;
  /** `fills` × `fillMl`: at least what was asked. */
  readonly makeVolumeMl: number;
  readonly surplusMl: number;
  /** Limit of error over volume filled. */
  readonly relativeTolerance: number;
}

export type VesselChoice =
  | { readonly outcome: 'found'; readonly vessel: MakeVessel; readonly others: readonly MakeVessel[] }
  | { readonly outcome: 'none-meets'; readonly closest: MakeVessel }
  | { readonly outcome: 'none-owned' };

/** A flask holds what its mark says; a cylinder may be read at any line from half its scale. */
function asVessel(glass: GlassOwned, volumeMl: number): MakeVessel | null {
  if (glass.use !== 'flask' && glass.use !== 'cylinder') return null;
  const fills = Math.ceil(volumeMl / glass.nominalMl - 1e-9);
  const fillMl = glass.use === 'flask' ? glass.nominalMl : volumeMl / fills;
  if (fillMl < SMALLEST_SHARE_OF_SCALE * glass.nominalMl) return null;
  const makeVolumeMl = fills * fillMl;
  return {
    glass,
    fills,
    fillMl,
    makeVolumeMl,
    surplusMl: makeVolumeMl - volumeMl,
    relativeTolerance: glass.toleranceMl / fillMl,
  };
}

/**
 * What to make a volume up in, so that the limit of error stays within the tolerance class (bench 5 %, ordinary 1 %,
 * analytical 0.2 %): few fillings and little surplus, then a flask before a cylinder (for bench work the other way
 * round), then the smaller and the coarser piece, so that fine glass stays free.
 * @throws RangeError if the volume is not positive
 */
export function chooseVessel(
  glass: readonly GlassOwned[],
  volumeMl: number,
  tolerance: ToleranceClass,
): VesselChoice {
  requirePositive(volumeMl, 'the volume');
  const all = glass.map((piece) => asVessel(piece, volumeMl)).filter((vessel) => vessel !== null);
  const first: GlassUse = tolerance === 'bench' ? 'cylinder' : 'flask';
  const rank = (vessel: MakeVessel) => (vessel.glass.use === first ? 0 : 1);
  const effort = (vessel: MakeVessel) => vessel.fills + (SURPLUS_IN_FILLINGS * vessel.surplusMl) / volumeMl;
  all.sort(
    (a, b) =>
      effort(a) - effort(b) ||
      a.surplusMl - b.surplusMl ||
      rank(a) - rank(b) ||
      a.glass.nominalMl - b.glass.nominalMl ||
      b.relativeTolerance - a.relativeTolerance ||
      a.glass.id.localeCompare(b.glass.id, 'en'),
  );
  const [vessel, ...others] = all.filter(
    (candidate) => candidate.relativeTolerance <= TOLERANCE_FRACTION[tolerance],
  );
  if (vessel !== undefined) return { outcome: 'found', vessel, others };
  const [closest] = [...all].sort((a, b) => a.relativeTolerance - b.relativeTolerance);
  return closest === undefined ? { outcome: 'none-owned' } : { outcome: 'none-meets', closest };
}

export interface MeasuringChoice {
  readonly glass: GlassOwned;
  readonly volumeMl: number;
  /** How many times the piece is filled to deliver the volume. */
  readonly deliveries: number;
  readonly relativeTolerance: number;
}

/** More refills than this are not asked of anybody. */
const MOST_DELIVERIES = 3;

/**
 * What to measure out a volume of liquid with, to a limit of error of `maxRelative`: in as few deliveries as may be,
 * with the coarsest piece that does. Single-volume pipettes only for exactly their volume; scales from half their
 * capacity. Limits of error of repeated deliveries add up.
 * @returns null if nothing owned does
 */
export function chooseMeasure(
  glass: readonly GlassOwned[],
  volumeMl: number,
  maxRelative: number,
): MeasuringChoice | null {
  requirePositive(volumeMl, 'the volume');
  const choices = glass.flatMap((piece): MeasuringChoice[] => {
    const deliveries = Math.ceil(volumeMl / piece.nominalMl - 1e-9);
    if (piece.use === 'flask' || deliveries > MOST_DELIVERIES) return [];
    const eachMl = volumeMl / deliveries;
    const reachable = hasScale(piece)
      ? eachMl >= SMALLEST_SHARE_OF_SCALE * piece.nominalMl
      : Math.abs(eachMl / piece.nominalMl - 1) < 1e-6;
    const relativeTolerance = piece.toleranceMl / eachMl;
    return reachable && relativeTolerance <= maxRelative
      ? [{ glass: piece, volumeMl, deliveries, relativeTolerance }]
      : [];
  });
  choices.sort(
    (a, b) =>
      a.deliveries - b.deliveries ||
      b.relativeTolerance - a.relativeTolerance ||
      a.glass.nominalMl - b.glass.nominalMl ||
      a.glass.id.localeCompare(b.glass.id, 'en'),
  );
  return choices[0] ?? null;
}
