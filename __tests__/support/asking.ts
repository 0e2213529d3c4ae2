import type { Demonstration } from '@/lib/schemas/demonstrations';
import type { LabSession, RoomRow } from '@/lib/schemas/lab-sessions';
import type { Page } from '@/lib/schemas/list';
import type { RequestDetail, RequestLineInput } from '@/lib/schemas/requests';
import type { Solution } from '@/lib/schemas/solutions';
import { bodyOf } from './api';
import type { Caller } from './api';

/** The recipe of this name among those of the demo college. */
export async function recipe(caller: Caller, name: string): Promise<Solution> {
  const page = bodyOf<Page<Solution>>(
    await caller.get(`/api/solutions?search=${encodeURIComponent(name)}&pageSize=50`),
  );
  const found = page.items.find((solution) => solution.name === name);
  if (!found) throw new Error(`No recipe is called ${name}`);
  return found;
}

export async function demonstration(caller: Caller, name: string): Promise<Demonstration> {
  const page = bodyOf<Page<Demonstration>>(
    await caller.get(`/api/demonstrations?search=${encodeURIComponent(name)}&pageSize=50`),
  );
  const found = page.items.find((candidate) => candidate.name === name);
  if (!found) throw new Error(`No demonstration is called ${name}`);
  return found;
}

let sessions = 0;

/**
 * A session of the caller's own, alone in its room: every one is on another day of `year`, which no other test
 * file may use, so that nothing that others ask for stands beside it.
 */
export async function buildSession(caller: Caller, year: number, benches = 10): Promise<LabSession> {
  sessions += 1;
  const { items } = bodyOf<{ items: RoomRow[] }>(await caller.get('/api/rooms'));
  const room = items.find(({ name }) => name === 'Laboratory 1');
  if (!room) throw new Error('The demo has no Laboratory 1');
  const startsAt = new Date(Date.UTC(year, 0, sessions, 9));
  const endsAt = new Date(Date.UTC(year, 0, sessions, 11));
  const session = {
    course: 'CH 900',
    title: `Test session ${sessions}`,
    startsAt: startsAt.toISOString(),
    endsAt: endsAt.toISOString(),
    roomId: room.id,
    benches,
  };
  return bodyOf<LabSession>(await caller.post('/api/lab-sessions', session), 201);
}

export async function buildDraft(
  caller: Caller,
  year: number,
  lines: readonly RequestLineInput[],
): Promise<RequestDetail> {
  const session = await buildSession(caller, year);
  return bodyOf<RequestDetail>(
    await caller.post('/api/requests', { sessionId: session.id, note: null, lines }),
    201,
  );
}

export async function submit(
  caller: Caller,
  draft: Pick<RequestDetail, 'id' | 'version'>,
): Promise<RequestDetail> {
  return bodyOf<RequestDetail>(
    await caller.post(`/api/requests/${draft.id}/submit`, { version: draft.version }),
  );
}
