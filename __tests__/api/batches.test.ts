import { addDays, formatISO } from 'date-fns';
import type { Batch } from '@/lib/schemas/batches';
import type { Need } from '@/lib/schemas/needs';
import { ABSENT_ID, signedIn, stranger } from '../support/signed-in';
import type { Agent } from '../support/signed-in';

let prep: Agent;
let instructor: Agent;
let safety: Agent;

beforeAll(async () => {
  [prep, instructor, safety] = await Promise.all([
    signedIn('prep'),
    signedIn('instructor'),
    signedIn('safety'),
  ]);
});

const today = () => formatISO(new Date(), { representation: 'date' });
let sessions = 0;

/** Asks for a solution that is agreed at once, in a session of its own; gives what it needs of it. */
async function agreedNeed(recipe = 'Sodium chloride 0.1 mol/L', volumePerBenchMl = 25): Promise<Need> {
  sessions += 1;
  const { body: rooms } = await instructor.get('/api/rooms');
  const startsAt = addDays(new Date(), 6);
  startsAt.setMinutes(sessions, 0, 0);
  const session = await instructor.post('/api/lab-sessions').send({
    course: 'CH 999',
    title: `Test ${sessions}`,
    startsAt: startsAt.toISOString(),
    endsAt: new Date(startsAt.getTime() + 7_200_000).toISOString(),
    roomId: rooms.items.find(({ fumeCupboards }: { fumeCupboards: number }) => fumeCupboards > 0).id,
    benches: 4,
  });
  expect(session.status).toBe(201);
  const { body: recipes } = await instructor.get('/api/solutions').query({ search: recipe });
  const line = { kind: 'solution', solutionId: recipes.items[0].id, volumePerBenchMl, spareBenches: 0 };
  const draft = await instructor
    .post('/api/requests')
    .send({ sessionId: session.body.id, note: null, lines: [line] });
  expect(draft.status).toBe(201);
  const asked = await instructor
    .post(`/api/requests/${draft.body.id}/submit`)
    .send({ version: draft.body.version });
  expect(asked.body.state).toBe('agreed');
  const { body: needs } = await prep.get('/api/needs').query({ requestId: draft.body.id });
  expect(needs.items).toHaveLength(1);
  return needs.items[0];
}

async function plannedBatch(recipe?: string): Promise<Batch> {
  const need = await agreedNeed(recipe);
  const answer = await prep
    .post('/api/batches')
    .send({ solutionId: need.solutionId, requestIds: [need.requestId], makeOn: today() });
  expect(answer.status).toBe(201);
  return answer.body;
}

async function making(batch: Batch): Promise<Batch> {
  return (await prep.post(`/api/batches/${batch.id}/start`).send({ version: batch.version })).body;
}

async function checkedBatch(): Promise<Batch> {
  const batch = await making(await plannedBatch());
  for (const take of batch.takes) {
    await prep
      .put(`/api/batches/${batch.id}/takes/${take.id}`)
      .send({ amount: take.target, explanation: '', version: take.version });
  }
  for (const step of batch.steps)
    await prep.put(`/api/batches/${batch.id}/steps/${step.id}`).send({ isDone: true });
  const answer = await prep.post(`/api/batches/${batch.id}/check`).send({ note: '', version: batch.version });
  expect(answer.status).toBe(200);
  return answer.body;
}

describe('needs', () => {
  it('are for staff who are signed in', async () => {
    expect((await stranger().get('/api/needs')).status).toBe(401);
    expect((await instructor.get('/api/needs')).status).toBe(403);
    expect((await safety.get('/api/needs')).status).toBe(200);
    expect((await prep.get('/api/needs').query({ show: 'everything' })).status).toBe(422);
  });
});

describe('planning a batch', () => {
  it('is for prep staff who are signed in', async () => {
    const body = { solutionId: ABSENT_ID, requestIds: [ABSENT_ID], makeOn: today() };
    expect((await stranger().post('/api/batches').send(body)).status).toBe(401);
    expect((await instructor.post('/api/batches').send(body)).status).toBe(403);
    expect((await safety.post('/api/batches').send(body)).status).toBe(403);
  });

  it.each([
    ['no body fields', {}, ['#/solutionId', '#/requestIds', '#/makeOn']],
    ['no request', { solutionId: ABSENT_ID, requestIds: [], makeOn: '2026-12-01' }, ['#/requestIds']],
    [
      'a day that does not exist',
      { solutionId: ABSENT_ID, requestIds: [ABSENT_ID], makeOn: '2026-02-30' },
      ['#/makeOn'],
    ],
    [
      'a negative volume',
      { solutionId: ABSENT_ID, requestIds: [ABSENT_ID], makeOn: '2026-12-01', volumeMl: -5 },
      ['#/volumeMl'],
    ],
    [
      'an absurd volume',
      { solutionId: ABSENT_ID, requestIds: [ABSENT_ID], makeOn: '2026-12-01', volumeMl: 1e9 },
      ['#/volumeMl'],
    ],
    [
      'an unknown solution',
      { solutionId: ABSENT_ID, requestIds: [ABSENT_ID], makeOn: '2026-12-01' },
      ['#/solutionId'],
    ],
  ])('refuses %s and names the field', async (_what, body, pointers) => {
    const answer = await prep.post('/api/batches').send(body);
    expect(answer.status).toBe(422);
    expect(answer.headers['content-type']).toContain('application/problem+json');
    expect(answer.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual(pointers);
  });

  it('refuses unknown fields, and a day outside the make-window', async () => {
    const need = await agreedNeed();
    const body = { solutionId: need.solutionId, requestIds: [need.requestId], makeOn: today() };
    expect((await prep.post('/api/batches').send({ ...body, colour: 'blue' })).status).toBe(422);
    const late = await prep
      .post('/api/batches')
      .send({ ...body, makeOn: formatISO(addDays(new Date(), 60), { representation: 'date' }) });
    expect(late.body.errors).toMatchObject([{ pointer: '#/makeOn' }]);
  });

  it('sent twice under one key plans one batch; the same key for something else is a conflict', async () => {
    const need = await agreedNeed();
    const body = { solutionId: need.solutionId, requestIds: [need.requestId], makeOn: today() };
    const key = `plan-${need.requestId}`;
    const [first, second] = await Promise.all(
      [1, 2].map(() => prep.post('/api/batches').set('idempotency-key', key).send(body)),
    );
    expect([first?.status, second?.status]).toEqual([201, 201]);
    expect(first?.body.id).toBe(second?.body.id);
    const other = await prep
      .post('/api/batches')
      .set('idempotency-key', key)
      .send({ ...body, volumeMl: 500 });
    expect(other.status).toBe(409);
    const { body: batches } = await prep.get('/api/batches').query({ requestId: need.requestId });
    expect(batches.total).toBe(1);
  });

  it('names what is short, and puts it before purchasing', async () => {
    const need = await agreedNeed('Nickel(II) sulfate 0.1 mol/L', 60);
    const answer = await prep
      .post('/api/batches')
      .send({ solutionId: need.solutionId, requestIds: [need.requestId], makeOn: today() });
    expect(answer.status).toBe(409);
    expect(answer.body.type).toContain('not-enough');
    expect(answer.body.detail).toMatch(/nickel\(II\) sulfate.*short/i);
    const { body: batches } = await prep.get('/api/batches').query({ requestId: need.requestId });
    expect(batches.total).toBe(0);
  });
});

describe('a batch', () => {
  it('is seen by staff and by those it is made for, by nobody else', async () => {
    const batch = await plannedBatch();
    expect((await stranger().get(`/api/batches/${batch.id}`)).status).toBe(401);
    expect((await (await signedIn('t.renwick')).get(`/api/batches/${batch.id}`)).status).toBe(404);
    expect((await instructor.get(`/api/batches/${batch.id}`)).status).toBe(200);
    expect((await prep.get(`/api/batches/${ABSENT_ID}`)).status).toBe(404);
    expect((await prep.get('/api/batches/nonsense')).status).toBe(404);
    const { body: seen } = await (
      await signedIn('t.renwick')
    )
      .get('/api/batches')
      .query({ search: batch.code });
    expect(seen.total).toBe(0);
  });

  it('takes entries only while it is made, only by prep, and from a page that is up to date', async () => {
    const batch = await plannedBatch();
    const [take] = batch.takes;
    const path = `/api/batches/${batch.id}/takes/${take?.id}`;
    const entry = { amount: take?.target, explanation: '', version: 0 };
    expect((await instructor.put(path).send(entry)).status).toBe(403);
    expect((await prep.put(path).send(entry)).status).toBe(409);
    await making(batch);
    for (const amount of [-1, 0, 'much', 1e12, null])
      expect((await prep.put(path).send({ ...entry, amount })).status).toBe(422);
    expect((await prep.put(path).send(entry)).status).toBe(200);
    const stale = await prep.put(path).send({ ...entry, amount: take?.low });
    expect(stale.status).toBe(409);
    expect((await prep.get('/api/movements').query({ batchId: batch.id })).body.total).toBe(1);
  });

  it('a stale page can neither start, check, bottle nor hold it', async () => {
    const batch = await plannedBatch();
    await making(batch);
    expect((await prep.post(`/api/batches/${batch.id}/start`).send({ version: batch.version })).status).toBe(
      409,
    );
    expect(
      (await prep.post(`/api/batches/${batch.id}/hold`).send({ reason: 'Late', version: batch.version }))
        .status,
    ).toBe(409);
    expect(
      (
        await prep
          .post(`/api/batches/${batch.id}/bottles`)
          .send({ bottles: [{ volumeMl: 100, requestId: null }], version: batch.version })
      ).status,
    ).toBe(409);
  });

  it('becomes bottles, which are handed over; their labels open a page without sign-in', async () => {
    const batch = await checkedBatch();
    expect(batch.actual?.strengths[0]?.expandedUncertainty).toBeGreaterThan(0);
    const request = batch.requests[0];
    const tooMuch = await prep
      .post(`/api/batches/${batch.id}/bottles`)
      .send({ bottles: [{ volumeMl: 9000, requestId: request?.id }], version: batch.version });
    expect(tooMuch.status).toBe(422);
    const bottled = await prep
      .post(`/api/batches/${batch.id}/bottles`)
      .send({ bottles: [{ volumeMl: request?.volumeMl, requestId: request?.id }], version: batch.version });
    expect(bottled.status).toBe(201);
    const [bottle] = (bottled.body as Batch).bottles;
    expect((await instructor.get(`/api/requests/${request?.id}`)).body.state).toBe('ready');
    const { body: labels } = await prep.get(`/api/batches/${batch.id}/labels`);
    expect(labels.labels[0].address).toContain(`/b/${bottle?.publicToken}`);
    const page = await stranger().get(`/b/${bottle?.publicToken}`);
    expect(page.status).toBe(200);
    expect(page.text).toContain(bottle?.code);
    expect(page.text).not.toContain('Oakhurst');
    const handOver = { requestId: request?.id, bottleIds: [bottle?.id] };
    expect((await instructor.post('/api/bottles/hand-over').send(handOver)).status).toBe(403);
    expect((await prep.post('/api/bottles/hand-over').send(handOver)).body.requestState).toBe('handed-over');
    expect((await prep.post('/api/bottles/hand-over').send(handOver)).status).toBe(409);
    const revoked = await prep
      .post(`/api/bottles/${bottle?.id}/revoke`)
      .send({ reason: 'Label torn', version: 1 });
    expect(revoked.status).toBe(200);
    const after = await stranger().get(`/b/${bottle?.publicToken}`);
    expect(after.text).toContain('no longer valid');
    expect(after.text).not.toContain(bottle?.code);
    expect((await stranger().get('/b/no-such-token-anywhere-here')).status).toBe(404);
  });

  it('on hold refuses what would use it', async () => {
    const batch = await checkedBatch();
    expect(
      (
        await instructor
          .post(`/api/batches/${batch.id}/hold`)
          .send({ reason: 'Mine', version: batch.version })
      ).status,
    ).toBe(403);
    expect(
      (await safety.post(`/api/batches/${batch.id}/hold`).send({ reason: '', version: batch.version }))
        .status,
    ).toBe(422);
    const held = await safety
      .post(`/api/batches/${batch.id}/hold`)
      .send({ reason: 'Cloudy', version: batch.version });
    expect(held.body.isHeld).toBe(true);
    const bottles = { bottles: [{ volumeMl: 50, requestId: null }], version: held.body.version };
    const refused = await prep.post(`/api/batches/${batch.id}/bottles`).send(bottles);
    expect(refused.status).toBe(409);
    expect(refused.body.detail).toContain('Cloudy');
    const lifted = await safety
      .post(`/api/batches/${batch.id}/lift`)
      .send({ reason: 'Filtered', version: held.body.version });
    expect(
      (await prep.post(`/api/batches/${batch.id}/bottles`).send({ ...bottles, version: lifted.body.version }))
        .status,
    ).toBe(201);
  });
});
