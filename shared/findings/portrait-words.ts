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

/** What an interval in a group counts, before the words on d′; nothing where every answer has a draw of its own. */
export const basisWords = ({ basis }: { basis: 'own draws' | 'trials' }): string =>
  basis === 'own draws'
    ? ''
    : 'The listeners heard the same presentations, so the interval counts trials and not answers (Student’s t over trials) and speaks of this panel alone. ';

/** Why there is no interval for the answers together. */
export const noInterval =
  'No interval is given for the answers together: trials are counted, and they were too few or all came out alike. Each listener’s own rate, with its interval, is below.';
