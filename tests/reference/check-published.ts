import type { Line, Pending } from './check-records.ts';

/** A value as printed somewhere, and whether the exact one agrees with it within tol. */
export interface PublishedCheck {
  readonly topic: string;
  readonly citation: string;
  readonly item: string;
  readonly published: number | null;
  readonly computed: number | null;
  readonly tol: number;
  readonly agrees: boolean;
}

/** The value of one printed item, computed here; undefined when the item is of a kind without a function. */
export type PublishedValue = (check: PublishedCheck) => number | null | undefined;

/** How far a value may lie from the exact one that stands beside the printed one. */
const exactness = 1e-9;

/**
 * Compares printed values with what shared/ computes, topic by topic: the value must be the exact one beside it, and
 * agree with the printed one just where the check says that it does.
 */
export function checkPublished(
  checks: readonly PublishedCheck[],
  values: { readonly [topic: string]: PublishedValue },
  pending: Pending,
): Line[] {
  const topics = [...new Set(checks.map(({ topic }) => topic))];
  return topics.map((topic) => {
    const about = checks.filter((check) => check.topic === topic);
    const fn = `published: ${topic}`;
    const reason = pending.functions[fn];
    const value = values[topic];
    const line = {
      fn,
      cases: about.length,
      largestError: 0,
      isCompared: value !== undefined,
      failures: [] as string[],
      pending: [] as string[],
    };
    if (value === undefined) {
      if (reason === undefined) line.failures.push(`${fn}: no function here, and not pending`);
      else line.pending.push(reason);
      return line;
    }
    for (const check of about) {
      const where = `${topic}, ${check.item}`;
      const found = tried(() => value(check));
      const waits = pending.records[where];
      if (found === undefined && waits !== undefined) {
        line.pending.push(`${check.item}: ${waits}`);
        continue;
      }
      const error = errorOf(found, check.computed);
      const isNear = isWithin(found, check.published, check.tol);
      if (!(error <= exactness) || isNear !== check.agrees) line.failures.push(`${where}: ${found} here`);
      else line.largestError = Math.max(line.largestError, error);
    }
    return line;
  });
}

/** A value that is refused is a fault of the mapping and reported as NaN, which agrees with nothing. */
function tried(value: () => number | null | undefined): number | null | undefined {
  try {
    return value();
  } catch (error) {
    if (error instanceof RangeError) return Number.NaN;
    throw error;
  }
}

function errorOf(found: number | null | undefined, computed: number | null): number {
  if (found === null || computed === null || found === undefined) return found === computed ? 0 : Infinity;
  return Math.abs(found - computed) / Math.max(Math.abs(computed), 1e-300);
}

function isWithin(found: number | null | undefined, published: number | null, tol: number): boolean {
  if (found === null || published === null || found === undefined) return found === published;
  return Math.abs(found - published) <= tol;
}
