/** Every expected failure has a code; one table maps it to an answer. */
export const ERRORS = {
  malformed: { status: 400, title: 'The body is not JSON' },
  'not-signed-in': { status: 401, title: 'Not signed in' },
  'wrong-password': { status: 401, title: 'E-mail or password not recognised' },
  forbidden: { status: 403, title: 'Not allowed' },
  'foreign-origin': { status: 403, title: 'Request from another site' },
  'not-found': { status: 404, title: 'Not found' },
  conflict: { status: 409, title: 'Changed meanwhile' },
  'wrong-state': { status: 409, title: 'Not possible in this state' },
  'not-enough': { status: 409, title: 'Not enough in stock' },
  'too-large': { status: 413, title: 'Too large' },
  'unsupported-type': { status: 415, title: 'Content type not accepted' },
  invalid: { status: 422, title: 'Some fields need attention' },
  'not-converged': { status: 422, title: 'No equilibrium was found' },
  'locked-out': { status: 429, title: 'Locked for a while' },
  'too-many-requests': { status: 429, title: 'Too many requests' },
  unavailable: { status: 503, title: 'Service not reachable' },
} as const satisfies Record<string, { status: number; title: string }>;

export type ErrorCode = keyof typeof ERRORS;

/** One bad field; `pointer` is a JSON pointer fragment such as `#/portions/0/volumeMl`. */
export interface FieldError {
  readonly pointer: string;
  readonly detail: string;
}

/** An expected failure. Anything else that is thrown is a programming mistake. */
export class DomainError extends Error {
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly extra: {
      readonly errors?: readonly FieldError[];
      readonly data?: Readonly<Record<string, unknown>>;
      readonly retryAfterSeconds?: number;
      readonly cause?: unknown;
    } = {},
  ) {
    super(message, extra.cause === undefined ? undefined : { cause: extra.cause });
    this.name = 'DomainError';
  }
}

/** Shorthand for one or more bad fields. */
export function invalid(errors: readonly FieldError[], message = 'Some fields need attention.'): DomainError {
  return new DomainError('invalid', message, { errors });
}
