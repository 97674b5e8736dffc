import { assignmentTest } from '#shared/statistics/assignment-test.ts';
import { clopperPearson } from '#shared/statistics/clopper-pearson.ts';
import { fractionToNumber } from '#shared/statistics/fraction.ts';
import {
  correctRateAt,
  dPrimeAt,
  dPrimeLimits,
  matchingByDistance,
  matchingByMidpoint,
  moreOfAttribute,
  oddByDistance,
  type Psychometric,
} from '#shared/statistics/psychometric.ts';
import { sameDifferentPower, sameDifferentSensitivity } from '#shared/statistics/same-different.ts';
import type { Mapping } from './check-records.ts';
import { of, pair } from './inputs.ts';

const rules: { readonly [method: string]: Psychometric } = {
  twoAFC: moreOfAttribute,
  duoTrio: matchingByDistance,
  abxDifferencing: matchingByDistance,
  abxIndependent: matchingByMidpoint,
  triangle: oddByDistance,
};

function ruleOf(method: string): Psychometric {
  const rule = rules[method];
  if (rule === undefined) throw new RangeError(`no rule for ${method}`);
  return rule;
}

/** Functions of the check values about the methods: d' and the test of same-different. */
export const methodMappings: { readonly [fn: string]: Mapping } = {
  psychometric: of<{ method: string; dPrime: number }>(({ method, dPrime }) => {
    const rule = ruleOf(method);
    return {
      relative: { pc: correctRateAt(rule, dPrime), guess: rule.chance },
      scaled: { pd: rule.aboveChance(dPrime) / (1 - rule.chance) },
    };
  }),

  dPrimeFromPc: of<{ method: string; pc: number }>(({ method, pc }) => ({
    scaled: { dPrime: dPrimeAt(ruleOf(method), pc) },
  })),

  dPrimeEstimate: of<{ method: string; k: number; n: number; conf: number }>(({ method, k, n, conf }) => ({
    scaled: {
      dPrime: dPrimeAt(ruleOf(method), k / n),
      exactInterval: pair(dPrimeLimits(ruleOf(method), clopperPearson(k, n, conf))),
    },
  })),

  sameDifferentDifferencing: of<{
    sameAnswersOnSame: number;
    differentAnswersOnSame: number;
    sameAnswersOnDifferent: number;
    differentAnswersOnDifferent: number;
  }>((counts) => {
    const hits = counts.differentAnswersOnDifferent;
    const falseAlarms = counts.differentAnswersOnSame;
    const { dPrime, criterion } = sameDifferentSensitivity(
      { count: hits, trials: hits + counts.sameAnswersOnDifferent },
      { count: falseAlarms, trials: falseAlarms + counts.sameAnswersOnSame },
    );
    return { scaled: { dPrime, tau: criterion } };
  }),

  assignmentTest: of<{ different: number[]; isDifferent: number[] }>(({ different, isDifferent }) => {
    const trials = different.map((count, index) => ({ different: count, isDifferent: isDifferent[index] === 1 }));
    const { hits, upperTail, lowerTail, assignments } = assignmentTest(trials);
    return {
      exact: { hits, assignments: Number(assignments) },
      relative: { upper: fractionToNumber(upperTail), lower: fractionToNumber(lowerTail) },
    };
  }),

  sameDifferentPower: of<{ trials: number; alpha: number; hitRate: number }>(({ trials, alpha, hitRate }) => ({
    relative: { power: sameDifferentPower(trials, alpha, hitRate) },
  })),
};
