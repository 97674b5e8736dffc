import { aboveGuessingRate, intervalAboveGuessing } from '../statistics/above-guessing.ts';
import { marginConfidence } from '../statistics/planned-margin.ts';
import { dPrimeAt, dPrimeLimits } from '../statistics/psychometric.ts';
import { chanceOf, type DecidingRule, type ForcedChoice } from './forced-choice.ts';
import type { RateEstimates } from './forced-choice-result.ts';
import { recordInterval } from './interval-with-missing.ts';
import type { RateLimits } from './rate-limits.ts';
import { recordDecimal, recordLimit } from './record-decimal.ts';

const confidence = 0.95;

/**
 * Rate of right answers, share above guessing and d′, with limits that suit how the draws were shared.
 *
 * Missing answers stand against whatever a limit could be used to claim: wrong for lower limits, right for upper ones.
 * With own draws the one-sided lower limit, of confidence 1 - alpha, lies above guessing when p lies below the level; the
 * one-sided upper limit has 95 %, whatever the level.
 *
 * @param rate     right answers over those due, missing ones wrong
 * @param limits   by Clopper and Pearson for own draws, by trials for a group
 * @param alpha    the registered level as a decimal
 * @param question the labels, which give the chance, and the rules by which d′ is stated
 * @returns the estimates in the form that goes on the record, without their basis
 * @throws RangeError when a count is outside its domain
 * @example 12 of 16 in ABX, alpha "0.05": rate 0.75, above guessing 0.5 (one-sided lower limit 0.0312), d′ 2.02 and 1.79
 * @see aboveGuessing, ownDrawLimits, panelLimits and dPrimeAt for the sources
 */
export function rateEstimates(
  rate: number,
  limits: RateLimits,
  alpha: string,
  question: ForcedChoice,
): Omit<RateEstimates, 'basis'> {
  const chance = chanceOf(question);
  const interval = limits.interval(confidence);
  const rawRate = aboveGuessingRate(rate, chance);
  const { raw, clipped } = intervalAboveGuessing(interval, chance);
  const lowerConfidence = 1 - Number(alpha);
  const oneSided = (held: number, limit: number) => ({
    confidence: recordDecimal(held),
    limit: recordDecimal(Math.max(0, aboveGuessingRate(limit, chance))),
  });
  return {
    correctRate: recordDecimal(rate),
    interval: recordInterval(interval),
    aboveGuessing: {
      rawRate: recordDecimal(rawRate),
      rate: recordDecimal(Math.max(0, rawRate)),
      rawInterval: recordInterval(raw),
      interval: recordInterval(clipped),
      oneSidedLower: oneSided(lowerConfidence, limits.lower(lowerConfidence)),
      oneSidedUpper: oneSided(marginConfidence, limits.upper(marginConfidence)),
    },
    dPrime: Object.fromEntries(
      Object.entries(question.rules).map(([name, rule]) => [name, sensitivity(rate, interval, rule)]),
    ),
  };
}

function sensitivity(rate: number, interval: ReturnType<RateLimits['interval']>, { psychometric }: DecidingRule) {
  const { lower, upper } = dPrimeLimits(psychometric, interval);
  return { dPrime: recordLimit(dPrimeAt(psychometric, rate)), lower: recordLimit(lower), upper: recordLimit(upper) };
}
