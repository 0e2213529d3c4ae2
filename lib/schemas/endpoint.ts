import type { z } from 'zod';
import type { Action } from '@/lib/domain/policy';

/**
 * One call of the interface, declared once: the route checks with it, the browser calls with it, the
 * OpenAPI document is made from it.
 */
export interface Endpoint {
  readonly method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  /** With `{name}` for each parameter. */
  readonly path: `/api/${string}`;
  readonly action: Action;
  readonly summary: string;
  readonly params?: z.ZodType;
  readonly query?: z.ZodType;
  readonly body?: z.ZodType;
  /** `file` answers with bytes, `none` with 204, `form` takes multipart (the handler reads it). */
  readonly response: z.ZodType | 'file' | 'none';
  readonly takes?: 'json' | 'form' | 'raw';
  /** 200 unless said. */
  readonly status?: number;
  /** Largest body in bytes; 256 KiB unless said. */
  readonly maxBodyBytes?: number;
  /** What the rate limit counts it as. */
  readonly cost?: 'light' | 'heavy' | 'guess';
  /** True where the service calls the outside and so opens and closes its own transactions. */
  readonly ownTransaction?: boolean;
  /** Columns of the spreadsheet a list exports. */
  readonly columns?: readonly ListColumn[];
}

export interface ListColumn {
  readonly key: string;
  readonly header: string;
}

/** Keeps the literal types of a declaration. */
export function endpoint<const E extends Endpoint>(declaration: E): E {
  return declaration;
}

export type ParamsOf<E> = E extends { readonly params: infer S extends z.ZodType } ? z.output<S> : undefined;
export type QueryOf<E> = E extends { readonly query: infer S extends z.ZodType } ? z.output<S> : undefined;
export type QueryInputOf<E> = E extends { readonly query: infer S extends z.ZodType }
  ? z.input<S>
  : undefined;
export type BodyOf<E> = E extends { readonly body: infer S extends z.ZodType } ? z.output<S> : undefined;
export type BodyInputOf<E> = E extends { readonly body: infer S extends z.ZodType } ? z.input<S> : undefined;
export type ResponseOf<E> = E extends { readonly response: infer S extends z.ZodType }
  ? z.output<S>
  : undefined;
