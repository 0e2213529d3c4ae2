import 'server-only';
import { addDays, formatISO } from 'date-fns';
import { Op } from 'sequelize';
import { mayByRole } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import { stateWords } from '@/lib/domain/states';
import { BatchModel } from '@/models/batch';
import { LotModel } from '@/models/lot';
import { OrderModel } from '@/models/order';
import { OutboxMessageModel } from '@/models/outbox-message';
import { RequestModel } from '@/models/request';
import { ReviewModel } from '@/models/review';
import { SessionModel } from '@/models/session';
import { ShortageModel } from '@/models/shortage';
import { SolutionModel } from '@/models/solution';
import { SubstanceModel } from '@/models/substance';

/** One thing to do or to know, at its hour, with the one place to go. */
export interface DayLine {
  readonly at: string | null;
  readonly kind: string;
  readonly text: string;
  readonly state: string | null;
  readonly href: string;
}
export interface Day {
  readonly day: string;
  readonly lines: readonly DayLine[];
  /** What is short, expiring, overdue or waits for somebody else. */
  readonly margin: readonly DayLine[];
}

const EXPIRY_DAYS = 30;
const MARGIN_LINES = 12;

const OPEN_REQUEST = ['draft', 'asked', 'in-review', 'agreed', 'in-work', 'ready', 'returned'];

/**
 * What a person has before them on a day.
 * @param day - ISO day in the server's time zone
 */
export async function getDay(viewer: Viewer, day: string): Promise<Day> {
  const start = new Date(`${day}T00:00:00`);
  const end = addDays(start, 1);
  const parts = await Promise.all([
    sessionLines(viewer, start, end),
    mayByRole(viewer, 'batch:write') ? batchLines(day) : [],
    viewer.roles.includes('safety') ? reviewLines() : [],
    viewer.roles.includes('purchasing') ? orderLines() : [],
    viewer.roles.includes('admin') ? outgoingLines() : [],
  ]);
  const margins = await Promise.all([
    viewer.roles.includes('instructor') ? returnedLines(viewer) : [],
    mayByRole(viewer, 'order:read') ? shortageLines() : [],
    mayByRole(viewer, 'stock:write') ? expiryLines(day) : [],
  ]);
  const lines = parts.flat().sort((a, b) => (a.at ?? '').localeCompare(b.at ?? ''));
  return { day, lines, margin: margins.flat().slice(0, MARGIN_LINES) };
}

async function sessionLines(viewer: Viewer, start: Date, end: Date): Promise<DayLine[]> {
  const isStaff = viewer.roles.some((role) => role === 'prep' || role === 'safety');
  if (!isStaff && !viewer.roles.includes('instructor')) return [];
  const sessions = await SessionModel.findAll({
    where: {
      startsAt: { [Op.gte]: start, [Op.lt]: end },
      cancelledAt: null,
      ...(isStaff ? {} : { instructorId: viewer.id }),
    },
  });
  const requests = await RequestModel.findAll({
    where: { sessionId: sessions.map(({ id }) => id), state: { [Op.ne]: 'withdrawn' } },
  });
  return sessions.map((session) => {
    const own = requests.filter(({ sessionId }) => sessionId === session.id);
    const [first] = own;
    return {
      at: session.startsAt.toISOString(),
      kind: 'Session',
      text: `${session.course} ${session.title}, ${session.benches} benches${own.length === 0 ? ': nothing asked for yet' : ''}`,
      state: first?.state ?? null,
      href: first ? `/requests/${first.id}` : `/sessions/${session.id}`,
    };
  });
}

async function batchLines(day: string): Promise<DayLine[]> {
  const batches = await BatchModel.findAll({
    where: { makeOn: { [Op.lte]: day }, state: ['planned', 'making', 'checked'] },
    order: [['readyBy', 'ASC']],
    limit: 50,
  });
  const solutions = await SolutionModel.findAll({
    where: { id: batches.map(({ solutionId }) => solutionId) },
  });
  const names = new Map(solutions.map(({ id, name }) => [id, name]));
  return batches.map((batch) => ({
    at: batch.readyBy.toISOString(),
    kind: batch.makeOn < day ? 'Overdue batch' : 'Batch',
    text: `${batch.code}: ${names.get(batch.solutionId) ?? ''}`,
    state: batch.heldAt ? 'held' : batch.state,
    href: `/batches/${batch.id}`,
  }));
}

async function reviewLines(): Promise<DayLine[]> {
  const reviews = await ReviewModel.findAll({
    where: { state: 'waiting' },
    order: [
      ['gravity', 'ASC'],
      ['createdAt', 'ASC'],
    ],
    limit: 20,
  });
  const requests = await RequestModel.findAll({ where: { id: reviews.map(({ requestId }) => requestId) } });
  const codes = new Map(requests.map(({ id, code }) => [id, code]));
  return reviews.map((review) => ({
    at: review.createdAt.toISOString(),
    kind: 'Review',
    text: `${codes.get(review.requestId) ?? ''} waits for a judgement`,
    state: review.gravity === 0 ? 'stop' : 'review',
    href: `/reviews/${review.id}`,
  }));
}

async function orderLines(): Promise<DayLine[]> {
  const orders = await OrderModel.findAll({
    where: { state: ['for-approval', 'approved', 'sent', 'acknowledged', 'part-received'] },
    order: [['updatedAt', 'ASC']],
    limit: 30,
  });
  return orders.map((order) => ({
    at: order.updatedAt.toISOString(),
    kind: 'Order',
    text: `${order.code} is ${stateWords(order.state)}`,
    state: order.state,
    href: `/orders/${order.id}`,
  }));
}

async function outgoingLines(): Promise<DayLine[]> {
  const dead = await OutboxMessageModel.count({ where: { state: 'dead' } });
  if (dead === 0) return [];
  return [
    {
      at: null,
      kind: 'Outgoing',
      text: `${dead} given up; look why and send again`,
      state: 'dead',
      href: '/outgoing?state=dead',
    },
  ];
}

async function returnedLines(viewer: Viewer): Promise<DayLine[]> {
  const requests = await RequestModel.findAll({
    where: { requesterId: viewer.id, state: OPEN_REQUEST },
    order: [['updatedAt', 'DESC']],
    limit: MARGIN_LINES,
  });
  return requests.map(({ id, code, state }) => ({
    at: null,
    kind: 'Your request',
    text:
      state === 'returned'
        ? `${code} came back with a question`
        : state === 'in-review'
          ? `${code} waits for safety`
          : `${code} is ${stateWords(state)}`,
    state,
    href: `/requests/${id}`,
  }));
}

async function shortageLines(): Promise<DayLine[]> {
  const shortages = await ShortageModel.findAll({
    where: { state: 'open' },
    order: [['orderBy', 'ASC']],
    limit: MARGIN_LINES,
  });
  const substances = await SubstanceModel.findAll({
    where: { id: shortages.map(({ substanceId }) => substanceId) },
  });
  const names = new Map(substances.map(({ id, name }) => [id, name]));
  return shortages.map((shortage) => ({
    at: shortage.orderBy,
    kind: 'Short',
    text: `${names.get(shortage.substanceId) ?? shortage.substanceId}: order by`,
    state: null,
    href: '/orders/shortages',
  }));
}

async function expiryLines(day: string): Promise<DayLine[]> {
  const limit = formatISO(addDays(new Date(day), EXPIRY_DAYS), { representation: 'date' });
  const lots = await LotModel.findAll({
    where: { expiresOn: { [Op.lte]: limit }, balanceMicro: { [Op.gt]: 0 } },
    order: [['expiresOn', 'ASC']],
    limit: MARGIN_LINES,
  });
  const substances = await SubstanceModel.findAll({
    where: { id: lots.map(({ substanceId }) => substanceId) },
  });
  const names = new Map(substances.map(({ id, name }) => [id, name]));
  return lots.map((lot) => ({
    at: lot.expiresOn,
    kind: lot.expiresOn !== null && lot.expiresOn < day ? 'Past its date' : 'Expires',
    text: `${names.get(lot.substanceId) ?? ''}, lot ${lot.code}`,
    state: null,
    href: `/shelves/lots/${lot.id}`,
  }));
}
