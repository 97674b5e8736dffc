import { aboveGuessingRate, intervalAboveGuessing } from '../statistics/above-guessing.ts';
import { clopperPearsonLower, clopperPearsonUpper, type Interval } from '../statistics/clopper-pearson.ts';
import { dPrimeAt, dPrimeLimits } from '../statistics/psychometric.ts';
import { chanceOf, type DecidingRule, type ForcedChoice } from './forced-choice.ts';
import type { PooledEstimates } from './forced-choice-result.ts';
import { limitsWithMissing, recordInterval } from './interval-with-missing.ts';
import { recordDecimal, recordLimit } from './record-decimal.ts';

/** What the registered test leaves open is stated with this confidence, whatever its level. */
const upperConfidence = 0.95;

/**
 * Rate of right answers, share above guessing and d′ of a study in which every answer has a draw of its own.
 *
 * Missing answers stand against whatever a limit could be used to claim: wrong for lower limits, right for upper ones.
 * The one-sided lower limit has confidence 1 - alpha: it lies above guessing when p lies below the level.
 *
 * @param counts right answers, missing ones and all that were due, at least 1
 * @param alpha  the registered level as a decimal
 * @param question the labels, which give the chance, and the rules by which d′ is stated
 * @returns the estimates in the form that goes on the record
 * @throws RangeError when a count is outside its domain
 * @example 12 of 16 in ABX, alpha "0.05": rate 0.75, above guessing 0.5 (one-sided lower limit 0.0312), d′ 2.02 and 1.79
 * @see aboveGuessing, clopperPearson and dPrimeAt for the sources
 */
export function pooledEstimatesOf(
  { matching, missing, answers }: { matching: number; missing: number; answers: number },
  alpha: string,
  question: ForcedChoice,
): PooledEstimates {
  const chance = chanceOf(question);
  const rate = matching / answers;
  const limits = limitsWithMissing(matching, missing, answers);
  const rawRate = aboveGuessingRate(rate, chance);
  const { raw, clipped } = intervalAboveGuessing(limits, chance);
  const lowerConfidence = 1 - Number(alpha);
  return {
    correctRate: recordDecimal(rate),
    interval: recordInterval(limits),
    aboveGuessing: {
      rawRate: recordDecimal(rawRate),
      rate: recordDecimal(Math.max(0, rawRate)),
      rawInterval: recordInterval(raw),
      interval: recordInterval(clipped),
      oneSidedLower: oneSided(lowerConfidence, clopperPearsonLower(matching, answers, lowerConfidence), chance),
      oneSidedUpper: oneSided(
        upperConfidence,
        clopperPearsonUpper(matching + missing, answers, upperConfidence),
        chance,
      ),
    },
    dPrime: Object.fromEntries(
      Object.entries(question.rules).map(([name, rule]) => [name, sensitivity(rate, limits, rule)]),
    ),
  };
}

function oneSided(
  confidence: number,
  correctRate: number,
  chance: ReturnType<typeof chanceOf>,
): { confidence: string; limit: string } {
  return {
    confidence: recordDecimal(confidence),
    limit: recordDecimal(Math.max(0, aboveGuessingRate(correctRate, chance))),
  };
}

function sensitivity(rate: number, limits: Interval, { psychometric }: DecidingRule) {
  const { lower, upper } = dPrimeLimits(psychometric, limits);
  return { dPrime: recordLimit(dPrimeAt(psychometric, rate)), lower: recordLimit(lower), upper: recordLimit(upper) };
}
