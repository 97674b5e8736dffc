import { z } from 'zod';

/** What every growing list takes: search words, a page from 1, and the fixed page size. */
export const pageSize = 25;
export const listQuery = z.strictObject({
  q: z.string().trim().max(80, 'At most 80 characters').default(''),
  page: z.coerce.number<string>().int().min(1).max(10_000).default(1),
});

/** A column to sort by, ascending; with a minus before it, descending. */
export type SortWord<Key extends string> = Key | `-${Key}`;

/** The columns that a list sorts by, and how it is sorted when nobody says. */
export function sortBy<const Key extends string>(keys: readonly Key[], standard: SortWord<NoInfer<Key>>) {
  const words = keys.flatMap((key): SortWord<Key>[] => [key, `-${key}`]);
  return z.enum(words as [SortWord<Key>, ...SortWord<Key>[]]).default(standard as never);
}

/** One page of a list. */
export function pageOf<T extends z.ZodType>(row: T) {
  return z.strictObject({ rows: z.array(row), total: z.int(), page: z.int(), pages: z.int() });
}
