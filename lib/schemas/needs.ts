import { z } from 'zod';
import { BATCH_STATES, REQUEST_STATES } from '@/lib/domain/states';
import { endpoint } from './endpoint';
import { dayField, idField } from './fields';
import { listQuery, pageOf } from './list';

/** A batch that covers part of a need. */
const coveringBatchSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  state: z.enum(BATCH_STATES),
  volumeMl: z.number(),
});

/** One solution that one agreed request needs, and what of it is still to be made. */
export const needSchema = z.object({
  /** Request and solution, joined by a colon. */
  id: z.string(),
  requestId: z.uuid(),
  requestCode: z.string(),
  requestState: z.enum(REQUEST_STATES),
  session: z.string(),
  startsAt: z.string(),
  solutionId: z.uuid(),
  solutionName: z.string(),
  neededMl: z.number(),
  /** In batches that are planned or made for it. */
  coveredMl: z.number(),
  openMl: z.number(),
  /** First and last day on which it may be made; the last may lie behind us. */
  notBefore: z.string(),
  makeBy: z.string(),
  readyBy: z.string(),
  isLate: z.boolean(),
  batches: z.array(coveringBatchSchema),
});
export type Need = z.infer<typeof needSchema>;

export const needListQuerySchema = listQuery(['makeBy', 'solutionName', 'requestCode', 'openMl'], 'makeBy', {
  solutionId: idField.optional(),
  requestId: idField.optional(),
  /** Only what is needed by this day. */
  until: dayField.optional(),
  show: z.enum(['open', 'all']).default('open'),
});
export type NeedListQuery = z.output<typeof needListQuerySchema>;

export const needEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/needs',
    action: 'stock:read',
    summary: 'Solutions that agreed requests need, with their make-windows and what covers them',
    query: needListQuerySchema,
    response: pageOf(needSchema),
    columns: [
      { key: 'solutionName', header: 'Solution' },
      { key: 'requestCode', header: 'Request' },
      { key: 'session', header: 'Session' },
      { key: 'startsAt', header: 'Starts' },
      { key: 'neededMl', header: 'Needed, mL' },
      { key: 'coveredMl', header: 'Covered, mL' },
      { key: 'openMl', header: 'To be made, mL' },
      { key: 'notBefore', header: 'Not before' },
      { key: 'makeBy', header: 'Make by' },
    ],
  }),
};
