import { formatShare } from '#shared/findings/format-probability.ts';
import type { RegisteredResult } from '#shared/findings/registered-result.ts';
import { formatNumber, withUnit } from '../../lib/format.ts';

/** A test by the name that stands beside its p. */
export const testWords: Record<RegisteredResult['test'], string> = {
  'exact-binomial': 'exact binomial test, one-sided',
  'shared-presentations': 'exact shared-presentation test, one-sided',
};

/** Decimal text of the record as a percentage, limits rounded so that they claim less: "0.476206" as a lower one is "47 %". */
export function percentOf(decimal: string, rounding: 'down' | 'up' | 'nearest' = 'nearest'): string {
  return formatShare(Number(decimal), rounding).replace('%', '\u00a0%');
}

/** A level as a percentage: "0.05" is "5 %". */
export function levelOf(alpha: string): string {
  return withUnit(formatNumber(Number(alpha) * 100, 3), '%');
}
