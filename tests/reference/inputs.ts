import { type Chance, evenChance } from '#shared/statistics/chance.ts';
import type { Fraction } from '#shared/statistics/fraction.ts';
import type { Mapping, Outcome } from './check-records.ts';

/** A third is stored as the nearest double in the check values; here it is the ratio. */
export const chanceOf = (p0: number): Chance =>
  p0 === 0.5 ? evenChance : Math.abs(p0 - 1 / 3) < 1e-15 ? { numerator: 1, denominator: 3 } : p0;

export const of =
  <I>(compute: (inputs: I) => Outcome): Mapping =>
  (inputs) =>
    compute(inputs as I);

export const fractionText = ({ numerator, denominator }: Fraction) =>
  denominator === 1n ? `${numerator}` : `${numerator}/${denominator}`;

export const pair = ({ lower, upper }: { lower: number; upper: number }) => [lower, upper];
