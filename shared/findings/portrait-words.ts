import { formatShare } from './format-probability.ts';
import type { ResultFrame } from './result-frame.ts';

/** A test by the name that stands beside its p. */
export const testWords: Record<ResultFrame['test'], string> = {
  'exact-binomial': 'exact binomial test',
  'shared-presentations': 'exact shared-presentation test',
  'fixed-different-trials': 'exact test over assignments',
};

/** Decimal text of the record as a percentage, limits rounded so that they claim less: "0.476206" as a lower one is "47 %". */
export function percentOf(decimal: string | number, rounding: 'down' | 'up' | 'nearest' = 'nearest'): string {
  return formatShare(Number(decimal), rounding).replace('%', '\u00a0%');
}

/** Why a group has no interval for its answers together. */
export const noGroupInterval =
  'No effect with an interval is given: answers to a shared presentation are not independent, and no interval for such a group is valid yet. Each listener’s own rate, with its interval, is below.';
