import { z } from 'zod';
import type { FieldError } from '@/lib/domain/errors';
import type { BodyInputOf, Endpoint, ParamsOf, QueryInputOf, ResponseOf } from '@/lib/schemas/endpoint';

const problemSchema = z.looseObject({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  detail: z.string().optional(),
  errors: z.array(z.object({ pointer: z.string(), detail: z.string() })).optional(),
});

/** An answer that says what is wrong. `status` 0: no answer came at all. */
export class ApiProblem extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    readonly title: string,
    readonly detail: string,
    readonly errors: readonly FieldError[],
    readonly body: Readonly<Record<string, unknown>>,
  ) {
    super(detail || title);
    this.name = 'ApiProblem';
  }
}

type Part<Name extends string, T> = [T] extends [undefined]
  ? { readonly [K in Name]?: undefined }
  : { readonly [K in Name]: T };
export type CallInput<E extends Endpoint> = Part<'params', ParamsOf<E>> &
  Part<'body', BodyInputOf<E>> & {
    readonly query?: QueryInputOf<E>;
    /** One key per intention: the same key sent twice is done once. */
    readonly idempotencyKey?: string;
    readonly signal?: AbortSignal;
  };

/** The address of a call, with its parameters and query filled in. */
export function addressOf(path: string, params: object | undefined, query: object | undefined): string {
  const filled = path.replaceAll(/\{(\w+)\}/g, (_all, name: string) =>
    encodeURIComponent(String((params as Record<string, unknown> | undefined)?.[name])),
  );
  const search = new URLSearchParams();
  for (const [key, value] of Object.entries(query ?? {})) {
    if (value !== undefined && value !== null && value !== '') search.set(key, String(value));
  }
  const text = search.toString();
  return text === '' ? filled : `${filled}?${text}`;
}

/**
 * Makes a declared call and reads its answer with the declared schema.
 * @throws ApiProblem for every answer that is not a success, and where no answer came
 */
export async function callApi<E extends Endpoint>(endpoint: E, input: CallInput<E>): Promise<ResponseOf<E>> {
  const { params, query, body, idempotencyKey, signal } = input as CallInput<Endpoint> & { body?: unknown };
  let response: Response;
  try {
    response = await fetch(addressOf(endpoint.path, params, query), {
      method: endpoint.method,
      signal,
      headers: {
        ...(body === undefined ? {} : { 'content-type': 'application/json' }),
        ...(idempotencyKey === undefined ? {} : { 'idempotency-key': idempotencyKey }),
      },
      body: body === undefined ? undefined : JSON.stringify(body),
    });
  } catch (cause) {
    if (signal?.aborted) throw cause;
    throw new ApiProblem(
      0,
      'no-connection',
      'No connection',
      'The server did not answer. What you typed is kept; try again.',
      [],
      {},
    );
  }
  if (!response.ok) throw await problemOf(response);
  if (endpoint.response === 'none' || endpoint.response === 'file') return undefined as ResponseOf<E>;
  const answer = endpoint.response.safeParse(await response.json().catch(() => undefined));
  if (answer.success) return answer.data as ResponseOf<E>;
  throw new ApiProblem(
    response.status,
    'unreadable',
    'An answer that can’t be read',
    'The server did it, but its answer could not be read. Reload the page.',
    [],
    {},
  );
}

/** Reads a failed answer; an answer that is no problem document still becomes one. */
export async function problemOf(response: Response): Promise<ApiProblem> {
  const parsed = problemSchema.safeParse(await response.json().catch(() => null));
  if (!parsed.success) {
    return new ApiProblem(
      response.status,
      'unexpected',
      'Something went wrong',
      `The server answered ${response.status}.`,
      [],
      {},
    );
  }
  const { type, title, status, detail = '', errors = [] } = parsed.data;
  return new ApiProblem(status, type.split('/').at(-1) ?? type, title, detail, errors, parsed.data);
}

/** A key for one intention, to be made when a form opens and renewed after it succeeded. */
export function newIdempotencyKey(): string {
  return crypto.randomUUID();
}
