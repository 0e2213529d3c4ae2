import { z } from 'zod';
import { endpoint } from './endpoint';
import { dayField } from './fields';
import { listQuery, pageOf } from './list';

export const recordEntrySchema = z.object({
  id: z.number().int(),
  at: z.string(),
  actorName: z.string(),
  subjectType: z.string(),
  subjectId: z.string(),
  subjectLabel: z.string(),
  action: z.string(),
  fromState: z.string().nullable(),
  toState: z.string().nullable(),
  reason: z.string().nullable(),
  hash: z.string(),
});
export type RecordEntry = z.infer<typeof recordEntrySchema>;

export const recordListQuerySchema = listQuery(['at'], '-at', {
  subjectType: z.string().max(40).optional(),
  subjectId: z.string().max(80).optional(),
  from: dayField.optional(),
  to: dayField.optional(),
});
export type RecordListQuery = z.output<typeof recordListQuerySchema>;

export const recordEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/records',
    action: 'record:read',
    summary: 'The append-only record of changes',
    query: recordListQuerySchema,
    response: pageOf(recordEntrySchema),
    columns: [
      { key: 'id', header: 'Line' },
      { key: 'at', header: 'When' },
      { key: 'actorName', header: 'Who' },
      { key: 'subjectType', header: 'Kind' },
      { key: 'subjectLabel', header: 'What' },
      { key: 'action', header: 'Done' },
      { key: 'reason', header: 'Reason' },
      { key: 'hash', header: 'Hash' },
    ],
  }),
  check: endpoint({
    method: 'GET',
    path: '/api/records/check',
    action: 'record:read',
    summary: 'Whether every line still fits the chain',
    response: z.object({ lines: z.number().int(), firstBrokenLine: z.number().int().nullable() }),
    cost: 'heavy',
  }),
};
