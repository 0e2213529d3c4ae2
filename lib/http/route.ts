import 'server-only';
import { createHash, randomUUID } from 'node:crypto';
import type { z } from 'zod';
import { DomainError, invalid } from '@/lib/domain/errors';
import { mayByRole } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import type { BodyOf, Endpoint, ParamsOf, QueryOf, ResponseOf } from '@/lib/schemas/endpoint';
import { plainWords } from '@/lib/schemas/plain-words';
import { once } from '@/lib/services/idempotency';
import { readJson } from './body';
import { fieldErrorsOf, toProblem } from './problem';
import { countCall } from './rate-limit';
import { refuseForeignOrigin, viewerOfRequest } from './session-cookie';

/** What a handler is given: everything checked. */
export interface Call<E extends Endpoint> {
  readonly request: Request;
  /** Null only where the policy says `anyone`. */
  readonly viewer: E['action'] extends PublicAction ? Viewer | null : Viewer;
  readonly params: ParamsOf<E>;
  readonly query: QueryOf<E>;
  readonly body: BodyOf<E>;
  readonly idempotencyKey: string | null;
}
type PublicAction =
  | 'session:sign-in'
  | 'session:read'
  | 'session:sign-out'
  | 'password:reset'
  | 'bottle:public'
  | 'health:read'
  | 'webhook:receive';

type Handle<E extends Endpoint> = (call: Call<E>) => Promise<ResponseOf<E> | Response>;
interface Context {
  readonly params: Promise<Record<string, string | string[] | undefined>>;
}

const IDEMPOTENCY_KEY = /^[\w-]{8,80}$/;

/** Makes a Next.js handler of a declared call: parse, authorise by role, call, answer. */
export function route<E extends Endpoint>(endpoint: E, handle: Handle<E>) {
  return async (request: Request, context: Context): Promise<Response> => {
    const requestId = randomUUID();
    try {
      return await answerCall(endpoint, handle, request, context);
    } catch (error) {
      return toProblem(error, requestId);
    }
  };
}

async function answerCall<E extends Endpoint>(
  endpoint: E,
  handle: Handle<E>,
  request: Request,
  context: Context,
): Promise<Response> {
  const isMutation = endpoint.method !== 'GET';
  const isWebhook = endpoint.action === 'webhook:receive';
  if (isMutation && !isWebhook) refuseForeignOrigin(request);
  const viewer = isWebhook ? null : await viewerOfRequest(request);
  const allowed = mayByRole(viewer, endpoint.action);
  if (!viewer && !allowed) throw new DomainError('not-signed-in', 'Sign in first.');
  await countCall(endpoint.cost ?? 'light', viewer?.id ?? request.headers.get('x-forwarded-for') ?? 'nobody');
  if (!allowed) throw new DomainError('forbidden', 'Your role does not allow this.');

  const params = parsePart(endpoint.params, await context.params, 'params');
  const query = parsePart(endpoint.query, queryOf(request), 'query');
  const takesJson = endpoint.body !== undefined && (endpoint.takes ?? 'json') === 'json';
  const raw = takesJson ? await readJson(request, endpoint.maxBodyBytes) : undefined;
  const body = endpoint.body && takesJson ? parseBody(endpoint.body, raw) : undefined;

  const key = request.headers.get('idempotency-key');
  if (key !== null && !IDEMPOTENCY_KEY.test(key)) {
    throw new DomainError('invalid', 'The Idempotency-Key header must have 8 to 80 letters, digits, - or _.');
  }
  const call = { request, viewer, params, query, body, idempotencyKey: key } as unknown as Call<E>;

  if (isMutation && viewer && key && !endpoint.ownTransaction && takesJson) {
    const requestHash = createHash('sha256')
      .update(JSON.stringify([params, raw]))
      .digest('hex');
    const name = `${endpoint.method} ${endpoint.path}`;
    const result = await once({ userId: viewer.id, endpoint: name, key, requestHash }, async () => {
      const value = await handle(call);
      return value instanceof Response ? null : (value ?? null);
    });
    return respond(endpoint, result as ResponseOf<E>);
  }
  return respond(endpoint, await handle(call));
}

function respond<E extends Endpoint>(endpoint: E, result: ResponseOf<E> | Response): Response {
  if (result instanceof Response) return result;
  if (endpoint.response === 'none') return new Response(null, { status: 204 });
  return Response.json(result, { status: endpoint.status ?? 200, headers: { 'cache-control': 'no-store' } });
}

function queryOf(request: Request): Record<string, string | string[]> {
  const query: Record<string, string | string[]> = {};
  for (const [key, value] of new URL(request.url).searchParams) {
    const before = query[key];
    query[key] = before === undefined ? value : [...(Array.isArray(before) ? before : [before]), value];
  }
  return query;
}

/** A parameter that can't be an id names nothing, so it is not found; a bad query is said to be one. */
function parsePart(schema: z.ZodType | undefined, value: unknown, part: 'params' | 'query'): unknown {
  if (!schema) return undefined;
  const result = schema.safeParse(value, { error: plainWords });
  if (result.success) return result.data;
  if (part === 'params') throw new DomainError('not-found', 'There is nothing at this address.');
  throw invalid(fieldErrorsOf(result.error, ['query']));
}

function parseBody(schema: z.ZodType, value: unknown): unknown {
  const result = schema.safeParse(value, { error: plainWords });
  if (result.success) return result.data;
  throw invalid(fieldErrorsOf(result.error));
}
