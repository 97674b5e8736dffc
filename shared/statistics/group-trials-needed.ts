import { requireBetween, requireWhole } from './domain.ts';

const fewest = 5;

/**
 * About how many trials a simulated test needs.
 *
 * The number is doubled until the power asked for is reached, then halved in on. Simulated power is no saw to be searched
 * tooth by tooth: it carries the error of its simulation, and so does this number.
 *
 * @param powerOf the simulated power at so many trials; the same for the same number
 * @param goal    power asked for, strictly between 0 and 1
 * @param most    no more trials than these are tried, whole, at least 5
 * @returns a number that reached the power, the one before it that was tried having missed it; null where none up to the
 *   most did
 * @throws RangeError when an argument is outside its domain
 * @example groupTrialsNeeded((trials) => 1 - 0.9 ** trials, 0.8, 100) // 16: 1 - .9^15 is .794, 1 - .9^16 is .815
 */
export function groupTrialsNeeded(powerOf: (trials: number) => number, goal: number, most: number): number | null {
  requireBetween('goal', goal, 0, 1, 'open');
  requireWhole('most', most, fewest, 100_000);
  let tooFew = fewest - 1;
  let enough = fewest;
  while (powerOf(enough) < goal) {
    if (enough === most) return null;
    tooFew = enough;
    enough = Math.min(most, 2 * enough);
  }
  while (enough - tooFew > 1) {
    const middle = Math.floor((tooFew + enough) / 2);
    if (powerOf(middle) < goal) tooFew = middle;
    else enough = middle;
  }
  return enough;
}
