import type { LedgerUnit } from '../domain/quantities';

/** A substance to buy. Amounts are integer millionths of the unit. */
export interface OrderNeed {
  readonly substanceId: string;
  readonly unit: LedgerUnit;
  /** When how much is used; at least one. */
  readonly uses: readonly { readonly onDay: string; readonly amountMicro: number }[];
}

export interface Offer {
  readonly id: string;
  readonly supplierId: string;
  readonly substanceId: string;
  readonly unit: LedgerUnit;
  readonly packMicro: number;
  /** Price of one pack in minor units, for orders of at least `fromPacks`; the first from 1, ascending. */
  readonly prices: readonly { readonly fromPacks: number; readonly priceMinor: number }[];
  /** Packs the supplier has; null where it sets no limit. */
  readonly maxPacks: number | null;
  /** Days it keeps after arrival; null: longer than any plan. */
  readonly shelfLifeDays: number | null;
  readonly hazardous: boolean;
}

export interface OrderSupplier {
  readonly id: string;
  readonly name: string;
  readonly leadDays: number;
  readonly carriageMinor: number;
  /** Once per order that holds anything hazardous. */
  readonly hazardSurchargeMinor: number;
  /** Value of goods below which nothing is accepted. */
  readonly minimumOrderMinor: number;
}

export interface OrderOptions {
  /** ISO day of ordering. */
  readonly orderOn: string;
  readonly budgetMinor: number | null;
  /** Offers to buy at least so many packs of. */
  readonly pinned: readonly { readonly offerId: string; readonly packs: number }[];
  /** Offers not to buy. */
  readonly forbidden: readonly string[];
  readonly timeLimitSeconds: number;
}

export interface PlannedLine {
  readonly offerId: string;
  readonly supplierId: string;
  readonly substanceId: string;
  readonly unit: LedgerUnit;
  readonly packs: number;
  readonly packMicro: number;
  readonly priceMinor: number;
  readonly lineTotalMinor: number;
  readonly reason: string;
}

export interface PlannedSupplier {
  readonly supplierId: string;
  readonly goodsMinor: number;
  readonly carriageMinor: number;
  readonly hazardSurchargeMinor: number;
  readonly totalMinor: number;
}

export interface PricedOrder {
  readonly lines: readonly PlannedLine[];
  readonly suppliers: readonly PlannedSupplier[];
  readonly totalMinor: number;
}

export interface NeedCover {
  readonly substanceId: string;
  readonly unit: LedgerUnit;
  readonly neededMicro: number;
  readonly boughtMicro: number;
  readonly surplusMicro: number;
  /** Uses for which nothing arrives in time, whoever is asked. */
  readonly lateOn: readonly string[];
}

export interface Uncovered {
  readonly substanceId: string;
  readonly unit: LedgerUnit;
  readonly message: string;
}

export interface OrderPlan extends PricedOrder {
  readonly covers: readonly NeedCover[];
  readonly uncovered: readonly Uncovered[];
  /** (cost − proven least cost) / cost; 0: proven to be the least. */
  readonly gap: number;
  /** Each need bought by itself at the best unit price; null where that can't be done. */
  readonly naive: PricedOrder | null;
  /** Against the naive plan; null without one. */
  readonly savedMinor: number | null;
}

export type OrderOutcome =
  | { readonly status: 'planned'; readonly plan: OrderPlan }
  /** The least cost is more than the budget: `plan` is that least. */
  | { readonly status: 'over-budget'; readonly plan: OrderPlan; readonly overMinor: number }
  | { readonly status: 'no-plan'; readonly message: string; readonly uncovered: readonly Uncovered[] };
