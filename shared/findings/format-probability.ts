import { requireBetween } from '../statistics/domain.ts';

/** Below this a probability says nothing more about a listening test; it is shown as "less than". */
const smallestShown = 1e-12;

/**
 * A probability as it is shown to people; never "0", never "1" unless it is one.
 *
 * Four decimals from 0.001 up, two significant figures below, "< 1e-12" at the far end.
 *
 * @param p probability, 0 ... 1; 0 stands for one too small for a double
 * @returns "0.0384", "0.00056", "1.5e-5", "< 1e-12", "> 0.9999" or "1"
 * @throws RangeError when p is outside 0 ... 1
 * @example formatProbability(2517 / 65536) // "0.0384"
 */
export function formatProbability(p: number): string {
  requireBetween('p', p, 0, 1, 'closed');
  if (p < smallestShown) return '< 1e-12';
  if (p === 1) return '1';
  if (p > 0.99995) return '> 0.9999';
  if (p >= 0.001) return p.toFixed(4);
  return p >= 0.0001 ? p.toPrecision(2) : p.toExponential(1);
}

/**
 * "p = 0.0384" or "p < 1e-12", with as many figures as it takes to see on which side of the level it lies: 0.05004 is
 * not shown as 0.0500 beside a level of 0.05.
 *
 * @param p     probability, 0 ... 1
 * @param level the level it is compared with, strictly between 0 and 1
 * @returns an equation or inequality
 * @throws RangeError when an argument is outside its domain
 * @example equationOfP(0.05004, 0.05) // "p = 0.05004"
 */
export function equationOfP(p: number, level: number): string {
  requireBetween('level', level, 0, 1, 'open');
  const text = formatProbability(p);
  if (text.startsWith('<') || text.startsWith('>')) return `p ${text}`;
  if (isSameSide(text, p, level)) return `p = ${text}`;
  for (let figures = 4; figures < 17; figures++) {
    const longer = p.toPrecision(figures);
    if (isSameSide(longer, p, level)) return `p = ${longer}`;
  }
  return `p = ${p}`;
}

function isSameSide(text: string, p: number, level: number): boolean {
  return Math.sign(Number(text) - level) === Math.sign(p - level);
}

/**
 * A share as a whole percentage, rounded in the direction that claims less.
 *
 * @param share    0 ... 1
 * @param rounding 'down' for a lower limit, 'up' for an upper limit, 'nearest' for an estimate
 * @returns "36%"
 * @throws RangeError when the share is outside 0 ... 1
 * @example formatShare(0.3512, 'up') // "36%"
 */
export function formatShare(share: number, rounding: 'down' | 'up' | 'nearest'): string {
  requireBetween('share', share, 0, 1, 'closed');
  const percent = share * 100;
  // A share such as 0.55 may come out a hair above 55; that hair is no reason to go up by one.
  if (rounding === 'up') return `${Math.ceil(percent - 1e-9)}%`;
  return `${rounding === 'down' ? Math.floor(percent + 1e-9) : Math.round(percent)}%`;
}
