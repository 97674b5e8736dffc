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
