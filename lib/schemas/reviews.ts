import { z } from 'zod';
import { DECISIONS } from '@/lib/domain/gravity';
import { REVIEW_STATES } from '@/lib/domain/states';
import { endpoint } from './endpoint';
import { idParams, versionField } from './fields';
import { listQuery, pageOf } from './list';
import { recordEntrySchema } from './records';

/** One line of the officers' queue. */
export const reviewRowSchema = z.object({
  id: z.uuid(),
  state: z.enum(REVIEW_STATES),
  decision: z.enum(DECISIONS),
  gravity: z.number().int(),
  requestId: z.uuid(),
  requestCode: z.string(),
  requesterName: z.string(),
  session: z.string(),
  startsAt: z.string(),
  headline: z.string(),
  openedAt: z.string(),
  reviewerName: z.string().nullable(),
  decidedAt: z.string().nullable(),
});
export type ReviewRow = z.infer<typeof reviewRowSchema>;

const messageSchema = z.object({ id: z.uuid(), authorName: z.string(), body: z.string(), at: z.string() });

/** The case: everything an officer judges by. `plan` is the frozen answer as it was computed. */
export const reviewSchema = reviewRowSchema.extend({
  version: z.number().int(),
  planHash: z.string(),
  plan: z.record(z.string(), z.unknown()),
  decisionText: z.string().nullable(),
  conditions: z.array(z.string()),
  lapsesAt: z.string().nullable(),
  messages: z.array(messageSchema),
  earlier: z.array(reviewRowSchema),
  story: z.array(recordEntrySchema),
  mayDecide: z.boolean(),
  /** Why nobody, or not this person, can agree; null where they can. */
  whyNotAgree: z.string().nullable(),
});
export type ReviewCase = z.infer<typeof reviewSchema>;

export const reviewListQuerySchema = listQuery(['gravity', 'openedAt', 'state'], 'gravity', {
  state: z.enum(REVIEW_STATES).optional(),
});
export type ReviewListQuery = z.output<typeof reviewListQuerySchema>;

const reasonField = z.string().trim().min(3, 'Say why, in a few words.').max(2000);
const signature = { version: versionField, password: z.string().min(1, 'Sign with your password.').max(200) };

/** The four things an officer can do; each is signed. */
export const decisionSchema = z.discriminatedUnion('verdict', [
  z.strictObject({ verdict: z.literal('agreed'), text: z.string().trim().max(2000), ...signature }),
  z.strictObject({
    verdict: z.literal('agreed-with-conditions'),
    text: z.string().trim().max(2000),
    conditions: z.array(z.string().trim().min(3).max(300)).min(1, 'Add at least one condition.').max(20),
    ...signature,
  }),
  z.strictObject({ verdict: z.literal('returned'), text: reasonField, ...signature }),
  z.strictObject({ verdict: z.literal('refused'), text: reasonField, ...signature }),
]);
export type ReviewDecision = z.output<typeof decisionSchema>;

export const reviewMessageSchema = z.strictObject({
  body: z.string().trim().min(1, 'Write something.').max(4000),
});

export const reviewEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/reviews',
    action: 'review:list',
    summary: 'Plans before the safety officers, gravest and oldest first',
    query: reviewListQuerySchema,
    response: pageOf(reviewRowSchema),
    columns: [
      { key: 'requestCode', header: 'Request' },
      { key: 'requesterName', header: 'Asked by' },
      { key: 'session', header: 'Session' },
      { key: 'startsAt', header: 'Starts' },
      { key: 'decision', header: 'Found' },
      { key: 'headline', header: 'Gravest finding' },
      { key: 'state', header: 'State' },
      { key: 'reviewerName', header: 'Judged by' },
      { key: 'decidedAt', header: 'Judged' },
    ],
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/reviews/{id}',
    action: 'review:read',
    summary: 'One case with its evidence',
    params: idParams,
    response: reviewSchema,
  }),
  decide: endpoint({
    method: 'POST',
    path: '/api/reviews/{id}/decision',
    action: 'review:decide',
    summary: 'Agree, set conditions, return with a question, or refuse; signed with the password',
    params: idParams,
    body: decisionSchema,
    response: reviewSchema,
    cost: 'guess',
    ownTransaction: true,
  }),
  say: endpoint({
    method: 'POST',
    path: '/api/reviews/{id}/messages',
    action: 'review:answer',
    summary: 'Answer a question',
    params: idParams,
    body: reviewMessageSchema,
    response: reviewSchema,
    status: 201,
  }),
};
