import 'server-only';
import { addDays } from 'date-fns';
import { Op } from 'sequelize';
import type { WhereOptions } from 'sequelize';
import { DomainError, invalid } from '@/lib/domain/errors';
import { authorise } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type {
  LabSession,
  LabSessionCreate,
  LabSessionListQuery,
  LabSessionPatch,
  RoomRow,
} from '@/lib/schemas/lab-sessions';
import type { Page } from '@/lib/schemas/list';
import { write } from '@/models/db';
import { RequestModel } from '@/models/request';
import { RoomModel } from '@/models/room';
import { SessionModel } from '@/models/session';
import { UserModel } from '@/models/user';
import { contains, orderOf } from './lists';
import { refuseStale } from './moves';
import { record } from './record';
import { followSession } from './request-changes';

/** Rows with their room, instructor and requests. */
async function present(sessions: readonly SessionModel[]): Promise<LabSession[]> {
  const [rooms, people, requests] = await Promise.all([
    RoomModel.findAll({ where: { id: sessions.map(({ roomId }) => roomId) } }),
    UserModel.findAll({
      where: { id: sessions.map(({ instructorId }) => instructorId) },
      attributes: ['id', 'name'],
    }),
    RequestModel.findAll({ where: { sessionId: sessions.map(({ id }) => id) }, order: [['code', 'ASC']] }),
  ]);
  const roomNames = new Map(rooms.map(({ id, name }) => [id, name]));
  const names = new Map(people.map(({ id, name }) => [id, name]));
  return sessions.map((session) => ({
    id: session.id,
    course: session.course,
    title: session.title,
    startsAt: session.startsAt.toISOString(),
    endsAt: session.endsAt.toISOString(),
    roomId: session.roomId,
    roomName: roomNames.get(session.roomId) ?? '',
    benches: session.benches,
    instructorId: session.instructorId,
    instructorName: names.get(session.instructorId) ?? '',
    isCancelled: session.cancelledAt !== null,
    version: session.version,
    requests: requests
      .filter(({ sessionId }) => sessionId === session.id)
      .map(({ id, code, state }) => ({ id, code, state })),
  }));
}

async function presentOne(session: SessionModel): Promise<LabSession> {
  const [row] = await present([session]);
  if (!row) throw new Error('A session can be presented');
  return row;
}

export async function listLabSessions(viewer: Viewer, query: LabSessionListQuery): Promise<Page<LabSession>> {
  const conditions: WhereOptions[] = [];
  if (query.whose === 'mine') conditions.push({ instructorId: viewer.id });
  if (query.from) conditions.push({ startsAt: { [Op.gte]: new Date(`${query.from}T00:00:00`) } });
  if (query.to) conditions.push({ startsAt: { [Op.lt]: addDays(new Date(`${query.to}T00:00:00`), 1) } });
  if (query.search)
    conditions.push({ [Op.or]: [contains('course', query.search), contains('title', query.search)] });
  const { rows, count } = await SessionModel.findAndCountAll({
    where: { [Op.and]: conditions },
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await present(rows), total: count, page: query.page, pageSize: query.pageSize };
}

export async function getLabSession(_viewer: Viewer, id: string): Promise<LabSession> {
  const session = await SessionModel.findByPk(id);
  if (!session) throw new DomainError('not-found', 'There is no such session.');
  return presentOne(session);
}

export async function listRooms(): Promise<RoomRow[]> {
  const rooms = await RoomModel.findAll({ order: [['name', 'ASC']] });
  return rooms.map(({ id, name, volumeM3, airChangesPerHour, fumeCupboards, benches }) => ({
    id,
    name,
    volumeM3,
    airChangesPerHour,
    fumeCupboards,
    benches,
  }));
}

async function requireRoom(roomId: string): Promise<void> {
  if (!(await RoomModel.findByPk(roomId)))
    throw invalid([{ pointer: '#/roomId', detail: 'There is no such room.' }]);
}

export async function createLabSession(viewer: Viewer, input: LabSessionCreate): Promise<LabSession> {
  return write(async () => {
    await requireRoom(input.roomId);
    const session = await SessionModel.create({
      ...input,
      startsAt: new Date(input.startsAt),
      endsAt: new Date(input.endsAt),
      instructorId: viewer.id,
    });
    await record(viewer, {
      subjectType: 'session',
      subjectId: session.id,
      subjectLabel: `${session.course} ${session.title}`,
      action: 'created',
    });
    return presentOne(session);
  });
}

/** What was planned for the session is computed again: another room or hour has other neighbours and other air. */
export async function updateLabSession(
  viewer: Viewer,
  id: string,
  patch: LabSessionPatch,
): Promise<LabSession> {
  return write(async () => {
    const session = await SessionModel.findByPk(id);
    if (!session) throw new DomainError('not-found', 'There is no such session.');
    authorise(
      viewer,
      'lab-session:update',
      { ownerId: session.instructorId },
      'It is the session of another instructor.',
    );
    await refuseStale(session, patch.version, () => presentOne(session));
    await requireRoom(patch.roomId);
    const before = { roomId: session.roomId, startsAt: session.startsAt, endsAt: session.endsAt };
    const { isCancelled, version, startsAt, endsAt, ...rest } = patch;
    await session.update({
      ...rest,
      startsAt: new Date(startsAt),
      endsAt: new Date(endsAt),
      cancelledAt: isCancelled ? (session.cancelledAt ?? new Date()) : null,
      version: version + 1,
    });
    await record(viewer, {
      subjectType: 'session',
      subjectId: session.id,
      subjectLabel: `${session.course} ${session.title}`,
      action: isCancelled ? 'cancelled' : 'changed',
    });
    await followSession(viewer, session, before);
    return presentOne(session);
  });
}
