import 'server-only';
import type { Model, ModelStatic, WhereOptions } from 'sequelize';

/** Rows by their id, read in one go; empty ids are left out. */
export async function rowsById<M extends Model & { id: string }>(
  model: ModelStatic<M>,
  ids: Iterable<string | null | undefined>,
): Promise<Map<string, M>> {
  const wanted = [...new Set(ids)].filter((id): id is string => typeof id === 'string');
  if (wanted.length === 0) return new Map();
  const rows = await model.findAll({ where: { id: wanted } as unknown as WhereOptions<M['_attributes']> });
  return new Map(rows.map((row) => [row.id, row]));
}

/** Rows gathered under a key of theirs, in the order they came. */
export function groupedBy<T>(rows: readonly T[], key: (row: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const row of rows) {
    const group = groups.get(key(row));
    if (group) group.push(row);
    else groups.set(key(row), [row]);
  }
  return groups;
}
