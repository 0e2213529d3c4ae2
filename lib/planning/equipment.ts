import type { EquipmentKind } from '../domain/states';

/** How a pipette delivers: one volume only, any volume on a scale, or a set volume by a piston. */
export type PipetteDelivery = 'single-volume' | 'graduated' | 'piston';

/** A balance or a piece of glass as the room's list holds it; what a kind does not have is null. */
export interface EquipmentItem {
  readonly id: string;
  readonly kind: EquipmentKind;
  readonly name: string;
  readonly capacityMl: number | null;
  /** Limit of error at the nominal volume; null: from the ISO table for its class. */
  readonly toleranceMl: number | null;
  /** `A`, `AS` or `B`; null is taken as B. */
  readonly glassClass: string | null;
  readonly capacityG: number | null;
  readonly readabilityG: number | null;
  readonly repeatabilityG: number | null;
  readonly count: number;
  /** Pipettes only; taken as `single-volume` where not said. */
  readonly delivery?: PipetteDelivery;
}

export interface BalanceOwned {
  readonly id: string;
  readonly name: string;
  readonly capacityG: number;
  readonly readabilityG: number;
  /** Standard deviation of repeated weighings; null if not measured. */
  readonly repeatabilityG: number | null;
}

/** What a piece of volumetric glass is used as. */
export type GlassUse =
  'flask' | 'cylinder' | 'single-volume pipette' | 'graduated pipette' | 'piston pipette' | 'burette';

export interface GlassOwned {
  readonly id: string;
  readonly name: string;
  readonly use: GlassUse;
  readonly nominalMl: number;
  /** Limit of error at the nominal volume and 20 °C. */
  readonly toleranceMl: number;
  readonly toleranceSource: string;
  readonly count: number;
}
