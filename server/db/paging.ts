import type { ObjectLiteral, SelectQueryBuilder } from 'typeorm';
import { pageSize, type SortWord } from '#shared/contracts/paging.ts';

/** What a person typed, for `like`: its own wildcards count as plain characters. */
export const likePattern = (words: string) => `%${words.replace(/[\\%_]/g, '\\$&')}%`;

/** Orders rows by the column that a word of a contract's `sortBy` names; the same order every time where values are alike. */
export function sortRows<Key extends string, T extends ObjectLiteral>(
  query: SelectQueryBuilder<T>,
  word: SortWord<Key>,
  columns: Readonly<Record<Key, string>>,
  lastly: string,
): SelectQueryBuilder<T> {
  const isDescending = word.startsWith('-');
  const key = (isDescending ? word.slice(1) : word) as Key;
  return query.orderBy(columns[key], isDescending ? 'DESC' : 'ASC').addOrderBy(lastly);
}

/** One page of a query's rows, with the total; a page beyond the last is the last. */
export async function pageOfRows<T extends ObjectLiteral>(query: SelectQueryBuilder<T>, wanted: number) {
  const total = await query.getCount();
  const pages = Math.max(1, Math.ceil(total / pageSize));
  const page = Math.min(wanted, pages);
  const rows = await query
    .skip((page - 1) * pageSize)
    .take(pageSize)
    .getMany();
  return { rows, total, page, pages };
}
