import { z } from 'zod';
import { LEDGER_UNITS } from '@/lib/domain/quantities';
import { BATCH_STATES, MOVEMENT_KINDS } from '@/lib/domain/states';
import { endpoint } from './endpoint';
import {
  dayField,
  idField,
  idParams,
  numberField,
  optionalNumberField,
  slugField,
  versionField,
} from './fields';
import { listQuery, pageOf } from './list';
import { recordEntrySchema } from './records';

export const lotRowSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  substanceId: z.string(),
  substanceName: z.string(),
  formula: z.string(),
  lotNumber: z.string(),
  /** % w/w on the certificate; null where none came with it. */
  assayPercent: z.number().nullable(),
  unit: z.enum(LEDGER_UNITS),
  /** In `unit`. */
  balance: z.number(),
  receivedOn: z.string(),
  openedOn: z.string().nullable(),
  expiresOn: z.string().nullable(),
  placeId: z.uuid(),
  placeName: z.string(),
  isHeld: z.boolean(),
  isExpired: z.boolean(),
  version: z.number().int(),
});
export type LotRow = z.infer<typeof lotRowSchema>;

export const movementSchema = z.object({
  id: z.uuid(),
  lotId: z.uuid(),
  lotCode: z.string(),
  substanceName: z.string(),
  kind: z.enum(MOVEMENT_KINDS),
  /** In `unit`; negative where stock fell. */
  amount: z.number(),
  balanceAfter: z.number(),
  unit: z.enum(LEDGER_UNITS),
  actorName: z.string(),
  reason: z.string().nullable(),
  batchId: z.uuid().nullable(),
  batchCode: z.string().nullable(),
  at: z.string(),
});
export type Movement = z.infer<typeof movementSchema>;

export const lotSchema = lotRowSchema.extend({
  heldReason: z.string().nullable(),
  substanceHeldReason: z.string().nullable(),
  supplierName: z.string().nullable(),
  storageGroup: z.string(),
  placeStorageGroup: z.string(),
  /** What came in, before anything was taken; in `unit`. */
  receivedAmount: z.number(),
  /** Batches that took from it, with their bottles. */
  usedIn: z.array(
    z.object({
      batchId: z.uuid(),
      batchCode: z.string(),
      solutionName: z.string(),
      state: z.enum(BATCH_STATES),
      amount: z.number(),
      at: z.string(),
      bottleCodes: z.array(z.string()),
    }),
  ),
  story: z.array(recordEntrySchema),
});
export type Lot = z.infer<typeof lotSchema>;

export const lotListQuerySchema = listQuery(
  ['code', 'substance', 'expiresOn', 'receivedOn', 'balance'],
  'expiresOn',
  {
    substanceId: slugField.optional(),
    placeId: idField.optional(),
    show: z.enum(['in-stock', 'expiring', 'expired', 'low', 'held', 'empty', 'all']).default('in-stock'),
  },
);
export type LotListQuery = z.output<typeof lotListQuerySchema>;

const reasonField = z.string().trim().min(3, 'Say why, in a few words.').max(500);
const amountField = z
  .number('Type the amount.')
  .positive('Must be more than 0.')
  .max(1_000_000, 'At most 1 000 000.');
const assayField = z.number().gt(0, 'Must be more than 0 %.').max(100, 'At most 100 %.');

export const lotCreateSchema = z.strictObject({
  substanceId: slugField,
  lotNumber: z.string().trim().min(1, 'Copy the lot number from the label.').max(80),
  assayPercent: optionalNumberField(assayField),
  /** In the unit the substance is counted in. */
  amount: numberField(amountField),
  receivedOn: dayField,
  expiresOn: dayField.nullable(),
  placeId: idField,
  reason: reasonField,
});
export type LotCreate = z.output<typeof lotCreateSchema>;

export const lotPatchSchema = z.strictObject({
  placeId: idField,
  assayPercent: optionalNumberField(assayField),
  openedOn: dayField.nullable(),
  expiresOn: dayField.nullable(),
  reason: reasonField,
  version: versionField,
});
export type LotPatch = z.output<typeof lotPatchSchema>;

export const lotReasonSchema = z.strictObject({ reason: reasonField, version: versionField });
export type LotReason = z.output<typeof lotReasonSchema>;

export const movementListQuerySchema = listQuery(['at', 'amount'], '-at', {
  lotId: idField.optional(),
  batchId: idField.optional(),
  kind: z.enum(MOVEMENT_KINDS).optional(),
});
export type MovementListQuery = z.output<typeof movementListQuerySchema>;

/** Stock changed by hand. A count says what stands there; the others say what came or went. */
export const movementCreateSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('counted'),
    lotId: idField,
    amount: numberField(
      z.number('Type what stands there.').min(0, 'Not below 0.').max(1_000_000, 'At most 1 000 000.'),
    ),
    reason: reasonField,
  }),
  z.strictObject({
    kind: z.literal('discarded'),
    lotId: idField,
    amount: numberField(amountField),
    reason: reasonField,
  }),
  z.strictObject({
    kind: z.literal('put-back'),
    lotId: idField,
    amount: numberField(amountField),
    reason: reasonField,
  }),
]);
export type MovementCreate = z.output<typeof movementCreateSchema>;

export const lotEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/lots',
    action: 'stock:read',
    summary: 'Lots on the shelves, the first to expire first',
    query: lotListQuerySchema,
    response: pageOf(lotRowSchema),
    columns: [
      { key: 'code', header: 'Lot' },
      { key: 'substanceName', header: 'Substance' },
      { key: 'lotNumber', header: 'Lot number' },
      { key: 'assayPercent', header: 'Assay, %' },
      { key: 'balance', header: 'Left' },
      { key: 'unit', header: 'Unit' },
      { key: 'placeName', header: 'Place' },
      { key: 'receivedOn', header: 'Received' },
      { key: 'expiresOn', header: 'Expires' },
      { key: 'isHeld', header: 'Held' },
    ],
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/lots/{id}',
    action: 'stock:read',
    summary: 'A lot with what was made from it',
    params: idParams,
    response: lotSchema,
  }),
  create: endpoint({
    method: 'POST',
    path: '/api/lots',
    action: 'stock:write',
    summary: 'Put a lot on the shelf by hand',
    body: lotCreateSchema,
    response: lotSchema,
    status: 201,
  }),
  update: endpoint({
    method: 'PATCH',
    path: '/api/lots/{id}',
    action: 'stock:write',
    summary: 'Move a lot, or correct its dates and assay',
    params: idParams,
    body: lotPatchSchema,
    response: lotSchema,
  }),
  hold: endpoint({
    method: 'POST',
    path: '/api/lots/{id}/hold',
    action: 'stock:hold',
    summary: 'Stop its use at once, and that of everything made from it',
    params: idParams,
    body: lotReasonSchema,
    response: lotSchema,
  }),
  lift: endpoint({
    method: 'POST',
    path: '/api/lots/{id}/lift',
    action: 'stock:hold',
    summary: 'Allow its use again',
    params: idParams,
    body: lotReasonSchema,
    response: lotSchema,
  }),
};

export const movementEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/movements',
    action: 'stock:read',
    summary: 'The stock ledger, newest line first',
    query: movementListQuerySchema,
    response: pageOf(movementSchema),
    columns: [
      { key: 'at', header: 'When' },
      { key: 'lotCode', header: 'Lot' },
      { key: 'substanceName', header: 'Substance' },
      { key: 'kind', header: 'What' },
      { key: 'amount', header: 'Amount' },
      { key: 'balanceAfter', header: 'Left after' },
      { key: 'unit', header: 'Unit' },
      { key: 'actorName', header: 'Who' },
      { key: 'reason', header: 'Why' },
      { key: 'batchCode', header: 'Batch' },
    ],
  }),
  create: endpoint({
    method: 'POST',
    path: '/api/movements',
    action: 'stock:write',
    summary: 'Write a line of the ledger by hand: a count, something discarded, something put back',
    body: movementCreateSchema,
    response: movementSchema,
    status: 201,
  }),
};
