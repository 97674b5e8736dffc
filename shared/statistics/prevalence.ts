import { binomialTest } from './binomial-test.ts';
import { clopperPearsonLower } from './clopper-pearson.ts';
import { requireBetween } from './domain.ts';

export interface Prevalence {
  /** Share of listeners significant beyond what the tests' size explains, at least 0. */
  readonly estimate: number;
  /** One-sided lower limit of the share of listeners who hear a difference. */
  readonly lowerLimit: number;
  /** Chance of so many significant listeners when nobody hears anything. */
  readonly pAnyone: number;
}

/**
 * How many listeners hear a difference, at the least, when so many were significant each on their own.
 *
 * A lower bound: a listener who hears it may miss significance. There is no upper bound without a supposed power. Valid
 * where every listener has draws of their own and all were tested at the same size.
 *
 * @param significant listeners whose own test reached the level, whole, 0 ... listeners
 * @param listeners   whole, 1 ... 100000; a sample of those spoken about
 * @param size        true size of each listener's test (the attained one, not the level), strictly between 0 and 1
 * @param confidence  strictly between 0 and 1, all on one side
 * @returns estimate, lower limit, and the chance of so many by false alarms alone
 * @throws RangeError when an argument is outside its domain
 * @example prevalence(3, 12, 0.0384, 0.95) // estimate 0.2200, lower limit 0.0348, pAnyone 0.0096
 *   ; R: (qbeta(.05, 3, 10) - .0384) / (1 - .0384)
 * @see Clopper & Pearson, Biometrika 26 (1934), 404-413; Abbott, J. Economic Entomology 18 (1925), 265-267
 */
export function prevalence(significant: number, listeners: number, size: number, confidence: number): Prevalence {
  requireBetween('size', size, 0, 1, 'open');
  const beyond = (share: number) => Math.max(0, (share - size) / (1 - size));
  return {
    estimate: beyond(significant / listeners),
    lowerLimit: beyond(clopperPearsonLower(significant, listeners, confidence)),
    pAnyone: binomialTest(significant, listeners, size, 'greater').p,
  };
}
