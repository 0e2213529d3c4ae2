import type { LedgerUnit } from '../domain/quantities';
import { requirePositive, requireWhole } from './checks';
import { addDays, dayNumber, isoDayOf } from './days';

/** A substance wanted on a day. Amounts are integer millionths of the unit. */
export interface PlannedUse {
  readonly substanceId: string;
  readonly unit: LedgerUnit;
  readonly amountMicro: number;
  /** ISO day on which it is taken. */
  readonly onDay: string;
  /** What it is for, in words. */
  readonly reason: string;
}

/** What is on the shelf (usable lots only) or has been ordered. */
export interface Supply {
  readonly substanceId: string;
  readonly unit: LedgerUnit;
  readonly amountMicro: number;
  /** ISO day from which it can be used; today or earlier for stock. */
  readonly availableOn: string;
  /** ISO day, the last of use; null: does not expire. */
  readonly expiresOn: string | null;
  readonly kind: 'stock' | 'on-order';
}

/** What is known of buying a substance. */
export interface SubstancePolicy {
  readonly substanceId: string;
  readonly unit: LedgerUnit;
  /** Kept as a reserve beyond planned use. */
  readonly safetyStockMicro: number;
  /** Days from order to shelf: of the quickest supplier, put-away included. */
  readonly leadDays: number;
}

export interface DayBalance {
  readonly onDay: string;
  /** What came in on this day. */
  readonly arrivedMicro: number;
  readonly expiredMicro: number;
  readonly usedMicro: number;
  readonly shortMicro: number;
  /** Usable at the end of the day. */
  readonly balanceMicro: number;
}

export interface Shortage {
  readonly substanceId: string;
  readonly unit: LedgerUnit;
  readonly kind: 'planned-use' | 'safety-stock';
  /** For planned use: all that stays unmet; for safety stock: what is missing to the reserve at its lowest. */
  readonly shortMicro: number;
  /** ISO day on which it first runs out. */
  readonly neededOn: string;
  readonly orderBy: string;
  /** Whether the order-by day has passed. */
  readonly isLate: boolean;
  /** Unmet parts by day, for an order that can arrive in parts. */
  readonly uses: readonly { readonly onDay: string; readonly amountMicro: number; readonly reason: string }[];
}

export interface ShortagePlan {
  /** Soonest order-by first. */
  readonly shortages: readonly Shortage[];
  readonly timelines: readonly {
    readonly substanceId: string;
    readonly unit: LedgerUnit;
    readonly days: readonly DayBalance[];
  }[];
}

interface Parcel {
  readonly fromDay: number;
  readonly toDay: number;
  left: number;
}

const keyOf = (entry: { readonly substanceId: string; readonly unit: LedgerUnit }) =>
  `${entry.substanceId} ${entry.unit}`;

function grouped<T extends { readonly substanceId: string; readonly unit: LedgerUnit }>(
  entries: readonly T[],
): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const entry of entries) groups.set(keyOf(entry), [...(groups.get(keyOf(entry)) ?? []), entry]);
  return groups;
}

/** Takes from the parcels usable on a day, soonest to expire first; returns what could not be met. */
function takeFrom(parcels: readonly Parcel[], day: number, amount: number): number {
  const usable = parcels.filter((parcel) => parcel.fromDay <= day && day <= parcel.toDay && parcel.left > 0);
  usable.sort((a, b) => a.toDay - b.toDay || a.fromDay - b.fromDay);
  let missing = amount;
  for (const parcel of usable) {
    const taken = Math.min(parcel.left, missing);
    parcel.left -= taken;
    missing -= taken;
  }
  return missing;
}

const usableOn = (parcels: readonly Parcel[], day: number) =>
  parcels.reduce((sum, parcel) => sum + (parcel.fromDay <= day && day <= parcel.toDay ? parcel.left : 0), 0);

function follow(uses: readonly PlannedUse[], supplies: readonly Supply[], today: number) {
  const parcels: Parcel[] = supplies.map(({ availableOn, expiresOn, amountMicro }) => ({
    fromDay: dayNumber(availableOn),
    toDay: expiresOn === null ? Number.POSITIVE_INFINITY : dayNumber(expiresOn),
    left: amountMicro,
  }));
  const unmet: { onDay: string; amountMicro: number; reason: string }[] = [];
  const days: DayBalance[] = [];
  const stops = new Set([today]);
  for (const use of uses) stops.add(dayNumber(use.onDay));
  for (const parcel of parcels) if (parcel.fromDay > today) stops.add(parcel.fromDay);
  let before = Number.NEGATIVE_INFINITY;
  for (const day of [...stops].sort((a, b) => a - b)) {
    const arrivedMicro = parcels.reduce(
      (sum, parcel) => sum + (parcel.fromDay > before && parcel.fromDay <= day ? parcel.left : 0),
      0,
    );
    const expiredMicro = parcels.reduce(
      (sum, parcel) => sum + (parcel.toDay < day && parcel.toDay >= before ? parcel.left : 0),
      0,
    );
    const due = uses.filter((use) => dayNumber(use.onDay) === day);
    let shortMicro = 0;
    for (const use of due) {
      const missing = takeFrom(parcels, day, use.amountMicro);
      if (missing > 0) unmet.push({ onDay: use.onDay, amountMicro: missing, reason: use.reason });
      shortMicro += missing;
    }
    const asked = due.reduce((sum, use) => sum + use.amountMicro, 0);
    const onDay = isoDayOf(day);
    days.push({
      onDay,
      arrivedMicro,
      expiredMicro,
      usedMicro: asked - shortMicro,
      shortMicro,
      balanceMicro: usableOn(parcels, day),
    });
    before = day;
  }
  return { unmet, days };
}

/**
 * What will run out, and by when to order it.
 *
 * Each substance is followed day by day: parcels come in, expire and are used soonest-expiring first, which wastes
 * least. Uses that stay unmet make one shortage per substance; where planned use is covered but the balance falls
 * below the reserve, that is a shortage of its own.
 * @param today - ISO day; uses before it are refused
 * @throws RangeError if an amount is no whole number above 0, a day does not exist, or a use lies in the past
 */
export function findShortages(
  uses: readonly PlannedUse[],
  supplies: readonly Supply[],
  policies: readonly SubstancePolicy[],
  today: string,
): ShortagePlan {
  const todayNumber = dayNumber(today);
  for (const use of uses) {
    requireWhole(use.amountMicro, `the use of ${use.substanceId}`);
    requirePositive(use.amountMicro, `the use of ${use.substanceId}`);
    if (dayNumber(use.onDay) < todayNumber)
      throw new RangeError(`a use of ${use.substanceId} on ${use.onDay} lies in the past`);
  }
  for (const supply of supplies) requireWhole(supply.amountMicro, `the supply of ${supply.substanceId}`);
  const [usesBy, suppliesBy, policyBy] = [
    grouped(uses),
    grouped(supplies),
    new Map(policies.map((policy) => [keyOf(policy), policy])),
  ];
  const shortages: Shortage[] = [];
  const timelines: { substanceId: string; unit: LedgerUnit; days: DayBalance[] }[] = [];
  for (const key of [...new Set([...usesBy.keys(), ...policyBy.keys()])].sort()) {
    const own = usesBy.get(key) ?? [];
    const policy = policyBy.get(key);
    const subject = own[0] ?? policy;
    if (subject === undefined) continue;
    const { substanceId, unit } = subject;
    const { unmet, days } = follow(own, suppliesBy.get(key) ?? [], todayNumber);
    timelines.push({ substanceId, unit, days });
    const add = (kind: Shortage['kind'], shortMicro: number, neededOn: string, parts: Shortage['uses']) => {
      const orderBy = addDays(neededOn, -(policy?.leadDays ?? 0));
      shortages.push({
        substanceId,
        unit,
        kind,
        shortMicro,
        neededOn,
        orderBy,
        isLate: dayNumber(orderBy) < todayNumber,
        uses: parts,
      });
    };
    const first = unmet[0];
    const reserve = policy?.safetyStockMicro ?? 0;
    const below = days.find((day) => day.balanceMicro < reserve);
    if (first !== undefined)
      add(
        'planned-use',
        unmet.reduce((sum, part) => sum + part.amountMicro, 0),
        first.onDay,
        unmet,
      );
    if (below !== undefined) {
      const lowest = Math.min(...days.map((day) => day.balanceMicro));
      const amountMicro = reserve - lowest;
      add('safety-stock', amountMicro, below.onDay, [{ onDay: below.onDay, amountMicro, reason: 'reserve' }]);
    }
  }
  shortages.sort(
    (a, b) => dayNumber(a.orderBy) - dayNumber(b.orderBy) || a.substanceId.localeCompare(b.substanceId, 'en'),
  );
  return { shortages, timelines };
}
