import { type Finding, type FindingContext, notKept } from './finding.ts';

/** A result and what it was found about. */
export interface Found<R> {
  readonly result: R;
  readonly context: FindingContext;
}

/**
 * A row of a table of findings: when it holds, its one headline, what modifies that, and what it licenses to say.
 * Rows are asked in their order; the first that applies is the finding.
 */
export interface FindingRow<R> {
  readonly row: string;
  applies(found: Found<R>): boolean;
  headline(found: Found<R>): string;
  modifiers(found: Found<R>): string[];
  /** The sentence for use outside, or null when nothing may be said. */
  maySay(found: Found<R>): string | null;
}

/**
 * The finding's row: row 0 before every other, which ask the numbers; then the first of the table that applies.
 *
 * @throws RangeError when no row applies, so that the table has a gap
 */
export function firstRow<R>(
  rows: readonly FindingRow<R>[],
  found: Found<R>,
): Pick<Finding, 'row' | 'headline' | 'modifiers' | 'maySay'> {
  const barred = notKept(found.context);
  if (barred !== null) return { ...barred, modifiers: [] };
  const row = rows.find(({ applies }) => applies(found));
  if (row === undefined) throw new RangeError('no row of the table of findings applies to this result');
  return {
    row: row.row,
    headline: row.headline(found),
    modifiers: row.modifiers(found),
    maySay: row.maySay(found),
  };
}
