import { z } from 'zod';
import { BOTTLE_STATES } from '@/lib/domain/states';
import { actualSchema, classificationSchema, soluteSchema } from './batch-sheets';
import { endpoint } from './endpoint';
import { idField, idParams, versionField } from './fields';
import { listQuery, pageOf } from './list';

export const bottleSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  batchId: z.uuid(),
  requestId: z.uuid().nullable(),
  requestCode: z.string().nullable(),
  volumeMl: z.number(),
  state: z.enum(BOTTLE_STATES),
  placeId: z.uuid().nullable(),
  publicToken: z.string(),
  isRevoked: z.boolean(),
  labelPrints: z.number().int(),
  version: z.number().int(),
});
export type Bottle = z.infer<typeof bottleSchema>;

export const bottleRowSchema = bottleSchema.extend({
  solutionName: z.string(),
  batchCode: z.string(),
  useBy: z.string().nullable(),
  isHeld: z.boolean(),
});
export type BottleRow = z.infer<typeof bottleRowSchema>;

/** Everything a label says. */
export const bottleLabelSchema = z.object({
  bottleCode: z.string(),
  batchCode: z.string(),
  solutionName: z.string(),
  solutes: z.array(soluteSchema),
  strengths: actualSchema.shape.strengths,
  volumeMl: z.number(),
  madeAt: z.string().nullable(),
  useBy: z.string().nullable(),
  storageNote: z.string().nullable(),
  classification: classificationSchema,
  /** Whom it belongs to, and how they are reached. */
  house: z.object({ name: z.string(), contact: z.string(), emergency: z.string() }),
  /** What the printed square opens. */
  address: z.string(),
});
export type BottleLabel = z.infer<typeof bottleLabelSchema>;

export const bottleListQuerySchema = listQuery(['code', 'state', 'volumeMl'], '-code', {
  state: z.enum(BOTTLE_STATES).optional(),
  requestId: idField.optional(),
  batchId: idField.optional(),
});
export type BottleListQuery = z.output<typeof bottleListQuerySchema>;

const reasonField = z.string().trim().min(3, 'Say why, in a few words.').max(500);

export const handOverSchema = z.strictObject({
  requestId: idField,
  bottleIds: z.array(idField).min(1, 'Choose at least one bottle.').max(200),
});
export type HandOver = z.output<typeof handOverSchema>;

export const bottleChangeSchema = z.strictObject({
  state: z.enum(['returned', 'discarded']),
  reason: reasonField,
  version: versionField,
});
export type BottleChange = z.output<typeof bottleChangeSchema>;

export const bottleRevokeSchema = z.strictObject({ reason: reasonField, version: versionField });
export type BottleRevoke = z.output<typeof bottleRevokeSchema>;

export const labelPrintSchema = z.strictObject({
  bottleIds: z.array(idField).min(1, 'Choose at least one bottle.').max(200),
  /** Asked for where a label was printed before. */
  reason: z.string().trim().max(500),
});
export type LabelPrint = z.output<typeof labelPrintSchema>;

export const bottleEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/bottles',
    action: 'stock:read',
    summary: 'Bottles of made solutions',
    query: bottleListQuerySchema,
    response: pageOf(bottleRowSchema),
    columns: [
      { key: 'code', header: 'Bottle' },
      { key: 'solutionName', header: 'Solution' },
      { key: 'volumeMl', header: 'Volume, mL' },
      { key: 'requestCode', header: 'Request' },
      { key: 'useBy', header: 'Use by' },
      { key: 'state', header: 'State' },
    ],
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/bottles/{id}',
    action: 'stock:read',
    summary: 'One bottle',
    params: idParams,
    response: bottleRowSchema,
  }),
  handOver: endpoint({
    method: 'POST',
    path: '/api/bottles/hand-over',
    action: 'batch:write',
    summary: 'Hand bottles over to the session they were made for',
    body: handOverSchema,
    response: z.object({ requestId: z.uuid(), requestState: z.string(), bottles: z.array(bottleSchema) }),
  }),
  change: endpoint({
    method: 'POST',
    path: '/api/bottles/{id}/state',
    action: 'batch:write',
    summary: 'Take a bottle back, or discard it',
    params: idParams,
    body: bottleChangeSchema,
    response: bottleSchema,
  }),
  revoke: endpoint({
    method: 'POST',
    path: '/api/bottles/{id}/revoke',
    action: 'batch:write',
    summary: 'Make the address on a label say nothing from now on',
    params: idParams,
    body: bottleRevokeSchema,
    response: bottleSchema,
  }),
  print: endpoint({
    method: 'POST',
    path: '/api/bottles/label-prints',
    action: 'batch:write',
    summary: 'Note that labels are printed; a reprint needs a reason',
    body: labelPrintSchema,
    response: z.object({ bottles: z.array(bottleSchema) }),
  }),
};
