import { chanceAsNumbers } from './chance.ts';
import { requireBetween } from './domain.ts';
import type { PlannedTest } from './planned-test.ts';

export interface PowerPoint {
  readonly trials: number;
  readonly power: number;
}

/** What the chance of finding an effect does as trials are added. */
export interface PowerCurve {
  /** From the fewest trials to the most that are worth drawing, the first and the safe number among them. */
  readonly points: readonly PowerPoint[];
  /** Fewer trials than planned that find it clearly more often, at the top of their tooth; null where none do. */
  readonly stronger: PowerPoint | null;
}

export interface CurveQuestion {
  /** Planned over all sessions, whole, at least 1. */
  readonly trials: number;
  readonly alpha: number;
  readonly rate: number;
  readonly nFirst: number | null;
  readonly nSafe: number | null;
}

const leastTrials = 5;
const leastEnd = 60;
const mostPoints = 250;
/** One percentage point: less than that is no reason to change a plan. */
const clearly = 0.01;

/**
 * The saw of power over the number of trials, as far as it is worth looking at.
 *
 * It ends some way beyond the safe number of trials; a plan far beyond that lies where nothing happens any more. Numbers
 * are thinned out where there are more than a chart can show, but for the planned, the first and the safe one.
 *
 * @param test     the planned test
 * @param question what is planned, and the rate to be found
 * @returns points in ascending order, each with its exact power
 * @example plannedPowerCurve(oneSidedPlan(evenChance), { trials: 20, alpha: 0.05, rate: 0.6, nFirst: 158, nSafe: 169 })
 *   // stronger { trials: 18, power: 0.2088 }: 20 trials give 0.1256 ; R: 1 - pbinom(c(12, 14), c(18, 20), .6)
 * @see power for the reason why it saws
 */
export function plannedPowerCurve(test: PlannedTest, question: CurveQuestion): PowerCurve {
  const { trials, alpha, rate, nFirst, nSafe } = question;
  const end = endOf(question, test.searchedTo);
  const step = Math.ceil((end - leastTrials) / mostPoints);
  const numbers = new Set([trials, nFirst, nSafe].filter((number) => number !== null && number <= end));
  for (let number = leastTrials; number <= end; number += step) numbers.add(number);
  const points = [...numbers]
    .filter((number) => number !== null)
    .sort((a, b) => a - b)
    .map((number) => ({ trials: number, power: test.power(number, alpha, rate) }));
  return { points, stronger: strongerThan(points, trials) };
}

function endOf({ trials, nSafe }: CurveQuestion, searchedTo: number): number {
  if (nSafe === null) return Math.min(searchedTo, Math.max(leastEnd, Math.ceil(trials * 1.35)));
  const wanted = Math.max(leastEnd, Math.ceil(nSafe * 1.35), Math.ceil(trials * 1.1));
  return Math.min(searchedTo, wanted, Math.max(leastEnd, nSafe * 3));
}

function strongerThan(points: readonly PowerPoint[], planned: number): PowerPoint | null {
  const own = points.find(({ trials }) => trials === planned);
  if (own === undefined) return null;
  const best = points
    .filter(({ trials }) => trials < planned)
    .reduce<PowerPoint | null>((found, point) => (found === null || point.power > found.power ? point : found), null);
  return best !== null && best.power > own.power + clearly ? best : null;
}

/** Halvings after which a rate is known far better than it is shown. */
const halvings = 24;

/**
 * The smallest rate above guessing that a planned test finds with the power asked for, whatever the test.
 *
 * @param test        the planned test
 * @param trials      over all sessions, whole, at least 1
 * @param alpha       level, strictly between 0 and 1
 * @param targetPower strictly between 0 and 1
 * @returns the rate, right to 1e-6; null where even a rate close to 1 is not found so often
 * @throws RangeError when an argument is outside its domain
 * @example plannedDetectableRate(oneSidedPlan(evenChance), 16, 0.05, 0.8) // 0.8006, as detectableRate
 * @see detectableRate for the one-sided binomial test alone
 */
export function plannedDetectableRate(
  test: PlannedTest,
  trials: number,
  alpha: number,
  targetPower: number,
): number | null {
  requireBetween('targetPower', targetPower, 0, 1, 'open');
  let low = chanceAsNumbers(test.guessing).right;
  let high = 1 - 1e-7;
  if (test.power(trials, alpha, high) < targetPower) return null;
  for (let halving = 0; halving < halvings; halving += 1) {
    const middle = low + (high - low) / 2;
    if (test.power(trials, alpha, middle) < targetPower) low = middle;
    else high = middle;
  }
  return high;
}
