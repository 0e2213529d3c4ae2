import request from 'supertest';
import type { Response, Test } from 'supertest';
import { ALL_ENDPOINTS } from '@/lib/schemas/all-endpoints';
import { serverUrl } from './server';

export const DEMO_PASSWORD = process.env.DEMO_PASSWORD ?? 'larkmoor-demo';

/** Somebody who calls the interface; `nobody` is not signed in. */
export interface Caller {
  get(path: string): Test;
  post(path: string, body?: object): Test;
  put(path: string, body?: object): Test;
  patch(path: string, body?: object): Test;
  delete(path: string): Test;
}

function callerWith(cookie: string | null): Caller {
  const call = (test: Test) => (cookie ? test.set('cookie', cookie) : test);
  const agent = () => request(serverUrl());
  return {
    get: (path) => call(agent().get(path)),
    post: (path, body) => call(agent().post(path)).send(body),
    put: (path, body) => call(agent().put(path)).send(body),
    patch: (path, body) => call(agent().patch(path)).send(body),
    delete: (path) => call(agent().delete(path)),
  };
}

export const nobody = callerWith(null);

/** Signs in by e-mail; a name without an at sign is a mailbox of the demo college. */
export async function signIn(mailbox: string, password = DEMO_PASSWORD): Promise<Caller> {
  const email = mailbox.includes('@') ? mailbox : `${mailbox}@larkmoor.example`;
  const response = await request(serverUrl()).post('/api/session').send({ email, password });
  if (response.status !== 200)
    throw new Error(`${email} could not sign in: ${response.status} ${response.text}`);
  const [cookie = ''] = response.get('set-cookie') ?? [];
  return callerWith(cookie.split(';')[0] ?? '');
}

interface Problem {
  readonly type: string;
  readonly status: number;
  readonly detail: string;
  readonly errors?: readonly { readonly pointer: string; readonly detail: string }[];
  readonly current?: { readonly version: number };
}

/** The body of a refused call, checked to be a problem of this status and, where given, this code. */
export function problemOf(response: Response, status: number, code?: string): Problem {
  const seen = { status: response.status, type: response.type, body: response.text.slice(0, 400) };
  expect(seen).toMatchObject({ status, type: 'application/problem+json' });
  const problem = response.body as Problem;
  if (code) expect(problem.type).toBe(`/problems/${code}`);
  expect(problem.detail).toMatch(/\w/);
  return problem;
}

/** The pointers of the fields a 422 complains of, in order. */
export function pointersOf(response: Response): string[] {
  return (problemOf(response, 422, 'invalid').errors ?? []).map(({ pointer }) => pointer).sort();
}

/**
 * The body of an answered call, checked against its declared schema: the browser reads answers with the same
 * schema, so an answer that does not fit breaks the page.
 */
export function bodyOf<T>(response: Response, status = 200): T {
  if (response.status !== status)
    throw new Error(`Expected ${status}, got ${response.status}: ${response.text.slice(0, 600)}`);
  const { method, url } = response.request;
  const { pathname } = new URL(url);
  const schema = responseSchemaOf(method, pathname);
  if (schema)
    schema.parse(response.body, {
      error: (issue) => `${method} ${pathname} answers ${issue.path?.join('.')}: ${issue.code}`,
    });
  return response.body as T;
}

function responseSchemaOf(method: string, pathname: string) {
  const parts = pathname.split('/');
  const endpoint = ALL_ENDPOINTS.filter((declared) => declared.method === method).filter(({ path }) => {
    const wanted = path.split('/');
    return (
      wanted.length === parts.length &&
      wanted.every((part, index) => part.startsWith('{') || part === parts[index])
    );
  });
  // a fixed address goes before one with a parameter, as it does in the router
  const response = endpoint.sort((a, b) => a.path.split('{').length - b.path.split('{').length)[0]?.response;
  return response === undefined || response === 'file' || response === 'none' ? null : response;
}

/** Bytes of a file answer. */
export function bytes(test: Test): Test {
  return test.buffer(true).parse((response, done) => {
    const chunks: Buffer[] = [];
    response.on('data', (chunk: Buffer) => chunks.push(chunk));
    response.on('end', () => done(null, Buffer.concat(chunks)));
  });
}
