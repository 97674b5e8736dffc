import { withUnit } from '../../lib/format.ts';

const prefixes = ['p', 'n', 'µ', 'm', '', 'k', 'M'] as const;
const offset = 4;

/** "41.3 mΩ", "0.917 µH": three significant digits, and the prefix that leaves the fewest zeros. */
export function siFigure(value: number, unit: string): string {
  if (value === 0) return withUnit('0', unit);
  const thousands = Math.floor(Math.log10(Math.abs(Number(value.toPrecision(3)))) / 3);
  const step = Math.min(prefixes.length - 1, Math.max(0, thousands + offset));
  return withUnit(threeDigits(value / 1000 ** (step - offset)), `${prefixes[step]}${unit}`);
}

/** "1.35", "0.000813": three significant digits. */
export function threeDigits(value: number): string {
  return value.toLocaleString('en', { minimumSignificantDigits: 3, maximumSignificantDigits: 3 });
}
