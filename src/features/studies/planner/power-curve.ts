import { evenChance } from '#shared/statistics/chance.ts';
import { power } from '#shared/statistics/power.ts';
import { type SampleSize, sampleSize } from '#shared/statistics/sample-size.ts';
import { twoSidedPower, twoSidedSampleSize } from '#shared/statistics/two-sided-even.ts';
import type { Plan } from './plan-of.ts';

export type PowerPoint = { trials: number; power: number };

type Level = Pick<Plan, 'alpha' | 'alternative'>;

const leastTrials = 5;
const mostPoints = 250;

/** Power at every number of trials around the planned one, thinned out where there are more than a chart can show. */
export function powerCurve({ trials, ...level }: Level & Pick<Plan, 'trials'>, rate: number): PowerPoint[] {
  const last = Math.max(60, Math.ceil(trials * 1.35));
  const step = Math.ceil((last - leastTrials) / mostPoints);
  const numbers = new Set([trials]);
  for (let number = leastTrials; number <= last; number += step) numbers.add(number);
  return [...numbers].sort((a, b) => a - b).map((number) => ({ trials: number, power: powerOf(number, level, rate) }));
}

function powerOf(trials: number, { alpha, alternative }: Level, rate: number): number {
  return alternative === 'two-sided'
    ? twoSidedPower(trials, alpha, rate).power
    : power(trials, evenChance, alpha, rate).power;
}

/** How many trials find that rate in four tests out of five. */
export function trialsNeeded({ alpha, alternative }: Level, rate: number): SampleSize {
  const asked = { alpha, targetPower: 0.8, limit: 5000 };
  return alternative === 'two-sided'
    ? twoSidedSampleSize({ ...asked, rate })
    : sampleSize({ ...asked, chance: evenChance, correctRate: rate });
}
