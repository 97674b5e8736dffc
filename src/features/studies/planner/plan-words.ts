import { formatNumber, withUnit } from '../../../lib/format.ts';

/** A share as a percentage with as many figures as say something: 0.0384 is "3.8 %", 0.833 is "83 %". */
export function percent(share: number): string {
  const value = share * 100;
  if (value > 0 && value < 0.1) return withUnit(String(Number(value.toPrecision(2))), '%');
  return withUnit(formatNumber(value, value < 10 ? 1 : 0), '%');
}

/** A power as a percentage that promises neither all nor nothing. */
export function powerPercent(power: number): string {
  if (power > 0.99 && power < 1) return `> ${withUnit('99', '%')}`;
  if (power > 0 && power < 0.01) return `< ${withUnit('1', '%')}`;
  return withUnit(formatNumber(power * 100), '%');
}
