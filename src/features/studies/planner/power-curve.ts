import { evenChance } from '#shared/statistics/chance.ts';
import { power } from '#shared/statistics/power.ts';
import { type SampleSize, sampleSize } from '#shared/statistics/sample-size.ts';

export type PowerPoint = { trials: number; power: number };

const leastTrials = 5;
const mostPoints = 250;

/** Power at every number of trials around the planned one, thinned out where there are more than a chart can show. */
export function powerCurve(trials: number, alpha: number, correctRate: number): PowerPoint[] {
  const last = Math.max(60, Math.ceil(trials * 1.35));
  const step = Math.ceil((last - leastTrials) / mostPoints);
  const numbers = new Set([trials]);
  for (let number = leastTrials; number <= last; number += step) numbers.add(number);
  return [...numbers]
    .sort((a, b) => a - b)
    .map((number) => ({ trials: number, power: power(number, evenChance, alpha, correctRate).power }));
}

/** How many trials find listeners of that rate in four tests out of five. */
export function trialsNeeded(alpha: number, correctRate: number): SampleSize {
  return sampleSize({ chance: evenChance, alpha, correctRate, targetPower: 0.8, limit: 5000 });
}
