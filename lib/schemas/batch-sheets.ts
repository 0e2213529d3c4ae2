import { z } from 'zod';
import { LEDGER_UNITS, TOLERANCE_CLASSES } from '@/lib/domain/quantities';
import { BATCH_STEP_KINDS } from '@/lib/domain/states';

/** The parts of a batch that are planned before it is made, as they are sent. */

export const soluteSchema = z.object({
  substanceId: z.string(),
  name: z.string(),
  formula: z.string(),
  molarity: z.number(),
});
export type BatchSolute = z.infer<typeof soluteSchema>;

/** The solution as it is labelled. */
export const classificationSchema = z.object({
  signalWord: z.enum(['Danger', 'Warning']).nullable(),
  pictograms: z.array(z.string()),
  hazards: z.array(z.object({ code: z.string(), text: z.string(), because: z.string() })),
  precautions: z.array(z.string()),
  supplemental: z.array(z.string()),
  incomplete: z.array(z.string()),
});

export const glasswareLineSchema = z.object({
  name: z.string(),
  use: z.string(),
  toleranceMl: z.number(),
  toleranceSource: z.string(),
});

export const takeSchema = z.object({
  id: z.uuid(),
  position: z.number().int(),
  substanceId: z.string(),
  name: z.string(),
  formula: z.string(),
  lotId: z.uuid(),
  lotCode: z.string(),
  place: z.string(),
  /** Why nothing may be taken from this lot now; null where it may. */
  lotHeldReason: z.string().nullable(),
  unit: z.enum(LEDGER_UNITS),
  /** Amounts in `unit`. */
  target: z.number(),
  low: z.number(),
  high: z.number(),
  /** As the balance or the scale shows it. */
  targetText: z.string(),
  rangeText: z.string(),
  measuredWith: z.string().nullable(),
  note: z.string(),
  actual: z.number().nullable(),
  verdict: z.enum(['within', 'explain', 'remake']).nullable(),
  explanation: z.string().nullable(),
  enteredBy: z.string().nullable(),
  enteredAt: z.string().nullable(),
  version: z.number().int(),
});
export type BatchTake = z.infer<typeof takeSchema>;

export const stepSchema = z.object({
  id: z.uuid(),
  position: z.number().int(),
  kind: z.enum(BATCH_STEP_KINDS),
  text: z.string(),
  doneAt: z.string().nullable(),
  doneBy: z.string().nullable(),
});
export type BatchStep = z.infer<typeof stepSchema>;

/** What the plan says beside takes and steps. */
export const plannedSheetSchema = z.object({
  makeVolumeMl: z.number(),
  tolerance: z.enum(TOLERANCE_CLASSES),
  toleranceFraction: z.number(),
  vessel: z.object({
    name: z.string(),
    fills: z.number().int(),
    fillMl: z.number(),
    meetsTolerance: z.boolean(),
  }),
  glassware: z.array(glasswareLineSchema),
  warnings: z.array(z.string()),
  questions: z.array(z.string()),
  passedOver: z.array(z.string()),
  expected: z.object({ pH: z.number().nullable(), colour: z.string().nullable() }),
  storageNote: z.string().nullable(),
});

/** What was really made. */
export const actualSchema = z.object({
  volumeMl: z.number(),
  verdict: z.enum(['within', 'explain', 'remake']),
  strengths: z.array(
    z.object({
      substanceId: z.string(),
      name: z.string(),
      plannedMolarity: z.number(),
      molarity: z.number(),
      /** Expanded, k = 2; null where the sheet had no budget. */
      expandedUncertainty: z.number().nullable(),
      deviationPercent: z.number(),
      verdict: z.enum(['within', 'explain', 'remake']),
      largestPart: z.string().nullable(),
    }),
  ),
});
export type BatchActual = z.infer<typeof actualSchema>;
