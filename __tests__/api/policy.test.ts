import { readdirSync } from 'node:fs';
import path from 'node:path';
import request from 'supertest';
import { mayByRole, POLICY } from '@/lib/domain/policy';
import { ROLES } from '@/lib/domain/roles';
import type { Role, Viewer } from '@/lib/domain/roles';
import { ALL_ENDPOINTS } from '@/lib/schemas/all-endpoints';
import { nobody, signIn } from '../support/api';
import type { Caller } from '../support/api';
import { serverUrl } from '../support/server';

/**
 * The table of product roles, written out by hand from the house rules: what each role may begin. The policy is
 * tested against it, and every call of the interface with every role against the policy.
 */
const MAY: Readonly<Record<string, readonly Role[]>> = {
  'request:create': ['instructor', 'prep'],
  'review:decide': ['safety'],
  'batch:write': ['prep'],
  'stock:write': ['prep'],
  'stock:read': ['prep', 'purchasing', 'safety', 'admin'],
  'stock:hold': ['prep', 'safety', 'admin'],
  'order:draft': ['prep', 'purchasing'],
  'order:approve': ['purchasing'],
  'order:send': ['purchasing'],
  'order:pay': ['purchasing'],
  'user:manage': ['admin'],
  'record:read': ['safety', 'admin'],
};

const viewerOf = (role: Role): Viewer => ({
  id: 'x',
  name: 'x',
  email: 'x@larkmoor.example',
  roles: [role],
  approvalLimitMinor: 0,
});

test.each(Object.entries(MAY))('%s is open to just the roles of the house rules', (action, roles) => {
  const open = ROLES.filter((role) => mayByRole(viewerOf(role), action as keyof typeof POLICY));
  expect(open).toEqual(ROLES.filter((role) => roles.includes(role)));
});

/** A path whose parameters name nothing. */
function absent(pattern: string): string {
  return pattern.replaceAll(/\{\w+\}/g, '00000000-0000-4000-8000-000000000000');
}

async function statusOf(caller: Caller, method: string, pattern: string): Promise<number> {
  const at = absent(pattern);
  if (method === 'GET') return (await caller.get(at)).status;
  if (method === 'POST') return (await caller.post(at, {})).status;
  if (method === 'PUT') return (await caller.put(at, {})).status;
  if (method === 'PATCH') return (await caller.patch(at, {})).status;
  return (await caller.delete(at)).status;
}

/** Calls that end a session or guess passwords would disturb the other tests. */
const LEFT_ALONE = new Set(['/api/account/sign-out-everywhere', '/api/session', '/api/password-resets']);
const walked = ALL_ENDPOINTS.filter(({ path: at }) => !LEFT_ALONE.has(at));

test('nobody gets past 401 without signing in, but on what is open to anyone', async () => {
  const wrong: string[] = [];
  for (const { method, path: at, action } of walked) {
    const status = await statusOf(nobody, method, at);
    const isOpen = POLICY[action].roles === 'anyone';
    if (isOpen ? status === 401 : status !== 401) wrong.push(`${method} ${at}: ${status}`);
  }
  expect(wrong).toEqual([]);
});

test.each(ROLES)(
  '%s is answered 403 on every call that is not its own, and on no other by its role',
  async (role) => {
    const caller = await signIn(role);
    const wrong: string[] = [];
    for (const { method, path: at, action } of walked) {
      const status = await statusOf(caller, method, at);
      const isAllowed = mayByRole(viewerOf(role), action);
      if (!isAllowed && status !== 403) wrong.push(`${method} ${at}: ${status}, not 403`);
      if (isAllowed && (status === 401 || status >= 500)) wrong.push(`${method} ${at}: ${status}`);
    }
    expect(wrong).toEqual([]);
  },
  60_000,
);

test('every route file answers declared calls, and every declared call has its route file', () => {
  const found: string[] = [];
  const walk = (folder: string) => {
    for (const entry of readdirSync(folder, { withFileTypes: true })) {
      if (entry.isDirectory()) walk(path.join(folder, entry.name));
      else if (entry.name === 'route.ts') found.push(`/${path.relative('app', folder)}`);
    }
  };
  walk('app/api');
  const declared = new Set(ALL_ENDPOINTS.map(({ path: at }) => at.replaceAll('{', '[').replaceAll('}', ']')));
  expect(new Set(found)).toEqual(declared);
});

test('the OpenAPI document describes every declared call', async () => {
  const response = await request(serverUrl()).get('/api/openapi.json');
  expect(response.status).toBe(200);
  const { paths } = response.body as { paths: Record<string, Record<string, unknown>> };
  for (const { method, path: at } of ALL_ENDPOINTS)
    expect(Object.keys(paths[at] ?? {})).toContain(method.toLowerCase());
});

test('a call that changes something is refused when a browser says it comes from another site', async () => {
  const caller = await signIn('prep');
  const response = await caller.post('/api/mixes/preview', {}).set('origin', 'https://elsewhere.example');
  expect(response.status).toBe(403);
  expect((response.body as { type: string }).type).toBe('/problems/foreign-origin');
});
