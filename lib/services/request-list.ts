import 'server-only';
import { Op, literal } from 'sequelize';
import type { Order, WhereOptions } from 'sequelize';
import type { Viewer } from '@/lib/domain/roles';
import type { RequestState } from '@/lib/domain/states';
import type { Page } from '@/lib/schemas/list';
import type { RequestListQuery, RequestRow } from '@/lib/schemas/requests';
import { RequestModel } from '@/models/request';
import { SessionModel } from '@/models/session';
import { UserModel } from '@/models/user';
import { contains, orderOf } from './lists';
import { linesOf } from './request-lines';

const WAITS_FOR: Readonly<Record<RequestState, string>> = {
  draft: 'you to submit it',
  asked: 'the check',
  'in-review': 'the safety officer',
  agreed: 'the prep room',
  'in-work': 'the batches',
  ready: 'the session',
  'handed-over': 'leftovers to come back',
  closed: 'nothing',
  returned: 'your answer',
  withdrawn: 'nothing',
};

/** Start of the session of a request, for sorting. */
const STARTS_AT = '(SELECT sessions.startsAt FROM sessions WHERE sessions.id = Request.sessionId)';

/** Rows of a list, each with its session, who asked and what it waits for. */
export async function presentRows(requests: readonly RequestModel[]): Promise<RequestRow[]> {
  const [sessions, people, lines] = await Promise.all([
    SessionModel.findAll({ where: { id: requests.map(({ sessionId }) => sessionId) } }),
    UserModel.findAll({
      where: { id: requests.map(({ requesterId }) => requesterId) },
      attributes: ['id', 'name'],
    }),
    linesOf(requests.map(({ id }) => id)),
  ]);
  const sessionById = new Map(sessions.map((session) => [session.id, session]));
  const names = new Map(people.map(({ id, name }) => [id, name]));
  return requests.map((request) => {
    const session = sessionById.get(request.sessionId);
    return {
      id: request.id,
      code: request.code,
      state: request.state,
      sessionId: request.sessionId,
      session: session ? `${session.course} ${session.title}` : '',
      startsAt: session?.startsAt.toISOString() ?? '',
      requesterId: request.requesterId,
      requesterName: names.get(request.requesterId) ?? '',
      lineCount: lines.get(request.id)?.length ?? 0,
      waitsFor: WAITS_FOR[request.state],
      version: request.version,
    };
  });
}

/** Requests whose code holds the text, and those of sessions or people that are called so. */
async function foundBy(text: string): Promise<WhereOptions> {
  const [sessions, people] = await Promise.all([
    SessionModel.findAll({
      where: { [Op.or]: [contains('course', text), contains('title', text)] },
      attributes: ['id'],
    }),
    UserModel.findAll({ where: contains('name', text), attributes: ['id'] }),
  ]);
  return {
    [Op.or]: [
      contains('code', text),
      { sessionId: sessions.map(({ id }) => id) },
      { requesterId: people.map(({ id }) => id) },
    ],
  };
}

export async function listRequests(viewer: Viewer, query: RequestListQuery): Promise<Page<RequestRow>> {
  const where: WhereOptions = {
    ...(query.whose === 'mine' ? { requesterId: viewer.id } : {}),
    ...(query.state ? { state: query.state } : {}),
    ...(query.search ? await foundBy(query.search) : {}),
  };
  const order: Order = query.sort.endsWith('startsAt')
    ? [
        [literal(STARTS_AT), query.sort.startsWith('-') ? 'DESC' : 'ASC'],
        ['id', 'ASC'],
      ]
    : orderOf(query.sort);
  const { rows, count } = await RequestModel.findAndCountAll({
    where,
    order,
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await presentRows(rows), total: count, page: query.page, pageSize: query.pageSize };
}
