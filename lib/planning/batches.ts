import { requirePositive, requireWhole } from './checks';
import type { Packing } from './vessel-packing';
import { packIntoVessels } from './vessel-packing';

/** A volume of one solution wanted on a day (days since 1970-01-01). */
export interface BatchNeed {
  readonly id: string;
  readonly solutionId: string;
  readonly volumeMl: number;
  readonly neededOnDay: number;
  /** Days it keeps: made on the day of use or up to this many days before. */
  readonly shelfLifeDays: number;
  /** Days before use by which it must stand ready. */
  readonly leadDays: number;
}

/** Days on which a need may be made, both ends included. */
export interface MakeWindow {
  readonly earliestDay: number;
  readonly latestDay: number;
}

export interface PlannedBatch {
  readonly solutionId: string;
  /** The latest day that serves all, so that the solution is freshest. */
  readonly makeOnDay: number;
  /** Where the batch may be moved without leaving any of its windows. */
  readonly window: MakeWindow;
  readonly needIds: readonly string[];
  readonly volumeMl: number;
  readonly packing: Packing;
}

export interface BatchPlan {
  /** By day, then solution. */
  readonly batches: readonly PlannedBatch[];
  /** Needs with no day to make them on: the lead is longer than the shelf life, or no working day lies between. */
  readonly impossible: readonly { readonly needId: string; readonly message: string }[];
  readonly onePerRequest: number;
  readonly saved: number;
}

export interface BatchOptions {
  /** Whether the prep room works on a day. */
  readonly isWorkingDay: (day: number) => boolean;
  /** First day on which anything can still be made. */
  readonly fromDay: number;
  /** Sizes of the vessels owned, mL. */
  readonly vesselsMl: readonly number[];
}

function checkNeed(need: BatchNeed): void {
  requirePositive(need.volumeMl, `the volume of ${need.id}`);
  requireWhole(need.shelfLifeDays, `the shelf life of ${need.id}`);
  requireWhole(need.leadDays, `the lead of ${need.id}`);
  if (!Number.isSafeInteger(need.neededOnDay)) throw new RangeError(`the day of ${need.id} is no whole day`);
}

/**
 * The make-window of a need, [need − shelf life, need − lead], drawn in to working days from `fromDay` on.
 * @returns null if no such day is left
 * @throws RangeError if a figure of the need is no quantity
 */
export function makeWindow(
  need: BatchNeed,
  options: Pick<BatchOptions, 'isWorkingDay' | 'fromDay'>,
): MakeWindow | null {
  checkNeed(need);
  let earliestDay = Math.max(need.neededOnDay - need.shelfLifeDays, options.fromDay);
  let latestDay = need.neededOnDay - need.leadDays;
  while (earliestDay <= latestDay && !options.isWorkingDay(earliestDay)) earliestDay += 1;
  while (latestDay >= earliestDay && !options.isWorkingDay(latestDay)) latestDay -= 1;
  return earliestDay <= latestDay ? { earliestDay, latestDay } : null;
}

interface Windowed {
  readonly need: BatchNeed;
  readonly window: MakeWindow;
}

/**
 * The fewest days that meet every window: take the window that closes first, make on its last day, and drop all that
 * day serves. Exact for intervals: the windows so chosen are disjoint, so no plan can have fewer.
 */
export function stabWindows(windows: readonly MakeWindow[]): number[] {
  const days: number[] = [];
  for (const window of [...windows].sort((a, b) => a.latestDay - b.latestDay)) {
    const last = days.at(-1);
    if (last === undefined || last < window.earliestDay) days.push(window.latestDay);
  }
  return days;
}

function batchesOf(
  solutionId: string,
  wanted: readonly Windowed[],
  vesselsMl: readonly number[],
): PlannedBatch[] {
  const days = stabWindows(wanted.map(({ window }) => window));
  return days.map((day) => {
    // The freshest batch serves a need that several could; each day is the last of some window, so none stays empty.
    const served = wanted.filter(
      ({ window }) => days.findLast((d) => d >= window.earliestDay && d <= window.latestDay) === day,
    );
    const volumeMl = served.reduce((sum, { need }) => sum + need.volumeMl, 0);
    return {
      solutionId,
      makeOnDay: day,
      window: {
        earliestDay: Math.max(...served.map(({ window }) => window.earliestDay)),
        latestDay: Math.min(...served.map(({ window }) => window.latestDay)),
      },
      needIds: served.map(({ need }) => need.id),
      volumeMl,
      packing: packIntoVessels(volumeMl, vesselsMl),
    };
  });
}

/**
 * Fewest batches for what is wanted: per solution the fewest make-days that meet every window, each then packed into
 * the vessels the room owns.
 * @throws RangeError if a figure of a need is no quantity, or no vessel is owned
 */
export function planBatches(needs: readonly BatchNeed[], options: BatchOptions): BatchPlan {
  const bySolution = new Map<string, Windowed[]>();
  const impossible: { needId: string; message: string }[] = [];
  for (const need of needs) {
    const window = makeWindow(need, options);
    if (window === null) {
      const why =
        need.leadDays > need.shelfLifeDays
          ? `it must be ready ${need.leadDays} days ahead but keeps only ${need.shelfLifeDays}`
          : 'no working day is left in which to make it';
      impossible.push({ needId: need.id, message: `${need.id} can't be planned: ${why}.` });
    } else {
      bySolution.set(need.solutionId, [...(bySolution.get(need.solutionId) ?? []), { need, window }]);
    }
  }
  const batches = [...bySolution].flatMap(([solutionId, wanted]) =>
    batchesOf(solutionId, wanted, options.vesselsMl),
  );
  batches.sort((a, b) => a.makeOnDay - b.makeOnDay || a.solutionId.localeCompare(b.solutionId, 'en'));
  const onePerRequest = needs.length - impossible.length;
  return { batches, impossible, onePerRequest, saved: onePerRequest - batches.length };
}
