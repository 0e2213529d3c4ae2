import type { Demonstration } from '@/lib/schemas/demonstrations';
import type { Page } from '@/lib/schemas/list';
import type { RequestDetail, RequestLineInput } from '@/lib/schemas/requests';
import type { ReviewCase, ReviewRow } from '@/lib/schemas/reviews';
import { bodyOf, DEMO_PASSWORD, nobody, pointersOf, problemOf, signIn } from '../support/api';
import type { Caller } from '../support/api';
import { buildDraft, demonstration, recipe, submit } from '../support/asking';
import { letterTo } from '../support/letters';

const YEAR = 2042;
const NO_SUCH_ID = '11111111-1111-4111-8111-111111111111';
const SIGNED = { password: DEMO_PASSWORD };

let instructor: Caller;
let safety: Caller;
/** Both a safety officer and an instructor. */
let both: Caller;
let cyanide: RequestLineInput;

beforeAll(async () => {
  instructor = await signIn('instructor');
  safety = await signIn('safety');
  both = await signIn('c.ashdown');
  cyanide = {
    kind: 'demonstration',
    demonstrationId: (await demonstration(instructor, 'Silver into its cyanide complex')).id,
    performances: 1,
  };
});

async function openCase(
  asker: Caller,
  lines: RequestLineInput[] = [cyanide],
): Promise<{ request: RequestDetail; review: ReviewCase }> {
  const request = await submit(asker, await buildDraft(asker, YEAR, lines));
  if (!request.review) throw new Error(`${request.code} was not put before safety`);
  return { request, review: await readCase(safety, request.review.id) };
}
const readCase = async (caller: Caller, id: string) =>
  bodyOf<ReviewCase>(await caller.get(`/api/reviews/${id}`));
const readRequest = async (id: string) => bodyOf<RequestDetail>(await instructor.get(`/api/requests/${id}`));
const decide = (caller: Caller, review: Pick<ReviewCase, 'id' | 'version'>, decision: object) =>
  caller.post(`/api/reviews/${review.id}/decision`, { version: review.version, ...SIGNED, ...decision });

describe('who may judge', () => {
  it.each([
    ['get', '/api/reviews'],
    ['get', `/api/reviews/${NO_SUCH_ID}`],
    ['post', `/api/reviews/${NO_SUCH_ID}/decision`],
    ['post', `/api/reviews/${NO_SUCH_ID}/messages`],
  ] as const)('%s %s needs a sign-in', async (method, path) => {
    problemOf(await nobody[method](path), 401, 'not-signed-in');
  });

  it.each(['instructor', 'prep', 'purchasing', 'admin'])('%s can not judge', async (mailbox) => {
    const { review, request } = await openCase(instructor);
    problemOf(await decide(await signIn(mailbox), review, { verdict: 'agreed', text: '' }), 403, 'forbidden');
    expect((await readCase(safety, review.id)).state).toBe('waiting');
    expect((await readRequest(request.id)).state).toBe('in-review');
  });

  it('instructors see the case of a request but not the officers’ queue', async () => {
    const { review } = await openCase(instructor);
    expect(await readCase(instructor, review.id)).toMatchObject({
      mayDecide: false,
      whyNotAgree: expect.stringMatching(/safety officer/) as string,
    });
    problemOf(await instructor.get('/api/reviews'), 403, 'forbidden');
  });

  it('nobody judges their own request, whatever roles they hold', async () => {
    const { request, review } = await openCase(both);
    const refusal = problemOf(await decide(both, review, { verdict: 'agreed', text: '' }), 403, 'forbidden');
    expect(refusal.detail).toMatch(/own request/);
    problemOf(await decide(both, review, { verdict: 'refused', text: 'No, thank you.' }), 403, 'forbidden');
    expect((await readRequest(request.id)).state).toBe('in-review');
    expect(bodyOf<ReviewCase>(await decide(safety, review, { verdict: 'agreed', text: '' })).state).toBe(
      'agreed',
    );
  });

  it('a case that is not there is not found', async () => {
    problemOf(await safety.get(`/api/reviews/${NO_SUCH_ID}`), 404, 'not-found');
    problemOf(
      await decide(safety, { id: NO_SUCH_ID, version: 0 }, { verdict: 'agreed', text: '' }),
      404,
      'not-found',
    );
  });
});

describe('a judgement', () => {
  it('shows the numbers it is judged by', async () => {
    const { review, request } = await openCase(instructor);
    expect(review.planHash).toBe(request.planHash);
    expect(review.plan).toEqual(request.plan);
    expect(review.headline).toMatch(/\w/);
  });

  it('agrees, and the request goes on with it', async () => {
    const { review, request } = await openCase(instructor);
    const before = Date.now();
    const judged = bodyOf<ReviewCase>(
      await decide(safety, review, { verdict: 'agreed', text: 'Small amounts, behind a screen.' }),
    );
    expect(judged).toMatchObject({ state: 'agreed', reviewerName: 'Halina Marsh', mayDecide: false });
    const lapses = Date.parse(judged.lapsesAt ?? '') - before;
    expect(lapses / 86_400_000).toBeGreaterThan(364);
    expect(lapses / 86_400_000).toBeLessThan(367);
    const after = await readRequest(request.id);
    expect(after.state).toBe('agreed');
    expect(after.story.at(-1)).toMatchObject({
      actorName: 'Halina Marsh',
      fromState: 'in-review',
      toState: 'agreed',
      reason: 'Small amounts, behind a screen.',
    });
  });

  it('agrees with conditions, which stand in the request', async () => {
    const { review, request } = await openCase(instructor);
    const conditions = [
      'Fume cupboard on and checked before the bottle is opened',
      'A second person in the room',
    ];
    expect(
      bodyOf<ReviewCase>(
        await decide(safety, review, { verdict: 'agreed-with-conditions', text: '', conditions }),
      ),
    ).toMatchObject({ state: 'agreed-with-conditions', conditions });
    expect((await readRequest(request.id)).review?.conditions).toEqual(conditions);
  });

  it('returns with a question, is answered and opened afresh', async () => {
    const { review, request } = await openCase(instructor);
    const question = 'Who stands beside the bench?';
    expect(
      bodyOf<ReviewCase>(await decide(safety, review, { verdict: 'returned', text: question })).state,
    ).toBe('returned');
    const returned = await readRequest(request.id);
    expect(returned.state).toBe('returned');
    const answered = bodyOf<ReviewCase>(
      await instructor.post(`/api/reviews/${review.id}/messages`, {
        body: 'Nobody; the first row stays empty.',
      }),
      201,
    );
    expect(answered.messages.map(({ authorName, body }) => [authorName, body])).toEqual([
      ['Halina Marsh', question],
      ['Ines Calloway', 'Nobody; the first row stays empty.'],
    ]);
    const again = await submit(instructor, returned);
    expect(again.state).toBe('in-review');
    expect(again.review?.id).not.toBe(review.id);
    expect((await readCase(safety, review.id)).state).toBe('lapsed');
  });

  it('refuses, and the request is withdrawn for good', async () => {
    const { review, request } = await openCase(instructor);
    bodyOf(await decide(safety, review, { verdict: 'refused', text: 'Not with first-years in the room.' }));
    const refused = await readRequest(request.id);
    expect(refused).toMatchObject({ state: 'withdrawn', mayChange: false });
    expect(refused.story.at(-1)).toMatchObject({
      actorName: 'Halina Marsh',
      reason: 'Not with first-years in the room.',
    });
  });

  it('is told to the instructor by letter', async () => {
    const { review, request } = await openCase(instructor);
    bodyOf(
      await decide(safety, review, {
        verdict: 'agreed-with-conditions',
        text: '',
        conditions: ['Gloves checked for holes'],
      }),
    );
    const letter = await letterTo('instructor@larkmoor.example', ({ subject }) =>
      subject.includes(request.code),
    );
    expect(letter.subject).toMatch(/agreed with conditions/);
    expect(letter.text).toContain('Gloves checked for holes');
    expect(letter.text).toContain(`/requests/${request.id}`);
  });

  it('is given once: of two at a time one is told of the other', async () => {
    const { review, request } = await openCase(instructor);
    const answers = await Promise.all([
      decide(safety, review, { verdict: 'agreed', text: '' }),
      decide(both, review, { verdict: 'refused', text: 'Not this term.' }),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    const { state } = await readRequest(request.id);
    expect(state).toBe(answers[0]?.status === 200 ? 'agreed' : 'withdrawn');
    const now = await readCase(safety, review.id);
    problemOf(await decide(safety, now, { verdict: 'agreed', text: '' }), 409, 'wrong-state');
    problemOf(
      await decide(safety, now, { verdict: 'refused', text: 'Changed my mind.' }),
      409,
      'wrong-state',
    );
  });

  it('does not reach a plan that changed after it was opened', async () => {
    const { review, request } = await openCase(instructor);
    const acid: RequestLineInput = {
      kind: 'solution',
      solutionId: (await recipe(instructor, 'Hydrochloric acid 0.1 mol/L')).id,
      volumePerBenchMl: 10,
      spareBenches: 0,
    };
    bodyOf(
      await instructor.patch(`/api/requests/${request.id}`, {
        note: null,
        lines: [cyanide, acid],
        version: request.version,
      }),
    );
    problemOf(await decide(safety, review, { verdict: 'agreed', text: '' }), 409, 'conflict');
    expect((await readRequest(request.id)).state).toBe('in-review');
  });
});

describe('a stop', () => {
  it('can be agreed by nobody, with or without conditions, but can be returned', async () => {
    const [salt, acid] = await Promise.all([
      recipe(instructor, 'Sodium cyanide 0.1 mol/L in alkali'),
      recipe(instructor, 'Hydrochloric acid 1 mol/L'),
    ]);
    const pour = bodyOf<Demonstration>(
      await instructor.post('/api/demonstrations', {
        name: 'To be stopped',
        outcomeWanted: null,
        vesselMl: 250,
        portions: [
          { solutionId: salt.id, volumeMl: 40 },
          { solutionId: acid.id, volumeMl: 40 },
        ],
      }),
      201,
    );
    const { review, request } = await openCase(instructor, [
      { kind: 'demonstration', demonstrationId: pour.id, performances: 1 },
    ]);
    expect(review).toMatchObject({
      decision: 'stop',
      gravity: 0,
      whyNotAgree: expect.stringMatching(/stop/) as string,
    });
    problemOf(await decide(safety, review, { verdict: 'agreed', text: '' }), 403, 'forbidden');
    problemOf(
      await decide(both, review, {
        verdict: 'agreed-with-conditions',
        text: '',
        conditions: ['Outdoors only'],
      }),
      403,
      'forbidden',
    );
    expect(await readRequest(request.id)).toMatchObject({ state: 'in-review', decision: 'stop' });
    expect(
      bodyOf<ReviewCase>(
        await decide(safety, review, { verdict: 'returned', text: 'These two must not meet.' }),
      ).state,
    ).toBe('returned');
  });
});

describe('a signature', () => {
  it('needs the right password, and a wrong one changes nothing', async () => {
    const { review } = await openCase(instructor);
    expect(
      pointersOf(await decide(safety, review, { verdict: 'agreed', text: '', password: 'not the password' })),
    ).toEqual(['#/password']);
    expect(pointersOf(await decide(safety, review, { verdict: 'agreed', text: '', password: '' }))).toEqual([
      '#/password',
    ]);
    expect(await readCase(safety, review.id)).toMatchObject({
      state: 'waiting',
      version: review.version,
      reviewerName: null,
    });
  });

  it.each<[string, object, string[]]>([
    ['no verdict', { text: '' }, ['#/verdict']],
    ['a verdict we do not know', { verdict: 'perhaps', text: '' }, ['#/verdict']],
    ['a refusal without a reason', { verdict: 'refused', text: ' ' }, ['#/text']],
    ['a return without a question', { verdict: 'returned', text: '' }, ['#/text']],
    [
      'conditions without one',
      { verdict: 'agreed-with-conditions', text: '', conditions: [] },
      ['#/conditions'],
    ],
    [
      'conditions with an agreement that has none',
      { verdict: 'agreed', text: '', conditions: ['Gloves'] },
      ['#/conditions'],
    ],
    ['a version in words', { verdict: 'agreed', text: '', version: 'newest' }, ['#/version']],
  ])('%s is refused by name', async (_name, decision, pointers) => {
    const { review } = await openCase(instructor);
    expect(pointersOf(await decide(safety, review, decision))).toEqual(pointers);
    expect((await readCase(safety, review.id)).state).toBe('waiting');
  });

  it('an empty message is refused by name', async () => {
    const { review } = await openCase(instructor);
    expect(pointersOf(await instructor.post(`/api/reviews/${review.id}/messages`, { body: '  ' }))).toEqual([
      '#/body',
    ]);
    problemOf(
      await (await signIn('t.renwick')).post(`/api/reviews/${review.id}/messages`, { body: 'May I?' }),
      403,
      'forbidden',
    );
  });
});

describe('the queue', () => {
  it('has the gravest first and of those the oldest', async () => {
    await openCase(instructor);
    const { items } = bodyOf<Page<ReviewRow>>(await safety.get('/api/reviews?state=waiting&pageSize=200'));
    expect(items.length).toBeGreaterThan(1);
    const keys = items.map(({ gravity, openedAt }) => `${gravity} ${openedAt}`);
    expect(keys).toEqual([...keys].sort());
    expect(items.every(({ state }) => state === 'waiting')).toBe(true);
  });

  it('finds a case by the code of its request', async () => {
    const { request, review } = await openCase(instructor);
    const { items } = bodyOf<Page<ReviewRow>>(await safety.get(`/api/reviews?search=${request.code}`));
    expect(items.map(({ id }) => id)).toEqual([review.id]);
  });
});
