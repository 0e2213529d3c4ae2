import request from 'supertest';
import type { User } from '@/lib/schemas/users';
import { bodyOf, nobody, pointersOf, problemOf, signIn } from '../support/api';
import type { Caller } from '../support/api';
import { serverUrl, standInUrl } from '../support/server';

let admin: Caller;
let made = 0;

beforeAll(async () => {
  admin = await signIn('admin');
});

const PASSWORD = 'four words in a row';

async function buildUser(roles: string[] = ['instructor']): Promise<User> {
  made += 1;
  const input = {
    name: `Person ${made}`,
    email: `account-${made}@larkmoor.example`,
    roles,
    approvalLimitMinor: 0,
    password: PASSWORD,
  };
  return bodyOf<User>(await admin.post('/api/users', input), 201);
}

test('signing in answers with the cookie and the person, and signing out ends it', async () => {
  const user = await buildUser();
  const response = await request(serverUrl())
    .post('/api/session')
    .send({ email: user.email, password: PASSWORD });
  expect(response.status).toBe(200);
  expect(response.body).toEqual({
    user: { id: user.id, name: user.name, email: user.email, roles: ['instructor'] },
  });
  const [cookie = ''] = response.get('set-cookie') ?? [];
  expect(cookie).toMatch(/HttpOnly/i);
  expect(cookie).toMatch(/SameSite=Lax/i);
  const out = await request(serverUrl())
    .delete('/api/session')
    .set('cookie', cookie.split(';')[0] ?? '');
  expect(out.status).toBe(204);
  expect((out.get('set-cookie') ?? [])[0]).toMatch(/Max-Age=0/);
});

test('an unknown address and a wrong password are told apart by nothing', async () => {
  const user = await buildUser();
  const attempt = (email: string) =>
    request(serverUrl()).post('/api/session').send({ email, password: 'wrong' });
  const [unknown, wrong] = [await attempt('nobody@larkmoor.example'), await attempt(user.email)];
  expect(unknown.status).toBe(401);
  expect(wrong.status).toBe(401);
  expect(wrong.body).toEqual(unknown.body);
});

test('eight wrong passwords lock an account for a while, the right one included', async () => {
  const user = await buildUser();
  const attempt = (password: string) =>
    request(serverUrl()).post('/api/session').send({ email: user.email, password });
  for (let count = 0; count < 8; count += 1) expect((await attempt('wrong')).status).toBe(401);
  const locked = await attempt(PASSWORD);
  problemOf(locked, 429, 'locked-out');
  expect(Number(locked.headers['retry-after'])).toBeGreaterThan(0);
}, 60_000);

test('signing out everywhere, a change of roles and a closed account each end sessions at once', async () => {
  const user = await buildUser();
  const first = await signIn(user.email, PASSWORD);
  const second = await signIn(user.email, PASSWORD);
  expect((await second.post('/api/account/sign-out-everywhere')).status).toBe(204);
  expect((await first.get('/api/requests')).status).toBe(401);

  const third = await signIn(user.email, PASSWORD);
  const patch = {
    name: user.name,
    roles: ['safety'],
    approvalLimitMinor: 0,
    isDisabled: false,
    version: user.version,
  };
  const changed = bodyOf<User>(await admin.patch(`/api/users/${user.id}`, patch));
  expect((await third.get('/api/requests')).status).toBe(401);
  expect((await (await signIn(user.email, PASSWORD)).get('/api/records')).status).toBe(200);

  bodyOf(
    await admin.patch(`/api/users/${user.id}`, { ...patch, isDisabled: true, version: changed.version }),
  );
  await expect(signIn(user.email, PASSWORD)).rejects.toThrow('401');
}, 60_000);

interface Letter {
  readonly to: string;
  readonly text: string;
}

async function letterTo(email: string): Promise<Letter> {
  for (let look = 0; look < 50; look += 1) {
    const letters = (await (
      await fetch(`${standInUrl()}/mail/messages.json?to=${encodeURIComponent(email)}`)
    ).json()) as Letter[];
    if (letters[0]) return letters[0];
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Error(`No letter came for ${email}`);
}

test('a forgotten password is set by a letter that works once; whether there is an account is not told', async () => {
  const user = await buildUser();
  expect((await nobody.post('/api/password-resets', { email: 'nobody@larkmoor.example' })).status).toBe(204);
  expect((await nobody.post('/api/password-resets', { email: user.email })).status).toBe(204);
  const { text } = await letterTo(user.email);
  const token = /reset-password\/([\w-]+)/.exec(text)?.[1];
  const session = await signIn(user.email, PASSWORD);
  expect((await nobody.put('/api/password-resets', { token, password: 'short' })).status).toBe(422);
  expect(
    (await nobody.put('/api/password-resets', { token, password: 'quite another sentence' })).status,
  ).toBe(204);
  expect((await session.get('/api/requests')).status).toBe(401);
  await signIn(user.email, 'quite another sentence');
  expect(
    pointersOf(await nobody.put('/api/password-resets', { token, password: 'and once again please' })),
  ).toEqual(['#/token']);
}, 60_000);

test('two administrators on one account: the second is told and sees the newer state', async () => {
  const user = await buildUser();
  const patch = {
    name: 'First',
    roles: ['prep'],
    approvalLimitMinor: 0,
    isDisabled: false,
    version: user.version,
  };
  bodyOf(await admin.patch(`/api/users/${user.id}`, patch));
  const problem = problemOf(
    await admin.patch(`/api/users/${user.id}`, { ...patch, name: 'Second' }),
    409,
    'conflict',
  );
  expect(problem.current?.version).toBe(user.version + 1);
});

test('a call sent twice under one key is done once; another content under it is refused', async () => {
  const key = `accounts-${Date.now()}`;
  const input = {
    name: 'Once',
    email: 'once@larkmoor.example',
    roles: ['prep'],
    approvalLimitMinor: 0,
    password: PASSWORD,
  };
  const first = await admin.post('/api/users', input).set('idempotency-key', key);
  const again = await admin.post('/api/users', input).set('idempotency-key', key);
  expect([first.status, again.status]).toEqual([201, 201]);
  expect((again.body as User).id).toBe((first.body as User).id);
  problemOf(
    await admin.post('/api/users', { ...input, name: 'Other' }).set('idempotency-key', key),
    409,
    'conflict',
  );
});

test('the record is one unbroken chain after all that', async () => {
  const { lines, firstBrokenLine } = bodyOf<{ lines: number; firstBrokenLine: number | null }>(
    await admin.get('/api/records/check'),
  );
  expect(lines).toBeGreaterThan(20);
  expect(firstBrokenLine).toBeNull();
});

test('a list is saved as a spreadsheet', async () => {
  const response = await admin.get('/api/users?format=xlsx');
  expect(response.status).toBe(200);
  expect(response.headers['content-type']).toContain('spreadsheetml');
});
