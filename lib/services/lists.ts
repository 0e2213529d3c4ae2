import 'server-only';
import { Op } from 'sequelize';
import type { FindAndCountOptions, ModelStatic, Model, Order, WhereOptions } from 'sequelize';
import type { Page } from '@/lib/schemas/list';

/** Sequelize's order from `name` or `-name`; the id decides between equals, so that pages don't overlap. */
export function orderOf(
  sort: string,
  columns: Readonly<Record<string, string | readonly string[]>> = {},
): Order {
  const isDescending = sort.startsWith('-');
  const name = isDescending ? sort.slice(1) : sort;
  const path = columns[name] ?? name;
  const direction = isDescending ? 'DESC' : 'ASC';
  return [[...(typeof path === 'string' ? [path] : path), direction] as never, ['id', 'ASC']];
}

/** Text anywhere in the column. A typed wildcard stands for any one letter, itself included. */
export function contains(column: string, text: string): WhereOptions {
  return { [column]: { [Op.like]: `%${text.replaceAll(/[\\%]/g, '_')}%` } };
}

interface Paging {
  readonly page: number;
  readonly pageSize: number;
}

/** One page of a table, each row turned into what is sent. */
export async function pageOfRows<M extends Model, T>(
  model: ModelStatic<M>,
  paging: Paging,
  options: Omit<FindAndCountOptions<M['_attributes']>, 'limit' | 'offset' | 'group'>,
  present: (row: M) => T,
): Promise<Page<T>> {
  const { page, pageSize } = paging;
  const { rows, count } = await model.findAndCountAll({
    ...options,
    limit: pageSize,
    offset: (page - 1) * pageSize,
    distinct: true,
  } as FindAndCountOptions<M['_attributes']>);
  return { items: rows.map(present), total: count, page, pageSize };
}
