import { useSearchParams } from 'react-router-dom';
import type { z } from 'zod';

type ListContract<Shape extends z.core.$ZodShape> = { query?: z.ZodObject<Shape, z.core.$strict> };

/**
 * What a list shows, read from the address. What is not understood there counts as not said, so that an old or
 * mistyped address still shows the list.
 */
export function readListQuery<Shape extends z.core.$ZodShape>(
  { query }: ListContract<Shape>,
  search: URLSearchParams,
): z.output<z.ZodObject<Shape, z.core.$strict>> {
  if (query === undefined) throw new Error('this contract takes no query');
  const understood = Object.entries(query.shape).flatMap(([key, schema]) => {
    const said = search.get(key);
    return said !== null && (schema as z.ZodType).safeParse(said).success ? [[key, said]] : [];
  });
  return query.parse(Object.fromEntries(understood));
}

type Change = Readonly<Record<string, string | number>>;

/** Changes what a list shows by its address: another search or filter begins at page 1; the rest stays as it is. */
export function useListAddress(): (change: Change) => void {
  const [, setSearch] = useSearchParams();
  return (change) =>
    setSearch((before) => {
      const search = new URLSearchParams(before);
      if (!('page' in change)) search.delete('page');
      for (const [key, value] of Object.entries(change)) {
        if (value === '') search.delete(key);
        else search.set(key, String(value));
      }
      return search;
    });
}

/** The address of the last page, when the one asked for lies beyond it. */
export function lastPageAddress(url: URL, { page, pages }: { page: number; pages: number }): string | null {
  if (page <= Math.max(1, pages)) return null;
  const search = new URLSearchParams(url.search);
  search.set('page', String(Math.max(1, pages)));
  return `${url.pathname}?${search}`;
}
