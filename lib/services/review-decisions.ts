import 'server-only';
import { addMonths } from 'date-fns';
import { environment } from '@/lib/config/env';
import { DomainError } from '@/lib/domain/errors';
import { authorise } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type { RequestState } from '@/lib/domain/states';
import type { ReviewCase, ReviewDecision } from '@/lib/schemas/reviews';
import { write } from '@/models/db';
import { ReviewMessageModel } from '@/models/review-message';
import { UserModel } from '@/models/user';
import { confirmPassword } from './accounts';
import { changeState, refuseStale } from './moves';
import { enqueueLetter } from './outbox';
import { record } from './record';
import { recomputeNeighboursOf } from './request-changes';
import { getReview, loadReview, whyNotAgree } from './review-cases';

/** An agreement is good for a year; after that the pattern is looked at afresh. */
const AGREEMENT_MONTHS = 12;

const REQUEST_AFTER: Readonly<Record<ReviewDecision['verdict'], RequestState>> = {
  agreed: 'agreed',
  'agreed-with-conditions': 'agreed',
  returned: 'returned',
  refused: 'withdrawn',
};

/**
 * An officer's signed judgement. It holds for the plan it was given on, named by its hash.
 * @throws DomainError `invalid` for a wrong password, `forbidden` for one's own request or a stop,
 *   `conflict` where the case changed meanwhile, `wrong-state` where it is already judged
 */
export async function decideReview(
  viewer: Viewer,
  id: string,
  decision: ReviewDecision,
): Promise<ReviewCase> {
  const { request: before } = await loadReview(id);
  authorise(
    viewer,
    'review:decide',
    { ownerId: before.requesterId },
    'It is your own request; another safety officer must judge it.',
  );
  await confirmPassword(viewer, decision.password);
  await write(async () => {
    const { review, request, plan } = await loadReview(id);
    await refuseStale(review, decision.version, () => getReview(viewer, id));
    const isAgreement = decision.verdict === 'agreed' || decision.verdict === 'agreed-with-conditions';
    const obstacle = whyNotAgree(viewer, review, plan, request);
    if (isAgreement && obstacle)
      throw new DomainError(plan.decision === 'stop' ? 'forbidden' : 'wrong-state', obstacle);
    if (isAgreement && request.planHash !== review.planHash) {
      throw new DomainError('conflict', 'The plan changed after this review was opened.');
    }

    const now = new Date();
    review.reviewerId = viewer.id;
    review.decidedAt = now;
    review.decisionText = decision.text;
    review.conditions = decision.verdict === 'agreed-with-conditions' ? decision.conditions : [];
    review.lapsesAt = isAgreement ? addMonths(now, AGREEMENT_MONTHS) : null;
    await changeState(viewer, 'review', review, decision.verdict, {
      label: request.code,
      reason: decision.text || null,
      detail: { planHash: review.planHash, conditions: review.conditions },
    });
    await changeState(viewer, 'request', request, REQUEST_AFTER[decision.verdict], {
      label: request.code,
      reason: decision.text || `Safety: ${decision.verdict}`,
    });
    if (decision.verdict === 'returned') {
      await ReviewMessageModel.create({ reviewId: review.id, authorId: viewer.id, body: decision.text });
    }
    if (!isAgreement) {
      await recomputeNeighboursOf(viewer, request, `${request.code} beside it was ${decision.verdict}`);
    }
    await tellRequester(request.requesterId, request.id, request.code, review.id, decision);
  });
  return getReview(viewer, id);
}

async function tellRequester(
  requesterId: string,
  requestId: string,
  code: string,
  reviewId: string,
  decision: ReviewDecision,
): Promise<void> {
  const requester = await UserModel.findByPk(requesterId, { rejectOnEmpty: true });
  const outcome = {
    agreed: 'was agreed',
    'agreed-with-conditions': 'was agreed with conditions',
    returned: 'came back with a question',
    refused: 'was refused',
  }[decision.verdict];
  const conditions =
    decision.verdict === 'agreed-with-conditions' ? decision.conditions.map((line) => `- ${line}`) : [];
  await enqueueLetter(
    `review:${reviewId}:${decision.verdict}`,
    {
      to: requester.email,
      subject: `Request ${code} ${outcome}`,
      text: [
        `${requester.name},`,
        '',
        `your request ${code} ${outcome} by the safety officer.`,
        decision.text,
        ...conditions,
        '',
        `${environment().BASE_URL}/requests/${requestId}`,
      ].join('\n'),
    },
    { type: 'review', id: reviewId },
  );
}

/** Adds a line to the conversation about a case. */
export async function sayInReview(viewer: Viewer, id: string, body: string): Promise<ReviewCase> {
  await write(async () => {
    const { review, request } = await loadReview(id);
    authorise(viewer, 'review:answer', { ownerId: request.requesterId });
    await ReviewMessageModel.create({ reviewId: review.id, authorId: viewer.id, body });
    await record(viewer, {
      subjectType: 'review',
      subjectId: review.id,
      subjectLabel: request.code,
      action: 'message',
    });
  });
  return getReview(viewer, id);
}
