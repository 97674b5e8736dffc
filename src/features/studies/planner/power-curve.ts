import type { Plan } from './plan-of.ts';

export type PowerPoint = { trials: number; power: number };

const leastTrials = 5;
const mostPoints = 250;

/** Power at every number of trials around the planned one, thinned out where there are more than a chart can show. */
export function powerCurve({ trials, alpha, method }: Plan, rate: number): PowerPoint[] {
  const last = Math.max(60, Math.ceil(trials * 1.35));
  const step = Math.ceil((last - leastTrials) / mostPoints);
  const numbers = new Set([trials]);
  for (let number = leastTrials; number <= last; number += step) numbers.add(number);
  return [...numbers]
    .sort((a, b) => a - b)
    .map((number) => ({ trials: number, power: method.planned.power(number, alpha, rate) }));
}
