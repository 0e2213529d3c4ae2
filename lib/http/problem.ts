import 'server-only';
import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import { DomainError, ERRORS } from '@/lib/domain/errors';
import type { FieldError } from '@/lib/domain/errors';
import { log } from '@/lib/config/log';

/** A JSON pointer fragment from a path of keys. */
export function pointerOf(path: readonly PropertyKey[]): string {
  return `#${path.map((key) => `/${String(key).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('')}`;
}

type Issue = z.core.$ZodIssue;

/** Of the ways a value might have fitted, the one that got further than the kind of value. */
function nearestBranch(branches: readonly (readonly Issue[])[]): readonly Issue[] | undefined {
  return branches.find((issues) => issues.length > 0 && issues.every(({ path }) => path.length > 0));
}

/**
 * Every bad field of a failed parse; a refused unknown field is named itself, not its parent, and where a value
 * may be one of several kinds, the fields of the kind it is.
 */
export function fieldErrorsOf(
  error: { readonly issues: readonly Issue[] },
  prefix: readonly PropertyKey[] = [],
): FieldError[] {
  return error.issues.flatMap((issue): FieldError[] => {
    const path = [...prefix, ...issue.path];
    const branch = issue.code === 'invalid_union' ? nearestBranch(issue.errors) : undefined;
    if (branch) return fieldErrorsOf({ issues: branch }, path);
    if (issue.code === 'unrecognized_keys') {
      return issue.keys.map((key) => ({
        pointer: pointerOf([...path, key]),
        detail: 'This field is not known here.',
      }));
    }
    return [{ pointer: pointerOf(path), detail: issue.message }];
  });
}

function answer(status: number, body: object, headers: Record<string, string> = {}): Response {
  return new Response(JSON.stringify(body), {
    status,
    headers: { 'content-type': 'application/problem+json', 'cache-control': 'no-store', ...headers },
  });
}

/** The only maker of error responses (RFC 9457). Causes of a 500 are logged once, never sent. */
export function toProblem(error: unknown, requestId: string = randomUUID()): Response {
  if (error instanceof DomainError) {
    const { status, title } = ERRORS[error.code];
    const { errors, data, retryAfterSeconds } = error.extra;
    return answer(
      status,
      {
        type: `/problems/${error.code}`,
        title,
        status,
        detail: error.message,
        ...(errors ? { errors } : {}),
        ...data,
      },
      retryAfterSeconds === undefined ? {} : { 'retry-after': String(retryAfterSeconds) },
    );
  }
  log().error({ err: error, requestId }, 'unexpected failure');
  return answer(500, {
    type: '/problems/unexpected',
    title: 'Something went wrong here',
    status: 500,
    detail: 'Nothing was changed. Tell the administrator this number.',
    instance: requestId,
  });
}
