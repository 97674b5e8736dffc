import { type Chance, chanceAsNumbers } from './chance.ts';
import { requireWhole } from './domain.ts';

/** Largest number of trials the binomial functions are checked for; beyond it they refuse. */
export const mostTrials = 100_000;

/**
 * Natural logarithm of the chance of exactly `successes` in `trials`.
 *
 * Loader's saddle-point form: the difference of factorials is replaced by three small corrections and two deviances,
 * so that nothing large is subtracted; a difference of log-gammas would lose about `trials` units in the last place.
 *
 * @param successes whole, 0 ... trials
 * @param trials    whole, 0 ... 100000; independent
 * @param chance    chance of a success on each trial, strictly between 0 and 1
 * @returns log P(X = successes), at most 0
 * @throws RangeError when an argument is outside its domain
 * @example Math.exp(binomialLogProbability(8, 16, evenChance)) // 12870/65536 = 0.1964 ; R: dbinom(8, 16, 0.5)
 * @see Loader, "Fast and accurate computation of binomial probabilities" (2000)
 */
export function binomialLogProbability(successes: number, trials: number, chance: Chance): number {
  requireWhole('trials', trials, 0, mostTrials);
  requireWhole('successes', successes, 0, trials);
  const { right, wrong } = chanceAsNumbers(chance);
  return logPoint(successes, trials, right, wrong);
}

/** The same without checks, for loops that have checked already: `right` and `wrong` add up to 1. */
export function logPoint(successes: number, trials: number, right: number, wrong: number): number {
  if (successes === 0) return logOfPower(trials, wrong, right);
  if (successes === trials) return logOfPower(trials, right, wrong);
  const failures = trials - successes;
  const corrections = stirlingError(trials) - stirlingError(successes) - stirlingError(failures);
  const deviances = deviance(successes, trials * right) + deviance(failures, trials * wrong);
  return corrections - deviances + 0.5 * Math.log(trials / (2 * Math.PI * successes * failures));
}

function logOfPower(exponent: number, base: number, complement: number): number {
  return exponent * (complement < 0.5 ? Math.log1p(-complement) : Math.log(base));
}

/** log n! minus Stirling's leading terms, for n = 1 ... 15; from the exact factorials at 40 digits. */
const stirlingErrors = [
  0, 0.08106146679532726, 0.0413406959554093, 0.02767792568499834, 0.02079067210376509, 0.016644691189821193,
  0.013876128823070748, 0.01189670994589177, 0.010411265261972096, 0.009255462182712733, 0.008330563433362871,
  0.007573675487951841, 0.00694284010720953, 0.006408994188004207, 0.0059513701127588475, 0.005554733551962801,
];

/** How far Stirling's leading terms fall short of log n!; above 15 five terms of the series reach full precision. */
function stirlingError(n: number): number {
  const tabled = stirlingErrors[n];
  if (tabled !== undefined) return tabled;
  const s = n * n;
  return (1 / 12 - (1 / 360 - (1 / 1260 - (1 / 1680 - 1 / 1188 / s) / s) / s) / s) / n;
}

/** observed * log(observed / expected) + expected - observed, by its series where the two are close. */
function deviance(observed: number, expected: number): number {
  const difference = observed - expected;
  if (Math.abs(difference) >= 0.1 * (observed + expected)) {
    return observed * Math.log(observed / expected) - difference;
  }
  const ratio = difference / (observed + expected);
  let sum = difference * ratio;
  let power = 2 * observed * ratio;
  for (let odd = 3; ; odd += 2) {
    power *= ratio * ratio;
    const next = sum + power / odd;
    if (next === sum) return sum;
    sum = next;
  }
}
