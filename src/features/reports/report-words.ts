import { percentOf } from '#shared/findings/portrait-words.ts';
import type { RegisteredResult } from '#shared/methods/methods.ts';
import { formatNumber, withUnit } from '../../lib/format.ts';

export const sideWords: Record<RegisteredResult['alternative'], string> = {
  greater: 'one-sided',
  'two-sided': 'two-sided',
};

/** A level as a percentage: "0.05" is "5 %". */
export function levelOf(alpha: string): string {
  return withUnit(formatNumber(Number(alpha) * 100, 3), '%');
}

/** Limits of a rate, rounded so that they claim less; a dash where there are none. */
export function limitsOf(interval: { lower: number; upper: number } | null): string {
  return interval === null ? '–' : `${percentOf(interval.lower, 'down')} to ${percentOf(interval.upper, 'up')}`;
}
