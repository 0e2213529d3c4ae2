import { z } from 'zod';
import { OUTBOX_CHANNELS, OUTBOX_STATES } from '@/lib/domain/states';
import { endpoint } from './endpoint';
import { idParams } from './fields';
import { listQuery, pageOf } from './list';

export const outboxItemSchema = z.object({
  id: z.uuid(),
  channel: z.enum(OUTBOX_CHANNELS),
  state: z.enum(OUTBOX_STATES),
  attempts: z.number().int(),
  lastError: z.string().nullable(),
  subjectType: z.string().nullable(),
  subjectId: z.string().nullable(),
  summary: z.string(),
  nextAttemptAt: z.string(),
  sentAt: z.string().nullable(),
});
export type OutboxItem = z.infer<typeof outboxItemSchema>;

export const outboxListQuerySchema = listQuery(
  ['nextAttemptAt', 'channel', 'state', 'attempts'],
  '-nextAttemptAt',
  {
    state: z.enum(OUTBOX_STATES).optional(),
  },
);
export type OutboxListQuery = z.output<typeof outboxListQuerySchema>;

export const outboxEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/outbox',
    action: 'outbox:read',
    summary: 'What waits to be sent, was sent, or was given up',
    query: outboxListQuerySchema,
    response: pageOf(outboxItemSchema),
    columns: [
      { key: 'channel', header: 'Channel' },
      { key: 'state', header: 'State' },
      { key: 'summary', header: 'What' },
      { key: 'attempts', header: 'Attempts' },
      { key: 'lastError', header: 'Last failure' },
    ],
  }),
  resend: endpoint({
    method: 'POST',
    path: '/api/outbox/{id}/resend',
    action: 'outbox:resend',
    summary: 'Try again now',
    params: idParams,
    response: outboxItemSchema,
  }),
};
