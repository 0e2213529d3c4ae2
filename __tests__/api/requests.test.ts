import ExcelJS from 'exceljs';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import type { LabSession } from '@/lib/schemas/lab-sessions';
import type { Page } from '@/lib/schemas/list';
import type { RequestDetail, RequestLineInput, RequestRow } from '@/lib/schemas/requests';
import type { ReviewCase } from '@/lib/schemas/reviews';
import { bodyOf, bytes, nobody, pointersOf, problemOf, signIn } from '../support/api';
import type { Caller } from '../support/api';
import { buildDraft, buildSession, demonstration, recipe, submit } from '../support/asking';

const YEAR = 2041;
const NO_SUCH_ID = '11111111-1111-4111-8111-111111111111';

let instructor: Caller;
let other: Caller;
let prep: Caller;
let safety: Caller;
let copper: RequestLineInput;
let ammine: RequestLineInput;
let cyanide: RequestLineInput;
let acid: RequestLineInput;

beforeAll(async () => {
  [instructor, other, prep, safety] = await Promise.all(
    ['instructor', 't.renwick', 'prep', 'safety'].map((mailbox) => signIn(mailbox)) as [
      Promise<Caller>,
      Promise<Caller>,
      Promise<Caller>,
      Promise<Caller>,
    ],
  );
  copper = {
    kind: 'solution',
    solutionId: (await recipe(instructor, 'Copper(II) sulfate 0.1 mol/L')).id,
    volumePerBenchMl: 40,
    spareBenches: 1,
  };
  acid = {
    kind: 'solution',
    solutionId: (await recipe(instructor, 'Hydrochloric acid 0.1 mol/L')).id,
    volumePerBenchMl: 30,
    spareBenches: 0,
  };
  ammine = {
    kind: 'demonstration',
    demonstrationId: (await demonstration(instructor, 'Copper hydroxide to deep blue ammine')).id,
    performances: 2,
  };
  cyanide = {
    kind: 'demonstration',
    demonstrationId: (await demonstration(instructor, 'Silver into its cyanide complex')).id,
    performances: 1,
  };
});

const planOf = (request: RequestDetail) => request.plan as unknown as RequestPlan;

describe('who may ask', () => {
  it.each([
    ['get', '/api/requests'],
    ['post', '/api/requests'],
    ['get', `/api/requests/${NO_SUCH_ID}`],
    ['patch', `/api/requests/${NO_SUCH_ID}`],
    ['post', `/api/requests/${NO_SUCH_ID}/submit`],
    ['post', `/api/requests/${NO_SUCH_ID}/withdraw`],
    ['post', '/api/requests/plan-preview'],
  ] as const)('%s %s needs a sign-in', async (method, path) => {
    problemOf(await nobody[method](path), 401, 'not-signed-in');
  });

  it.each(['purchasing', 'safety', 'admin'])('%s asks for nothing', async (mailbox) => {
    const caller = await signIn(mailbox);
    problemOf(
      await caller.post('/api/requests', { sessionId: NO_SUCH_ID, note: null, lines: [copper] }),
      403,
      'forbidden',
    );
    expect((await caller.get('/api/requests')).status).toBe(200);
  });

  it('an instructor asks only for their own sessions, prep for any', async () => {
    const session = await buildSession(instructor, YEAR);
    const body = { sessionId: session.id, note: null, lines: [copper] };
    problemOf(await other.post('/api/requests', body), 403, 'forbidden');
    expect((await prep.post('/api/requests', body)).status).toBe(201);
  });

  it('another instructor can read a request but not change, submit or withdraw it', async () => {
    const draft = await buildDraft(instructor, YEAR, [copper]);
    expect(bodyOf<RequestDetail>(await other.get(`/api/requests/${draft.id}`)).mayChange).toBe(false);
    problemOf(
      await other.patch(`/api/requests/${draft.id}`, {
        note: 'mine now',
        lines: [acid],
        version: draft.version,
      }),
      403,
      'forbidden',
    );
    problemOf(
      await other.post(`/api/requests/${draft.id}/submit`, { version: draft.version }),
      403,
      'forbidden',
    );
    problemOf(
      await other.post(`/api/requests/${draft.id}/withdraw`, { version: draft.version }),
      403,
      'forbidden',
    );
    expect(bodyOf<RequestDetail>(await instructor.get(`/api/requests/${draft.id}`))).toMatchObject({
      state: 'draft',
      note: null,
      version: draft.version,
      mayChange: true,
    });
  });

  it('a page of another site can not ask in somebody’s name', async () => {
    problemOf(
      await instructor.post('/api/requests', {}).set('origin', 'https://elsewhere.example'),
      403,
      'foreign-origin',
    );
    problemOf(
      await instructor.post('/api/requests', {}).set('sec-fetch-site', 'cross-site'),
      403,
      'foreign-origin',
    );
  });

  it.each([NO_SUCH_ID, 'not-an-id', '1'])('nothing is at /api/requests/%s', async (id) => {
    problemOf(await instructor.get(`/api/requests/${id}`), 404, 'not-found');
  });
});

describe('what can not be asked for', () => {
  let session: LabSession;
  beforeAll(async () => {
    session = await buildSession(instructor, YEAR);
  });
  const bad = (change: object) => ({ sessionId: session.id, note: null, lines: [copper], ...change });
  const line = (change: object) => bad({ lines: [{ ...copper, ...change }] });

  it.each<[string, () => object, string[]]>([
    ['no session', () => bad({ sessionId: undefined }), ['#/sessionId']],
    ['a session that is not there', () => bad({ sessionId: NO_SUCH_ID }), ['#/sessionId']],
    ['no lines', () => bad({ lines: [] }), ['#/lines']],
    ['lines that are no list', () => bad({ lines: 'copper' }), ['#/lines']],
    ['41 lines', () => bad({ lines: Array.from({ length: 41 }, () => copper) }), ['#/lines']],
    ['a kind of line we do not know', () => line({ kind: 'wish' }), ['#/lines/0/kind']],
    ['a negative volume', () => line({ volumePerBenchMl: -40 }), ['#/lines/0/volumePerBenchMl']],
    ['an absurd volume', () => line({ volumePerBenchMl: 1e9 }), ['#/lines/0/volumePerBenchMl']],
    ['a volume in words', () => line({ volumePerBenchMl: 'forty' }), ['#/lines/0/volumePerBenchMl']],
    ['half a spare bench', () => line({ spareBenches: 0.5 }), ['#/lines/0/spareBenches']],
    ['a recipe that is not there', () => line({ solutionId: NO_SUCH_ID }), ['#/lines/0/solutionId']],
    ['a recipe named by words', () => line({ solutionId: 'copper' }), ['#/lines/0/solutionId']],
    [
      'a demonstration that is not there',
      () => bad({ lines: [copper, { ...ammine, demonstrationId: NO_SUCH_ID }] }),
      ['#/lines/1/demonstrationId'],
    ],
    ['a field we do not know', () => bad({ colour: 'blue' }), ['#/colour']],
    ['two faults at once', () => bad({ lines: [], note: 'x'.repeat(2001) }), ['#/lines', '#/note']],
  ])('%s is refused by name, and nothing is kept', async (_name, body, pointers) => {
    expect(pointersOf(await instructor.post('/api/requests', body()))).toEqual(pointers);
    expect(bodyOf<LabSession>(await instructor.get(`/api/lab-sessions/${session.id}`)).requests).toEqual([]);
  });

  it('a number that is none is named too', async () => {
    const text = JSON.stringify(line({ volumePerBenchMl: 123456 })).replace('123456', 'NaN');
    const response = await instructor
      .post('/api/requests')
      .set('content-type', 'application/json')
      .send(text);
    expect(pointersOf(response)).toEqual(['#/lines/0/volumePerBenchMl']);
  });

  it('a body that is no JSON, of another type or too large is refused', async () => {
    problemOf(
      await instructor.post('/api/requests').set('content-type', 'application/json').send('{"lines": ['),
      400,
      'malformed',
    );
    problemOf(
      await instructor.post('/api/requests').set('content-type', 'text/plain').send('copper please'),
      415,
      'unsupported-type',
    );
    problemOf(await instructor.post('/api/requests', bad({ note: 'x'.repeat(400_000) })), 413, 'too-large');
  });

  it('a list can not be asked for in an order or a state that does not exist', async () => {
    expect(pointersOf(await instructor.get('/api/requests?sort=colour'))).toEqual(['#/query/sort']);
    expect(pointersOf(await instructor.get('/api/requests?state=lost'))).toEqual(['#/query/state']);
    expect(pointersOf(await instructor.get('/api/requests?page=0'))).toEqual(['#/query/page']);
    expect(pointersOf(await instructor.get('/api/requests?where=1'))).toEqual(['#/query/where']);
  });
});

describe('asking', () => {
  it('a form sent twice asks once, and its key does not fit another content', async () => {
    const session = await buildSession(instructor, YEAR);
    const body = { sessionId: session.id, note: 'once', lines: [copper] };
    const key = `twice-${session.id}`;
    const [first, second] = await Promise.all([
      instructor.post('/api/requests', body).set('idempotency-key', key),
      instructor.post('/api/requests', body).set('idempotency-key', key),
    ]);
    expect(bodyOf<RequestDetail>(second, 201).id).toBe(bodyOf<RequestDetail>(first, 201).id);
    expect(bodyOf<LabSession>(await instructor.get(`/api/lab-sessions/${session.id}`)).requests).toHaveLength(
      1,
    );
    problemOf(
      await instructor.post('/api/requests', { ...body, note: 'other' }).set('idempotency-key', key),
      409,
      'conflict',
    );
  });

  it('gathers the volume for benches, spare benches and demonstrations, and the mass it takes', async () => {
    const request = await submit(instructor, await buildDraft(instructor, YEAR, [copper, ammine]));
    const planned = planOf(request).solutions.find(({ name }) => name === 'Copper(II) sulfate 0.1 mol/L');
    // (10 benches + 1 spare) x 40 mL, and twice 50 mL to show
    expect(planned?.volumeMl).toBeCloseTo(540, 9);
    const mass = planOf(request).substances.find(({ substance }) => substance === 'copper-sulfate');
    // molar mass of the pentahydrate from the IUPAC abridged standard atomic weights: 249.68 g/mol
    expect(mass?.grams).toBeCloseTo(0.54 * 0.1 * 249.68, 2);
  });

  it('copper in ammonia is agreed at once, and its plan is frozen', async () => {
    const draft = await buildDraft(instructor, YEAR, [copper, ammine]);
    expect(draft).toMatchObject({ state: 'draft', planHash: null, decision: null, plan: null });
    const request = await submit(instructor, draft);
    expect(request.state).toBe('agreed');
    expect(['stop', 'review']).not.toContain(request.decision);
    expect(request.planHash).toMatch(/^[0-9a-f]{64}$/);
    expect(request.review).toBeNull();
    expect(request.story.map(({ toState }) => toState)).toEqual(['draft', 'asked', 'agreed']);
    expect(
      request.story.every(
        ({ actorName, at }) => actorName === 'Ines Calloway' && !Number.isNaN(Date.parse(at)),
      ),
    ).toBe(true);
  });

  it('silver in cyanide beside a dilute acid goes to safety with the hydrogen cyanide it could give', async () => {
    const request = await submit(instructor, await buildDraft(instructor, YEAR, [cyanide, acid]));
    expect(request.state).toBe('in-review');
    expect(['stop', 'review']).toContain(request.decision);
    const gases = planOf(request).findings.flatMap(({ gas, scope }) => (gas ? [{ scope, ...gas }] : []));
    const beside = gases.find(({ scope, species }) => scope === 'neighbours' && /HCN/.test(species));
    // 40 mL of 0.1 mol/L holds 4 mmol of cyanide; the acid, 300 mL of 0.1 mol/L, is more than enough to free all of it
    expect(beside?.worstCaseMoles).toBeCloseTo(0.004, 6);
    expect(beside?.limit?.ppm).toBeLessThan(beside?.ppmInBreathingZone ?? 0);
    expect(request.review).toMatchObject({ state: 'waiting' });
  });

  it('what is asked by others for the same room and hour is screened together', async () => {
    const session = await buildSession(instructor, YEAR);
    const ask = async (lines: RequestLineInput[]) =>
      submit(
        instructor,
        bodyOf<RequestDetail>(
          await instructor.post('/api/requests', { sessionId: session.id, note: null, lines }),
          201,
        ),
      );
    expect((await ask([acid])).state).toBe('agreed');
    const second = await ask([cyanide]);
    expect(
      planOf(second).findings.some(
        ({ scope, gas }) => scope === 'neighbours' && gas !== null && /HCN/.test(gas.species),
      ),
    ).toBe(true);
  });

  it.each<[string, () => RequestLineInput]>([
    ['agreed', () => copper],
    ['in review', () => cyanide],
  ])('a request that is %s is not submitted a second time', async (_state, line) => {
    const draft = await buildDraft(instructor, YEAR, [line()]);
    const submitted = await submit(instructor, draft);
    const stale = problemOf(
      await instructor.post(`/api/requests/${draft.id}/submit`, { version: draft.version }),
      409,
      'conflict',
    );
    expect(stale.current?.version).toBeGreaterThan(draft.version);
    problemOf(
      await instructor.post(`/api/requests/${draft.id}/submit`, { version: submitted.version }),
      409,
      'wrong-state',
    );
    expect(bodyOf<RequestDetail>(await instructor.get(`/api/requests/${draft.id}`)).review).toEqual(
      submitted.review,
    );
  });

  it('shows a plan before anything is saved, the same as the one that is frozen later', async () => {
    const session = await buildSession(instructor, YEAR);
    const preview = bodyOf<RequestPlan>(
      await instructor.post('/api/requests/plan-preview', { sessionId: session.id, lines: [copper, ammine] }),
    );
    expect(bodyOf<LabSession>(await instructor.get(`/api/lab-sessions/${session.id}`)).requests).toEqual([]);
    const draft = bodyOf<RequestDetail>(
      await instructor.post('/api/requests', { sessionId: session.id, note: null, lines: [copper, ammine] }),
      201,
    );
    expect(planOf(await submit(instructor, draft))).toEqual(preview);
  });
});

describe('changing', () => {
  it('of two who change the same request the second is told and sees the newer one', async () => {
    const draft = await buildDraft(instructor, YEAR, [copper]);
    const change = (note: string) =>
      instructor.patch(`/api/requests/${draft.id}`, { note, lines: [copper], version: draft.version });
    const answers = await Promise.all([change('first'), change('second')]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    const kept = bodyOf<RequestDetail>(await instructor.get(`/api/requests/${draft.id}`));
    const refused = answers.find(({ status }) => status === 409);
    expect(refused?.body).toMatchObject({ current: { note: kept.note, version: kept.version } });
  });

  it('a change of an agreed request is judged again', async () => {
    const agreed = await submit(instructor, await buildDraft(instructor, YEAR, [copper]));
    expect(agreed.state).toBe('agreed');
    const changed = bodyOf<RequestDetail>(
      await instructor.patch(`/api/requests/${agreed.id}`, {
        note: null,
        lines: [cyanide],
        version: agreed.version,
      }),
    );
    expect(changed.state).toBe('in-review');
    expect(changed.planHash).not.toBe(agreed.planHash);
  });

  it('a change of the plan makes the waiting review lapse', async () => {
    const waiting = await submit(instructor, await buildDraft(instructor, YEAR, [cyanide]));
    const reviewId = waiting.review?.id;
    const changed = bodyOf<RequestDetail>(
      await instructor.patch(`/api/requests/${waiting.id}`, {
        note: null,
        lines: [cyanide, copper],
        version: waiting.version,
      }),
    );
    expect(bodyOf<ReviewCase>(await safety.get(`/api/reviews/${reviewId}`)).state).toBe('lapsed');
    expect(changed.review).toMatchObject({ state: 'waiting' });
    expect(changed.review?.id).not.toBe(reviewId);
  });

  it('a withdrawn request stays withdrawn and its review lapses', async () => {
    const waiting = await submit(instructor, await buildDraft(instructor, YEAR, [cyanide]));
    const withdrawn = bodyOf<RequestDetail>(
      await instructor.post(`/api/requests/${waiting.id}/withdraw`, {
        version: waiting.version,
        reason: 'The course changed.',
      }),
    );
    expect(withdrawn).toMatchObject({ state: 'withdrawn', mayChange: false, review: { state: 'lapsed' } });
    expect(withdrawn.story.at(-1)).toMatchObject({ toState: 'withdrawn', reason: 'The course changed.' });
    problemOf(
      await instructor.post(`/api/requests/${waiting.id}/submit`, { version: withdrawn.version }),
      409,
      'wrong-state',
    );
    problemOf(
      await instructor.patch(`/api/requests/${waiting.id}`, {
        note: null,
        lines: [copper],
        version: withdrawn.version,
      }),
      409,
      'wrong-state',
    );
  });
});

describe('the list', () => {
  it('is filtered, sorted and paged on the server', async () => {
    await buildDraft(other, YEAR, [copper]);
    const mine = bodyOf<Page<RequestRow>>(
      await other.get('/api/requests?whose=mine&state=draft&sort=-code&pageSize=2'),
    );
    expect(mine.items.length).toBeGreaterThan(0);
    expect(mine.items.length).toBeLessThanOrEqual(2);
    expect(
      mine.items.every(({ requesterName, state }) => requesterName === 'Tobias Renwick' && state === 'draft'),
    ).toBe(true);
    const codes = mine.items.map(({ code }) => code);
    expect(codes).toEqual([...codes].sort().reverse());
    const all = bodyOf<Page<RequestRow>>(await other.get('/api/requests?pageSize=1&page=2'));
    expect(all).toMatchObject({ page: 2, pageSize: 1 });
    expect(all.total).toBeGreaterThan(mine.total);
  });

  it('finds a request by its code', async () => {
    const draft = await buildDraft(instructor, YEAR, [copper]);
    const found = bodyOf<Page<RequestRow>>(
      await instructor.get(`/api/requests?search=${encodeURIComponent(draft.code)}`),
    );
    expect(found.items.map(({ id }) => id)).toEqual([draft.id]);
    expect(bodyOf<Page<RequestRow>>(await instructor.get('/api/requests?search=no-such-code')).total).toBe(0);
  });

  it('is exported as a spreadsheet of the rows that were filtered', async () => {
    const response = await bytes(instructor.get('/api/requests?format=xlsx&state=withdrawn'));
    expect(response.type).toBe('application/vnd.openxmlformats-officedocument.spreadsheetml.sheet');
    expect(response.get('content-disposition')).toMatch(/attachment/);
    const workbook = new ExcelJS.Workbook();
    const data = response.body as Buffer;
    await workbook.xlsx.load(
      data.buffer.slice(data.byteOffset, data.byteOffset + data.byteLength) as ArrayBuffer,
    );
    const rows = workbook.worksheets[0]?.getSheetValues() as (unknown[] | undefined)[];
    expect(rows[1]?.slice(1)).toEqual(['Request', 'Session', 'Starts', 'Asked by', 'State', 'Waits for']);
    expect(rows.slice(2).length).toBeGreaterThan(0);
    expect(rows.slice(2).every((row) => row?.[5] === 'withdrawn')).toBe(true);
  });
});
