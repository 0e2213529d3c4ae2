import 'server-only';
import { stateWords } from '@/lib/domain/states';
import type { Endpoint, ListColumn, ResponseOf } from '@/lib/schemas/endpoint';
import type { Page } from '@/lib/schemas/list';
import { route } from './route';
import type { Call } from './route';
import { workbookResponse } from './workbook';

/** Most rows a spreadsheet of a list holds; a longer list is narrowed by search and filters first. */
const EXPORT_ROWS = 10_000;
const ROWS_A_READ = 200;

type ListEndpoint = Endpoint & { readonly columns: readonly ListColumn[] };

/** A list as JSON, or with `format=xlsx` the whole of it, as filtered, as a spreadsheet. */
export function listRoute<E extends ListEndpoint>(
  endpoint: E,
  list: (call: Call<E>) => Promise<ResponseOf<E>>,
) {
  return route(endpoint, async (call) => {
    const query = call.query as unknown as { format: 'json' | 'xlsx' };
    if (query.format === 'json') return list(call);
    const rows: Record<string, unknown>[] = [];
    for (let page = 1; rows.length < EXPORT_ROWS; page += 1) {
      const part = (await list({
        ...call,
        query: { ...query, page, pageSize: ROWS_A_READ },
      } as unknown as Call<E>)) as Page<Record<string, unknown>>;
      rows.push(...part.items);
      if (rows.length >= part.total || part.items.length === 0) break;
    }
    const name = endpoint.path.split('/').at(-1) ?? 'list';
    return workbookResponse(
      name,
      endpoint.columns,
      rows.map((row) => endpoint.columns.map(({ key }) => cell(row, key))),
    );
  });
}

/** The value under a dotted key, as a spreadsheet shows it. */
function cell(row: Record<string, unknown>, key: string): string | number | boolean | null {
  const value = key
    .split('.')
    .reduce<unknown>((node, part) => (node as Record<string, unknown> | null)?.[part], row);
  if (value === null || value === undefined) return null;
  if (typeof value === 'number' || typeof value === 'boolean') return value;
  if (Array.isArray(value)) return value.map(String).join(', ');
  return key === 'state' ? stateWords(String(value)) : String(value);
}
