import { z } from 'zod';
import { REQUEST_STATES, REVIEW_STATES } from '@/lib/domain/states';
import { endpoint } from './endpoint';
import { idField, idParams, noteField, versionField } from './fields';
import { listQuery, pageOf } from './list';
import { decisionSchema } from './mixes';
import { recordEntrySchema } from './records';

/** A solution for every bench, or a demonstration shown so many times. */
export const requestLineSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('solution'),
    solutionId: idField,
    volumePerBenchMl: z.number().min(0.1, 'At least 0.1 mL.').max(5000, 'At most 5 L per bench.'),
    spareBenches: z.number().int('Whole benches.').min(0).max(20, 'At most 20 to spare.'),
  }),
  z.strictObject({
    kind: z.literal('demonstration'),
    demonstrationId: idField,
    performances: z.number().int('Whole times.').min(1, 'At least once.').max(50, 'At most 50 times.'),
  }),
]);
export type RequestLineInput = z.output<typeof requestLineSchema>;

const linesField = z
  .array(requestLineSchema)
  .min(1, 'Ask for at least one solution or demonstration.')
  .max(40, 'At most 40 lines.');

export const requestCreateSchema = z.strictObject({
  sessionId: idField,
  note: noteField.nullable(),
  lines: linesField,
});
export type RequestCreate = z.output<typeof requestCreateSchema>;
export const requestPatchSchema = z.strictObject({
  note: noteField.nullable(),
  lines: linesField,
  version: versionField,
});
export type RequestPatch = z.output<typeof requestPatchSchema>;
export const planPreviewSchema = z.strictObject({
  sessionId: idField,
  requestId: idField.nullable().default(null),
  lines: linesField,
});
export type PlanPreviewBody = z.output<typeof planPreviewSchema>;
export const requestMoveSchema = z.strictObject({
  version: versionField,
  reason: noteField.default(''),
});
export type RequestMove = z.output<typeof requestMoveSchema>;

export const requestRowSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  state: z.enum(REQUEST_STATES),
  sessionId: z.uuid(),
  session: z.string(),
  startsAt: z.string(),
  requesterId: z.uuid(),
  requesterName: z.string(),
  lineCount: z.number().int(),
  /** What it still waits for, in words. */
  waitsFor: z.string(),
  version: z.number().int(),
});
export type RequestRow = z.infer<typeof requestRowSchema>;

export const requestSchema = requestRowSchema.extend({
  note: z.string().nullable(),
  lines: z.array(requestLineSchema),
  lineNames: z.array(z.string()),
  decision: decisionSchema.nullable(),
  planHash: z.string().nullable(),
  /** The frozen plan; null for a draft. */
  plan: z.record(z.string(), z.unknown()).nullable(),
  review: z
    .object({
      id: z.uuid(),
      state: z.enum(REVIEW_STATES),
      decisionText: z.string().nullable(),
      conditions: z.array(z.string()),
    })
    .nullable(),
  story: z.array(recordEntrySchema),
  mayChange: z.boolean(),
});
export type RequestDetail = z.infer<typeof requestSchema>;

export const requestListQuerySchema = listQuery(['code', 'state', 'createdAt', 'startsAt'], '-createdAt', {
  whose: z.enum(['mine', 'all']).default('all'),
  state: z.enum(REQUEST_STATES).optional(),
});
export type RequestListQuery = z.output<typeof requestListQuerySchema>;

export const requestEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/requests',
    action: 'request:read',
    summary: 'Requests',
    query: requestListQuerySchema,
    response: pageOf(requestRowSchema),
    columns: [
      { key: 'code', header: 'Request' },
      { key: 'session', header: 'Session' },
      { key: 'startsAt', header: 'Starts' },
      { key: 'requesterName', header: 'Asked by' },
      { key: 'state', header: 'State' },
      { key: 'waitsFor', header: 'Waits for' },
    ],
  }),
  create: endpoint({
    method: 'POST',
    path: '/api/requests',
    action: 'request:create',
    summary: 'Draft a request',
    body: requestCreateSchema,
    response: requestSchema,
    status: 201,
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/requests/{id}',
    action: 'request:read',
    summary: 'One request with its plan',
    params: idParams,
    response: requestSchema,
  }),
  update: endpoint({
    method: 'PATCH',
    path: '/api/requests/{id}',
    action: 'request:update',
    summary: 'Change a request; a plan that was judged is computed again',
    params: idParams,
    body: requestPatchSchema,
    response: requestSchema,
  }),
  submit: endpoint({
    method: 'POST',
    path: '/api/requests/{id}/submit',
    action: 'request:update',
    summary: 'Submit: agreed at once, or sent to safety',
    params: idParams,
    body: requestMoveSchema,
    response: requestSchema,
  }),
  withdraw: endpoint({
    method: 'POST',
    path: '/api/requests/{id}/withdraw',
    action: 'request:update',
    summary: 'Withdraw',
    params: idParams,
    body: requestMoveSchema,
    response: requestSchema,
  }),
  previewPlan: endpoint({
    method: 'POST',
    path: '/api/requests/plan-preview',
    action: 'request:create',
    summary: 'The plan of a request that is not saved yet',
    body: planPreviewSchema,
    response: z.record(z.string(), z.unknown()),
    cost: 'heavy',
  }),
};
