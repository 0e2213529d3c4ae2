import { z } from 'zod';
import { BATCH_STATES } from '@/lib/domain/states';
import {
  actualSchema,
  classificationSchema,
  plannedSheetSchema,
  soluteSchema,
  stepSchema,
  takeSchema,
} from './batch-sheets';
import { bottleLabelSchema, bottleSchema } from './bottles';
import { endpoint } from './endpoint';
import {
  dayField,
  idField,
  idParams,
  numberField,
  optionalNumberField,
  versionField,
  volumeMlField,
} from './fields';
import { listQuery, pageOf } from './list';
import { recordEntrySchema } from './records';

export const batchRowSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  solutionId: z.uuid(),
  solutionName: z.string(),
  volumeMl: z.number(),
  state: z.enum(BATCH_STATES),
  makeOn: z.string(),
  readyBy: z.string(),
  useBy: z.string().nullable(),
  isHeld: z.boolean(),
  makerName: z.string().nullable(),
  requestCodes: z.array(z.string()),
  version: z.number().int(),
});
export type BatchRow = z.infer<typeof batchRowSchema>;

const servedRequestSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  state: z.string(),
  session: z.string(),
  startsAt: z.string(),
  volumeMl: z.number(),
});

/** A batch as its sheet shows it. */
export const batchSchema = batchRowSchema.extend({
  heldReason: z.string().nullable(),
  plannedByName: z.string(),
  checkerName: z.string().nullable(),
  madeAt: z.string().nullable(),
  solutes: z.array(soluteSchema),
  classification: classificationSchema,
  sheet: plannedSheetSchema,
  takes: z.array(takeSchema),
  steps: z.array(stepSchema),
  requests: z.array(servedRequestSchema),
  bottles: z.array(bottleSchema),
  actual: actualSchema.nullable(),
  story: z.array(recordEntrySchema),
  /** What the printed square opens. */
  address: z.string(),
  /** What still keeps it from being checked; empty where nothing does. */
  missing: z.array(z.string()),
});
export type Batch = z.infer<typeof batchSchema>;

export const batchListQuerySchema = listQuery(['makeOn', 'code', 'state', 'readyBy', 'volumeMl'], 'makeOn', {
  state: z.enum(BATCH_STATES).optional(),
  on: dayField.optional(),
  solutionId: idField.optional(),
  requestId: idField.optional(),
});
export type BatchListQuery = z.output<typeof batchListQuerySchema>;

const reasonField = z.string().trim().min(3, 'Say why, in a few words.').max(500);

export const batchCreateSchema = z.strictObject({
  solutionId: idField,
  requestIds: z.array(idField).min(1, 'Choose at least one request.').max(40),
  /** What the requests still need where it is left out. */
  volumeMl: optionalNumberField(volumeMlField),
  makeOn: dayField,
});
export type BatchCreate = z.output<typeof batchCreateSchema>;

export const takeEntrySchema = z.strictObject({
  /** In the unit of the line: g or mL. */
  amount: numberField(
    z.number('Type the amount.').positive('Must be more than 0.').max(100_000, 'At most 100 000.'),
  ),
  explanation: z.string().trim().max(1000),
  version: versionField,
});
export type TakeEntry = z.output<typeof takeEntrySchema>;

export const stepTickSchema = z.strictObject({ isDone: z.boolean() });
export const batchVersionSchema = z.strictObject({ version: versionField });

export const batchCheckSchema = z.strictObject({
  /** What was really made; as planned where it is left out. */
  volumeMl: optionalNumberField(volumeMlField),
  note: z.string().trim().max(1000),
  version: versionField,
});
export type BatchCheck = z.output<typeof batchCheckSchema>;

export const batchBottleSchema = z.strictObject({
  bottles: z
    .array(z.strictObject({ volumeMl: numberField(volumeMlField), requestId: idField.nullable() }))
    .min(1, 'Fill at least one bottle.')
    .max(60, 'At most 60 bottles.'),
  version: versionField,
});
export type BatchBottling = z.output<typeof batchBottleSchema>;

export const batchReasonSchema = z.strictObject({ reason: reasonField, version: versionField });
export type BatchReason = z.output<typeof batchReasonSchema>;

const takeParams = z.strictObject({ id: idField, takeId: idField });
const stepParams = z.strictObject({ id: idField, stepId: idField });

export const batchEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/batches',
    action: 'batch:list',
    summary: 'Batches; an instructor sees those made for their own requests',
    query: batchListQuerySchema,
    response: pageOf(batchRowSchema),
    columns: [
      { key: 'code', header: 'Batch' },
      { key: 'solutionName', header: 'Solution' },
      { key: 'volumeMl', header: 'Volume, mL' },
      { key: 'makeOn', header: 'Make on' },
      { key: 'readyBy', header: 'Ready by' },
      { key: 'requestCodes', header: 'For' },
      { key: 'state', header: 'State' },
    ],
  }),
  create: endpoint({
    method: 'POST',
    path: '/api/batches',
    action: 'batch:write',
    summary: 'Plan one batch of a solution for one or more requests',
    body: batchCreateSchema,
    response: batchSchema,
    status: 201,
    ownTransaction: true,
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/batches/{id}',
    action: 'batch:read',
    summary: 'A batch with its sheet',
    params: idParams,
    response: batchSchema,
  }),
  start: endpoint({
    method: 'POST',
    path: '/api/batches/{id}/start',
    action: 'batch:write',
    summary: 'Begin to make it',
    params: idParams,
    body: batchVersionSchema,
    response: batchSchema,
  }),
  take: endpoint({
    method: 'PUT',
    path: '/api/batches/{id}/takes/{takeId}',
    action: 'batch:write',
    summary: 'Enter or correct what was really taken; stock falls by it once',
    params: takeParams,
    body: takeEntrySchema,
    response: batchSchema,
  }),
  tick: endpoint({
    method: 'PUT',
    path: '/api/batches/{id}/steps/{stepId}',
    action: 'batch:write',
    summary: 'Tick a step or take the tick back',
    params: stepParams,
    body: stepTickSchema,
    response: batchSchema,
  }),
  check: endpoint({
    method: 'POST',
    path: '/api/batches/{id}/check',
    action: 'batch:write',
    summary: 'Mark as checked; the real strength with its uncertainty follows',
    params: idParams,
    body: batchCheckSchema,
    response: batchSchema,
  }),
  bottle: endpoint({
    method: 'POST',
    path: '/api/batches/{id}/bottles',
    action: 'batch:write',
    summary: 'Divide a checked batch into bottles',
    params: idParams,
    body: batchBottleSchema,
    response: batchSchema,
    status: 201,
  }),
  discard: endpoint({
    method: 'POST',
    path: '/api/batches/{id}/discard',
    action: 'batch:write',
    summary: 'Discard it with what it was divided into',
    params: idParams,
    body: batchReasonSchema,
    response: batchSchema,
  }),
  hold: endpoint({
    method: 'POST',
    path: '/api/batches/{id}/hold',
    action: 'stock:hold',
    summary: 'Stop its use at once',
    params: idParams,
    body: batchReasonSchema,
    response: batchSchema,
  }),
  lift: endpoint({
    method: 'POST',
    path: '/api/batches/{id}/lift',
    action: 'stock:hold',
    summary: 'Allow its use again',
    params: idParams,
    body: batchReasonSchema,
    response: batchSchema,
  }),
  labels: endpoint({
    method: 'GET',
    path: '/api/batches/{id}/labels',
    action: 'batch:write',
    summary: 'What the labels of its bottles say',
    params: idParams,
    response: z.object({ labels: z.array(bottleLabelSchema) }),
  }),
};
