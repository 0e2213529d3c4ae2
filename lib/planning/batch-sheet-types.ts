import type { Substance } from '../chemistry/types';
import type { BatchStepKind } from '../domain/states';
import type { LedgerUnit, ToleranceClass } from '../domain/quantities';
import type { HazardStatement } from '../hazards/types';
import type { EquipmentItem } from './equipment';
import type { PassedOverReason, StockLot } from './lots';
import type { QuantityQuestion } from './sanity';
import type { BudgetInput, UncertaintyBudget } from './uncertainty';
import type { AssaySource } from './weigh-out';

/** A bottle as the sheet needs it. */
export interface SheetLot extends StockLot {
  readonly substance: Substance;
  readonly place: string;
  /** On the certificate; null: the catalogue's. */
  readonly assayPercent: number | null;
  /** On the certificate or label; null: by table or catalogue. */
  readonly densityGPerMl: number | null;
}

export interface SheetSolute {
  readonly substance: Substance;
  readonly molarity: number;
  /** null where no solubility is held. */
  readonly solubleMolarity: number | null;
}

export interface BatchSheetInput {
  readonly solution: {
    readonly name: string;
    readonly solutes: readonly SheetSolute[];
    readonly expected: { readonly pH: number | null; readonly colour: string | null };
  };
  readonly volumeMl: number;
  /** Every lot that might serve; the sheet picks by substance, expiry and hold. */
  readonly lots: readonly SheetLot[];
  readonly equipment: readonly EquipmentItem[];
  readonly tolerance: ToleranceClass;
  /** ISO day of making. */
  readonly onDay: string;
  /** Statements of the materials and of the solution as diluted. */
  readonly hazards: readonly HazardStatement[];
  /** Conditions a safety officer set, to be ticked. */
  readonly conditions: readonly string[];
}

/** One thing to take. Ledger amounts are integer millionths of `unit`. */
export interface TakeLine {
  readonly position: number;
  /** The solute of the recipe it is for. */
  readonly forSubstanceId: string;
  readonly substanceId: string;
  readonly name: string;
  readonly formula: string;
  readonly lotId: string;
  readonly lotCode: string;
  readonly place: string;
  readonly unit: LedgerUnit;
  readonly targetMicro: number;
  readonly lowMicro: number;
  readonly highMicro: number;
  readonly massG: number;
  readonly volumeMl: number | null;
  /** As the balance or scale shows it, with its unit. */
  readonly amountText: string;
  readonly rangeText: string;
  /** Balance or glass; null if nothing owned will do, which is then a warning. */
  readonly measuredWith: string | null;
  readonly assayPercent: number;
  readonly assaySource: AssaySource;
  /** mol of solute in one ledger unit of the lot. */
  readonly molPerUnit: number;
  /** Part of what is taken that ends in the batch: 1, or less where a stock is made and only some of it carried on. */
  readonly carriedShare: number;
  readonly note: string;
}

export interface GlasswareLine {
  readonly name: string;
  readonly use: string;
  readonly toleranceMl: number;
  readonly toleranceSource: string;
}

export interface SheetStep {
  readonly kind: BatchStepKind;
  readonly text: string;
}

export interface StrengthLine {
  readonly substanceId: string;
  readonly name: string;
  readonly molarity: number;
  /** `position` names the take line whose amount the input is; null for all others. */
  readonly inputs: readonly { readonly position: number | null; readonly input: BudgetInput }[];
  /** null where the solute can't be taken or measured. */
  readonly budget: UncertaintyBudget | null;
}

export interface SheetShortage {
  readonly substanceId: string;
  readonly name: string;
  readonly unit: LedgerUnit;
  readonly shortMicro: number;
}

/** Plain JSON: it is kept with the batch as it was when planned. */
export interface BatchSheet {
  readonly solutionName: string;
  readonly askedVolumeMl: number;
  readonly makeVolumeMl: number;
  readonly onDay: string;
  readonly tolerance: ToleranceClass;
  readonly toleranceFraction: number;
  readonly vessel: {
    readonly name: string;
    readonly fills: number;
    readonly fillMl: number;
    readonly relativeTolerance: number;
    readonly meetsTolerance: boolean;
  };
  readonly takes: readonly TakeLine[];
  readonly glassware: readonly GlasswareLine[];
  readonly steps: readonly SheetStep[];
  readonly strengths: readonly StrengthLine[];
  readonly shortages: readonly SheetShortage[];
  readonly passedOver: readonly {
    readonly lotCode: string;
    readonly reason: PassedOverReason;
    readonly message: string;
  }[];
  readonly questions: readonly QuantityQuestion[];
  readonly warnings: readonly string[];
}
