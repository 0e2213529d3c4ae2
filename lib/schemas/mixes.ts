import { z } from 'zod';
import { endpoint } from './endpoint';

/** Inputs and answers of the computing core, to the letter of the published interface. */

/** Answers are not changed by whoever reads them. */
const listOf = <T extends z.ZodType>(item: T) => z.array(item).readonly();

const finite = z.number();
const activityField = z.enum(['ideal', 'davies', 'extended-debye-huckel']).default('davies');
const temperatureField = finite.min(10, 'At least 10 °C.').max(40, 'At most 40 °C.').default(25);
const speciesIdField = z.string().min(1).max(60);
const MOST_MOL = 1000;
const amountField = finite.min(0, 'Only H+ may be negative.').max(MOST_MOL, 'No more than 1000 mol.');
/** mol by component; H+ counts the protons beyond those of water, so that it alone may be negative. */
const amountsField = z
  .object({
    'H+': finite.min(-MOST_MOL, 'No less than −1000 mol.').max(MOST_MOL, 'No more than 1000 mol.').optional(),
  })
  .catchall(amountField)
  .refine((amounts) => Object.keys(amounts).length > 0, 'Give at least one amount.')
  .refine((amounts) => Object.keys(amounts).length <= 60, 'At most 60 components.')
  .refine(
    (amounts) => Object.keys(amounts).every((id) => id.length > 0 && id.length <= 60),
    'The name of a component has 1 to 60 characters.',
  ) as unknown as z.ZodType<Record<string, number>, Record<string, number>>;
const coefficientField = finite.min(-40, 'At least −40.').max(40, 'At most 40.');

const reactionSchema = z.strictObject({
  species: speciesIdField,
  phase: z.enum(['aq', 's', 'g']),
  stoich: z
    .record(speciesIdField, coefficientField)
    .refine(
      (stoich) => Object.entries(stoich).some(([id, count]) => id !== 'H2O' && count !== 0),
      'Say which components it is formed from.',
    ),
  logK: finite.min(-200, 'Beyond any constant.').max(200, 'Beyond any constant.'),
});

export const speciationSchema = z.strictObject({
  volumeL: finite.min(1e-9, 'At least 1e-9 L.').max(10_000, 'At most 10 000 L.').default(1),
  amounts: amountsField,
  reactions: z
    .union(
      [z.literal('catalogue'), z.array(reactionSchema).max(400, 'At most 400 reactions.')],
      'Say "catalogue", or give a list of reactions.',
    )
    .default('catalogue'),
  pH: finite.min(-2, 'At least −2.').max(16, 'At most 16.').nullable().default(null),
  suppress: z.array(speciesIdField).max(200).default([]),
  activity: activityField,
  temperatureC: temperatureField,
  headspace: z
    .discriminatedUnion('kind', [
      z.strictObject({ kind: z.literal('none') }),
      z.strictObject({
        kind: z.literal('sealed'),
        volumeL: finite.min(1e-9, 'At least 1e-9 L.').max(10_000, 'At most 10 000 L.'),
      }),
      z.strictObject({
        kind: z.literal('open'),
        partialPressuresBar: z.record(
          speciesIdField,
          finite.positive('Must be more than 0.').max(100, 'At most 100 bar.'),
        ),
      }),
    ])
    .default({ kind: 'none' }),
});
export type SpeciationBody = z.output<typeof speciationSchema>;

const noteSchema = z.object({ code: z.string(), message: z.string() });
export const equilibriumSchema = z.object({
  converged: z.literal(true),
  iterations: z.number().int(),
  activity: z.enum(['ideal', 'davies', 'extended-debye-huckel']),
  temperatureC: z.number(),
  pH: z.number().nullable(),
  ionicStrength: z.number(),
  species: listOf(
    z.object({
      id: z.string(),
      phase: z.literal('aq'),
      molarity: z.number(),
      gamma: z.number(),
      activity: z.number(),
    }),
  ),
  solids: listOf(
    z.object({
      id: z.string(),
      moles: z.number(),
      grams: z.number().nullable(),
      saturationIndex: z.number(),
    }),
  ),
  gases: listOf(z.object({ id: z.string(), partialPressureBar: z.number(), moles: z.number() })),
  balances: listOf(z.object({ component: z.string(), total: z.number(), relativeResidual: z.number() })),
  chargeImbalance: z.number(),
  notes: listOf(noteSchema),
});

export const roomSchema = z.strictObject({
  volumeM3: finite.positive('Must be more than 0.').min(1).max(100_000),
  airChangesPerHour: finite.min(0).max(100),
  fumeCupboard: z.boolean(),
});

const soluteSchema = z.strictObject({
  substance: z.string().trim().min(1, 'Choose a substance.').max(80),
  molarity: finite.positive('Must be more than 0.').max(40, 'No solution is stronger than 40 mol/L.'),
});
export const portionSchema = z.strictObject({
  label: z.string().trim().min(1, 'Give it a label.').max(120),
  solutes: z.array(soluteSchema).max(20, 'At most 20 solutes.'),
  volumeMl: finite.min(0.001, 'At least 0.001 mL.').max(100_000, 'At most 100 000 mL.'),
});

export const mixPreviewSchema = z.strictObject({
  portions: z.array(portionSchema).min(1, 'Pour at least one portion.').max(20, 'At most 20 portions.'),
  activity: activityField,
  temperatureC: temperatureField,
  room: roomSchema.default({ volumeM3: 150, airChangesPerHour: 6, fumeCupboard: false }),
  slips: z.boolean().default(false),
});
export type MixPreviewBody = z.output<typeof mixPreviewSchema>;

const limitSchema = z.object({ name: z.string(), ppm: z.number(), source: z.string() });
export const findingSchema = z.object({
  rule: z.string(),
  severity: z.enum(['stop', 'review', 'controlled', 'caution', 'note']),
  scope: z.enum(['mix', 'order', 'neighbours', 'waste', 'storage', 'slip', 'policy', 'quality']),
  title: z.string(),
  reason: z.string(),
  mustNot: z.string().nullable(),
  gas: z
    .object({
      species: z.string(),
      worstCaseMoles: z.number(),
      mlAt25C: z.number(),
      ppmInRoom: z.number(),
      ppmInBreathingZone: z.number(),
      predictedPpmInBreathingZone: z.number().nullable(),
      ppmAboveLiquid: z.number().nullable(),
      limit: limitSchema.nullable(),
      limits: listOf(limitSchema),
    })
    .nullable(),
  precautions: listOf(z.string()),
  alternative: z.string().nullable(),
  source: z.string(),
  concerns: listOf(z.string()),
});
export const classificationSchema = z.object({
  signalWord: z.enum(['Danger', 'Warning']).nullable(),
  pictograms: listOf(z.string()),
  hazards: listOf(z.object({ code: z.string(), text: z.string(), because: z.string() })),
  precautions: listOf(z.string()),
  supplemental: listOf(z.string()),
  incomplete: listOf(z.string()),
});
export const decisionSchema = z.enum(['stop', 'review', 'controlled', 'caution', 'clear']);

const slipSchema = z.object({
  kind: z.enum([
    'too-strong',
    'doubled',
    'swapped',
    'reversed',
    'left-out',
    'wrong-substance',
    'wrong-bottle',
    'overnight',
    'wrong-jar',
  ]),
  sentence: z.string(),
  decision: decisionSchema,
  finding: findingSchema,
  concerns: listOf(z.string()),
});
/** What single slips would lead to; only where asked for. */
export const slipReportSchema = z.object({
  tried: z.number().int(),
  raised: listOf(slipSchema),
  stops: z.number().int(),
  summary: z.string(),
  separation: z.string().nullable(),
});

export const mixAnswerSchema = z.object({
  finalVolumeMl: z.number(),
  diluted: listOf(z.object({ substance: z.string(), name: z.string(), molarity: z.number() })),
  steps: listOf(
    z.object({
      afterPortion: z.string(),
      volumeMl: z.number(),
      amounts: z.record(z.string(), z.number()),
      equilibrium: equilibriumSchema,
    }),
  ),
  equilibrium: equilibriumSchema,
  appearance: z.object({
    solution: z.object({ hex: z.string(), words: z.string() }),
    solids: listOf(z.object({ id: z.string(), name: z.string(), hex: z.string(), grams: z.number() })),
  }),
  findings: listOf(findingSchema),
  classification: classificationSchema,
  decision: decisionSchema,
  slips: slipReportSchema.optional(),
});
export type MixAnswer = z.infer<typeof mixAnswerSchema>;

export const mixEndpoints = {
  speciation: endpoint({
    method: 'POST',
    path: '/api/speciation',
    action: 'mix:compute',
    summary: 'Equilibrium at given amounts of components',
    body: speciationSchema,
    response: equilibriumSchema,
    cost: 'heavy',
  }),
  preview: endpoint({
    method: 'POST',
    path: '/api/mixes/preview',
    action: 'mix:compute',
    summary: 'What will be in the vessel, what can go wrong, and how it is labelled',
    body: mixPreviewSchema,
    response: mixAnswerSchema,
    cost: 'heavy',
  }),
};
