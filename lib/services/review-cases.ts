import 'server-only';
import { Op } from 'sequelize';
import { DomainError } from '@/lib/domain/errors';
import { may } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type { Page } from '@/lib/schemas/list';
import type { ReviewCase, ReviewListQuery, ReviewRow } from '@/lib/schemas/reviews';
import { FindingModel } from '@/models/finding';
import { PlanModel } from '@/models/plan';
import { RequestModel } from '@/models/request';
import { ReviewModel } from '@/models/review';
import { ReviewMessageModel } from '@/models/review-message';
import { SessionModel } from '@/models/session';
import { UserModel } from '@/models/user';
import { orderOf } from './lists';
import { storyOf } from './records';

const EARLIER_CASES = 10;

/** Rows keyed by id, read in one go. */
async function byId<M extends { id: string }>(
  find: (ids: string[]) => Promise<M[]>,
  ids: readonly (string | null)[],
): Promise<Map<string, M>> {
  const wanted = [...new Set(ids.filter((id): id is string => id !== null))];
  return new Map((await find(wanted)).map((row) => [row.id, row]));
}

/** Queue lines for reviews, with what they are about. */
async function presentRows(reviews: readonly ReviewModel[]): Promise<ReviewRow[]> {
  const requests = await byId(
    (id) => RequestModel.findAll({ where: { id } }),
    reviews.map(({ requestId }) => requestId),
  );
  const sessions = await byId(
    (id) => SessionModel.findAll({ where: { id } }),
    [...requests.values()].map(({ sessionId }) => sessionId),
  );
  const people = await byId(
    (id) => UserModel.findAll({ where: { id } }),
    [
      ...reviews.map(({ reviewerId }) => reviewerId),
      ...[...requests.values()].map(({ requesterId }) => requesterId),
    ],
  );
  const plans = await byId(
    (id) => PlanModel.findAll({ where: { id }, attributes: ['id', 'decision'] }),
    reviews.map(({ planId }) => planId),
  );
  const gravest = await FindingModel.findAll({
    where: { planId: reviews.map(({ planId }) => planId), position: 0 },
  });
  const headlines = new Map(gravest.map(({ planId, title }) => [planId, title]));

  return reviews.map((review) => {
    const request = requests.get(review.requestId);
    const session = request && sessions.get(request.sessionId);
    const plan = plans.get(review.planId);
    if (!request || !session || !plan)
      throw new Error(`Review ${review.id} lost its request, session or plan`);
    return {
      id: review.id,
      state: review.state,
      decision: plan.decision,
      gravity: review.gravity,
      requestId: request.id,
      requestCode: request.code,
      requesterName: people.get(request.requesterId)?.name ?? '',
      session: `${session.course} ${session.title}`,
      startsAt: session.startsAt.toISOString(),
      headline: headlines.get(review.planId) ?? 'Nothing found',
      openedAt: review.createdAt.toISOString(),
      reviewerName: review.reviewerId ? (people.get(review.reviewerId)?.name ?? null) : null,
      decidedAt: review.decidedAt?.toISOString() ?? null,
    };
  });
}

/** The officers' queue: the gravest first, the oldest of those first. */
export async function listReviews(_viewer: Viewer, query: ReviewListQuery): Promise<Page<ReviewRow>> {
  const requestIds = query.search
    ? (
        await RequestModel.findAll({
          where: { code: { [Op.like]: `%${query.search.replaceAll(/[\\%]/g, '_')}%` } },
          attributes: ['id'],
        })
      ).map(({ id }) => id)
    : undefined;
  const where = {
    ...(query.state ? { state: query.state } : {}),
    ...(requestIds ? { requestId: requestIds } : {}),
  };
  const columns = { openedAt: 'createdAt' };
  const order =
    query.sort === 'gravity'
      ? [['gravity', 'ASC'] as [string, string], ['createdAt', 'ASC'] as [string, string]]
      : orderOf(query.sort, columns);
  const { rows, count } = await ReviewModel.findAndCountAll({
    where,
    order,
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await presentRows(rows), total: count, page: query.page, pageSize: query.pageSize };
}

/** Why this person can't agree this case, in words; null where they can. */
export function whyNotAgree(
  viewer: Viewer,
  review: ReviewModel,
  plan: PlanModel,
  request: RequestModel,
): string | null {
  if (review.state !== 'waiting') return 'It is already judged or has lapsed.';
  if (plan.decision === 'stop')
    return 'A finding says stop. Nobody can agree that here; the request has to change.';
  if (!viewer.roles.includes('safety')) return 'Only a safety officer can agree.';
  if (request.requesterId === viewer.id)
    return 'It is your own request; another safety officer must judge it.';
  return null;
}

/** @throws DomainError `not-found` */
export async function loadReview(
  id: string,
): Promise<{ review: ReviewModel; request: RequestModel; plan: PlanModel }> {
  const review = await ReviewModel.findByPk(id);
  if (!review) throw new DomainError('not-found', 'There is no such review.');
  const [request, plan] = await Promise.all([
    RequestModel.findByPk(review.requestId, { rejectOnEmpty: true }),
    PlanModel.findByPk(review.planId, { rejectOnEmpty: true }),
  ]);
  return { review, request, plan };
}

/** Earlier judgements of the same pattern: plans in which the same gravest rule fired. */
async function earlierCases(review: ReviewModel): Promise<ReviewRow[]> {
  const gravest = await FindingModel.findOne({ where: { planId: review.planId, position: 0 } });
  if (!gravest) return [];
  const alike = await FindingModel.findAll({
    where: { rule: gravest.rule, position: 0, planId: { [Op.ne]: review.planId } },
    attributes: ['planId'],
  });
  const reviews = await ReviewModel.findAll({
    where: { planId: alike.map(({ planId }) => planId), decidedAt: { [Op.ne]: null } },
    order: [['decidedAt', 'DESC']],
    limit: EARLIER_CASES,
  });
  return presentRows(reviews);
}

/** One case with its evidence, and what was said about the request so far. */
export async function getReview(viewer: Viewer, id: string): Promise<ReviewCase> {
  const { review, request, plan } = await loadReview(id);
  const [row] = await presentRows([review]);
  if (!row) throw new Error(`Review ${id} can't be presented`);
  const sameRequest = await ReviewModel.findAll({ where: { requestId: request.id }, attributes: ['id'] });
  const messages = await ReviewMessageModel.findAll({
    where: { reviewId: sameRequest.map((row) => row.id) },
    order: [['createdAt', 'ASC']],
  });
  const authors = await byId(
    (ids) => UserModel.findAll({ where: { id: ids } }),
    messages.map(({ authorId }) => authorId),
  );
  return {
    ...row,
    version: review.version,
    planHash: review.planHash,
    plan: plan.content,
    decisionText: review.decisionText,
    conditions: review.conditions,
    lapsesAt: review.lapsesAt?.toISOString() ?? null,
    messages: messages.map((message) => ({
      id: message.id,
      authorName: authors.get(message.authorId)?.name ?? '',
      body: message.body,
      at: message.createdAt.toISOString(),
    })),
    earlier: await earlierCases(review),
    story: await storyOf('review', id),
    mayDecide: review.state === 'waiting' && may(viewer, 'review:decide', { ownerId: request.requesterId }),
    whyNotAgree: whyNotAgree(viewer, review, plan, request),
  };
}
