import { describe, expect, it } from 'vitest';
import { aboveGuessingRate, correctRateOf } from '#shared/statistics/above-guessing.ts';
import { binomialLogProbability } from '#shared/statistics/binomial-log-probability.ts';
import { binomialLogLowerTail, binomialLogUpperTail } from '#shared/statistics/binomial-tails.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { clopperPearson, clopperPearsonLower, clopperPearsonUpper } from '#shared/statistics/clopper-pearson.ts';
import { criticalCount } from '#shared/statistics/critical-count.ts';
import { abxCorrectRate, abxDPrime, abxDPrimeEstimate } from '#shared/statistics/d-prime.ts';
import { detectableRate } from '#shared/statistics/detectable-rate.ts';
import { exactBinomialUpperTail } from '#shared/statistics/exact-binomial.ts';
import { fractionToLog, fractionToNumber } from '#shared/statistics/fraction.ts';
import { holm } from '#shared/statistics/holm.ts';
import { normalQuantile } from '#shared/statistics/normal-quantile.ts';
import { normalAreaFromCentre, normalLogUpperTail, normalUpperTail } from '#shared/statistics/normal-tail.ts';
import { planFigures } from '#shared/statistics/plan-figures.ts';
import { oneSidedPlan } from '#shared/statistics/planned-test.ts';
import { power } from '#shared/statistics/power.ts';
import { sampleSize } from '#shared/statistics/sample-size.ts';
import { sharedPresentationTest } from '#shared/statistics/shared-presentation-test.ts';
import { wilsonInterval } from '#shared/statistics/wilson.ts';

const none = Number.NaN;
const sizeOf = { chance: evenChance, alpha: 0.05, correctRate: 0.7, targetPower: 0.8, limit: 1000 };
const plan = {
  sessions: 1,
  trials: 16,
  alpha: '0.05',
  listeners: 1,
  presentationsPerTrial: 3,
  test: oneSidedPlan(evenChance),
  changeMs: 30_000,
  listenMs: 20_000,
  answerMs: 15_000,
  resetMs: 0,
  breaks: null,
};

const cases: [string, () => unknown][] = [
  ['more right than trials', () => binomialTest(17, 16, evenChance, 'greater')],
  ['half a right answer', () => binomialTest(1.5, 16, evenChance, 'greater')],
  ['no trials', () => binomialTest(0, 0, evenChance, 'greater')],
  ['NaN right', () => binomialTest(none, 16, evenChance, 'greater')],
  ['too many trials', () => binomialTest(1, 100_001, evenChance, 'greater')],
  ['chance 0', () => binomialTest(1, 16, 0, 'greater')],
  ['chance 1', () => binomialTest(1, 16, { numerator: 2, denominator: 2 }, 'greater')],
  ['chance NaN', () => binomialTest(1, 16, none, 'greater')],
  ['point below 0', () => binomialLogProbability(-1, 16, evenChance)],
  ['tail beyond the empty one', () => binomialLogUpperTail(18, 16, evenChance)],
  ['tail below the empty one', () => binomialLogLowerTail(-2, 16, evenChance)],
  ['exact tail beyond the empty one', () => exactBinomialUpperTail(18, 16, evenChance)],
  ['confidence 1', () => clopperPearson(1, 16, 1)],
  ['confidence 0', () => clopperPearsonLower(1, 16, 0)],
  ['confidence NaN', () => clopperPearsonUpper(1, 16, none)],
  ['Wilson at confidence 1', () => wilsonInterval(1, 16, 1)],
  ['Wilson without trials', () => wilsonInterval(0, 0, 0.95)],
  ['level 0', () => criticalCount(16, evenChance, 0)],
  ['level NaN', () => criticalCount(16, evenChance, none)],
  ['rate 1 in power', () => power(16, evenChance, 0.05, 1)],
  ['power 1 asked for', () => detectableRate(16, evenChance, 0.05, 1)],
  ['a rate at chance', () => sampleSize({ ...sizeOf, correctRate: 0.5 })],
  ['a limit of 0', () => sampleSize({ ...sizeOf, limit: 0 })],
  ['a rate above 1', () => aboveGuessingRate(1.01, evenChance)],
  ['a share below guessing all wrong', () => correctRateOf(-1.01, evenChance)],
  ['negative d′', () => abxCorrectRate(-0.1, 'differencing')],
  ['infinite d′', () => abxCorrectRate(Number.POSITIVE_INFINITY, 'differencing')],
  ['a NaN rate', () => abxDPrime(none, 'independent')],
  ['d′ without trials', () => abxDPrimeEstimate(0, 0, 0.95, 'independent')],
  ['a negative fraction’s logarithm', () => fractionToLog({ numerator: -1n, denominator: 2n })],
  ['a denominator of 0', () => fractionToNumber({ numerator: 1n, denominator: 0n })],
  ['a p above 1', () => holm([0.5, 1.5])],
  ['a NaN p', () => holm([none])],
  ['a quantile of 0', () => normalQuantile(0)],
  ['a NaN z', () => normalUpperTail(none)],
  ['a NaN z in logs', () => normalLogUpperTail(none)],
  ['a NaN z from the centre', () => normalAreaFromCentre(none)],
  ['a truth beyond the labels', () => sharedPresentationTest([{ counts: [1, 0], truth: 2, missing: 0 }], 'greater')],
  ['one label only', () => sharedPresentationTest([{ counts: [1], truth: 0, missing: 0 }], 'greater')],
  ['a negative count', () => sharedPresentationTest([{ counts: [-1, 0], truth: 0, missing: 0 }], 'greater')],
  ['half a missing answer', () => sharedPresentationTest([{ counts: [1, 0], truth: 0, missing: 0.5 }], 'greater')],
  ['a plan without trials', () => planFigures({ ...plan, trials: 0 })],
  ['a plan at level 1', () => planFigures({ ...plan, alpha: '1' })],
  ['a plan at no level', () => planFigures({ ...plan, alpha: 'five' })],
  ['a change of negative length', () => planFigures({ ...plan, changeMs: -1 })],
  ['a break after no trial', () => planFigures({ ...plan, breaks: { everyTrials: 0, lengthMs: 1 } })],
];

describe('an argument outside its domain', () => {
  it.each(cases)('is refused and never answered with NaN: %s [T10]', (_name, call) => {
    expect(call).toThrow(RangeError);
  });
});
