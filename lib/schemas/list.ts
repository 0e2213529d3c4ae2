import { z } from 'zod';

/** What every list understands in its address; `sort` is a column, descending with a leading minus. */
export function listQuery<F extends z.ZodRawShape>(
  sortColumns: readonly string[],
  defaultSort: string,
  filters: F,
) {
  const orders = sortColumns.flatMap((column) => [column, `-${column}`]);
  return z.strictObject({
    page: z.coerce.number().int().min(1).max(100_000).default(1),
    pageSize: z.coerce.number().int().min(1).max(200).default(25),
    sort: z.enum(orders).default(defaultSort),
    search: z.string().trim().max(100).default(''),
    format: z.enum(['json', 'xlsx']).default('json'),
    ...filters,
  });
}

export function pageOf<T extends z.ZodType>(item: T) {
  return z.object({
    items: z.array(item),
    total: z.number().int(),
    page: z.number().int(),
    pageSize: z.number().int(),
  });
}

export interface Page<T> {
  readonly items: T[];
  readonly total: number;
  readonly page: number;
  readonly pageSize: number;
}
