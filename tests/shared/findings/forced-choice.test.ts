import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyseForcedChoice } from '#shared/findings/analyse-forced-choice.ts';
import { anyDifference, differenceFinding } from '#shared/findings/difference-finding.ts';
import type { FindingContext } from '#shared/findings/finding.ts';
import { chanceOf, type ForcedChoice } from '#shared/findings/forced-choice.ts';
import { forcedChoiceNullDistribution } from '#shared/findings/forced-choice-null-distribution.ts';
import type { ForcedChoiceTrial } from '#shared/findings/forced-choice-trials.ts';
import { forcedChoiceWords } from '#shared/findings/forced-choice-words.ts';
import { abxQuestion } from '#shared/methods/abx.ts';
import { directionalQuestion } from '#shared/methods/directional-comparison.ts';
import { duoTrioQuestion } from '#shared/methods/duo-trio.ts';
import { methods, registeredResult } from '#shared/methods/methods.ts';
import { triangleQuestion } from '#shared/methods/triangle.ts';
import { sessionPlanOf } from '#shared/protocol/protocol.ts';
import { binomialLogProbability } from '#shared/statistics/binomial-log-probability.ts';
import { exactBinomialUpperTail } from '#shared/statistics/exact-binomial.ts';
import { compareFractions } from '#shared/statistics/fraction.ts';
import { planFigures } from '#shared/statistics/plan-figures.ts';
import { closedStudy } from '../../support/closed-study.ts';

const questions: [string, ForcedChoice][] = [abxQuestion, triangleQuestion, duoTrioQuestion, directionalQuestion].map(
  (question) => [question.method, question],
);
const listeners = ['L01', 'L02', 'L03', 'L04'];

const analyse = (question: ForcedChoice, trials: readonly ForcedChoiceTrial[], alpha = '0.05') =>
  analyseForcedChoice(question, { alpha, listenersPerSession: 4, trials });

/** One listener; the first label is always right. */
const alone = ({ labels }: ForcedChoice, right: number, wrong: number, missing = 0): ForcedChoiceTrial[] =>
  Array.from({ length: right + wrong + missing }, (_, index) => ({
    session: 1,
    trial: index + 1,
    right: labels[0] ?? '',
    answers: [
      { listener: 'L01', choice: index < right ? (labels[0] ?? '') : index < right + wrong ? (labels[1] ?? '') : null },
    ],
  }));

describe.each(questions)('the registered analysis of %s', (_method, question) => {
  const { labels } = question;
  const chance = chanceOf(question);
  const answers = fc.array(fc.array(fc.constantFrom(...labels, null), { minLength: 1, maxLength: 4 }), {
    minLength: 1,
    maxLength: labels.length === 2 ? 7 : 5,
  });
  const study = (rows: readonly (readonly (string | null)[])[], rightIn: (trial: number) => string) =>
    rows.map((choices, index) => ({
      session: 1,
      trial: index + 1,
      right: rightIn(index),
      answers: choices.map((choice, seat) => ({ listener: listeners[seat] ?? '', choice })),
    }));

  // Whatever the answers are, over all draws of what is right p reaches a level no more often than that level.
  it('keeps its level over all draws, answers held fixed, alone and in a group [C2]', () => {
    fc.assert(
      fc.property(answers, fc.constantFrom('0.05', '0.12', '0.34'), (rows, alpha) => {
        const draws = labels.length ** rows.length;
        let significant = 0;
        for (let draw = 0; draw < draws; draw++) {
          const rightIn = (index: number) => labels[Math.floor(draw / labels.length ** index) % labels.length] ?? '';
          if (analyse(question, study(rows, rightIn), alpha).isSignificant) significant++;
        }
        expect(significant / draws).toBeLessThanOrEqual(Number(alpha));
      }),
      { numRuns: 20 },
    );
  });

  // R: sum(dbinom(k, n, 1 / m)[pbinom(k - 1, n, 1 / m, FALSE) <= alpha]) is the size; here in whole numbers.
  it('has no size above the level at any number of answers up to 100, by enumeration [C2]', () => {
    const levels = [
      { alpha: 0.05, exact: { numerator: 1n, denominator: 20n } },
      { alpha: 0.01, exact: { numerator: 1n, denominator: 100n } },
    ];
    for (let n = 1; n <= 100; n++)
      for (const { alpha, exact } of levels) {
        let size = 0;
        for (let k = n; k >= 0; k--) {
          if (compareFractions(exactBinomialUpperTail(k, n, chance), exact) > 0) break;
          size += Math.exp(binomialLogProbability(k, n, chance));
        }
        expect(size, `${n}`).toBeLessThanOrEqual(alpha * (1 + 1e-12));
        if (n % 25 !== 0) continue;
        // The analysis itself, at the count on either side of the limit.
        const found = Array.from({ length: n + 1 }, (_, k) => k).filter(
          (k) => analyse(question, alone(question, k, n - k), String(alpha)).isSignificant,
        );
        expect(found[0]).toBe(
          analyse(question, alone(question, 0, n), String(alpha)).critical?.count ?? Number.POSITIVE_INFINITY,
        );
      }
  });

  it('takes an answer that did not come for a wrong one [T9]', () => {
    const silent = analyse(question, alone(question, 7, 3, 2));
    const wrong = analyse(question, alone(question, 7, 5));
    expect(silent).toMatchObject({ answers: 12, missing: 2, correct: 7 });
    expect(silent.p).toEqual(wrong.p);
  });

  it('draws the distribution behind its p, and is a result that the record can hold [T16] [T20]', () => {
    fc.assert(
      fc.property(answers, (rows) => {
        const trials = study(rows, (index) => labels[index % labels.length] ?? '');
        const result = analyse(question, trials);
        expect(registeredResult.parse(result)).toEqual(result);
        const bars = forcedChoiceNullDistribution(question, trials);
        const tail = bars.reduce((sum, { count, chance: of }) => (count >= result.correct ? sum + of : sum), 0);
        expect(tail).toBeCloseTo(Number(result.p.value), 10);
      }),
    );
  });

  it('refuses an answer that is none of its labels [T10]', () => {
    const [first] = alone(question, 1, 0);
    if (first === undefined) throw new Error('no trial');
    const odd = { ...first, answers: [{ listener: 'L01', choice: 'neither' }] };
    expect(() => analyse(question, [odd])).toThrow(RangeError);
  });
});

describe('a triangle', () => {
  // R: binom.test(13, 24, 1/3, alternative = "greater")$p.value = 0.0284411280955; ISO 4120, table A.1: 13 of 24 at .05.
  it('counts against one in three exactly [C2]', () => {
    const result = analyse(triangleQuestion, alone(triangleQuestion, 13, 11));
    expect(result).toMatchObject({ chance: { numerator: 1, denominator: 3 }, isSignificant: true });
    expect(Number(result.p.value)).toBeCloseTo(0.0284411280955, 11);
    expect(result.critical?.count).toBe(13);
    expect(analyse(triangleQuestion, alone(triangleQuestion, 12, 12)).isSignificant).toBe(false);
  });

  // 1/9 is no decimal: at level 0.1111111111111111 it lies above, and only exact fractions say so.
  it('compares 1/9 with a level without rounding [T11]', () => {
    const two = alone(triangleQuestion, 2, 0);
    expect(analyse(triangleQuestion, two, '0.1111111111111111').isSignificant).toBe(false);
    expect(analyse(triangleQuestion, two, '0.1111111111111112').isSignificant).toBe(true);
  });

  // Abbott: 12 of 18 right is (2/3 - 1/3) / (2/3) = 1/2 above guessing.
  it('states the share above guessing from one in three [T13]', () => {
    const { estimates } = analyse(triangleQuestion, alone(triangleQuestion, 12, 6));
    expect(Number(estimates?.aboveGuessing.rate)).toBeCloseTo(0.5, 11);
  });

  // R: pbinom(9, 18, c(1/3, 7/15, .6, 11/15), lower.tail = FALSE) is 0.0433480661886 0.300933176680 ...; with 10 the smallest at .05.
  it('is planned at its own chance: number to reach, power, least p and fittings [T22]', () => {
    const figures = planFigures({
      ...{ sessions: 1, trials: 18, alpha: '0.05', test: methods.triangle.planned, listeners: 1 },
      ...{ presentationsPerTrial: methods.triangle.presentations.length, changeMs: 30_000, listenMs: 20_000 },
      ...{ answerMs: 15_000, resetMs: 0, breaks: null },
    });
    expect(figures.chance).toBeCloseTo(1 / 3, 15);
    expect(figures.critical?.count).toBe(10);
    expect(figures.critical?.attainedSize).toBeCloseTo(0.0433480661886, 11);
    expect(methods.triangle.planned.rates.map((rate) => Number(rate.toFixed(4)))).toEqual([0.4667, 0.6, 0.7333]);
    expect(figures.leastPDenominator).toBe(3n ** 18n);
    expect(figures.session.fittings).toBe(56);
  });

  it('speaks in the rows of every method with a right answer [T8]', () => {
    const context: FindingContext = {
      cables: ['Northern run', 'Southern run'],
      gate: { commitmentsHold: true, allTrialsAccounted: true, isBlind: true },
      endedEarly: null,
      setting: 'player, amplifier, loudspeakers',
    };
    const row = (right: number) =>
      differenceFinding(analyse(triangleQuestion, alone(triangleQuestion, right, 30 - right)), context, {
        ...forcedChoiceWords,
        ...anyDifference,
      });
    expect(row(16)).toMatchObject({
      row: '2',
      headline: 'One listener told Northern run from Southern run more often than guessing allows.',
    });
    expect(row(12).row).toBe('5');
    expect(row(2).row).toBe('1');
  });
});

describe('a directional comparison', () => {
  const context: FindingContext = {
    cables: ['Northern run', 'Southern run'],
    gate: { commitmentsHold: true, allTrialsAccounted: true, isBlind: true },
    endedEarly: null,
    setting: 'player, amplifier, loudspeakers',
  };
  const method = methods['directional-comparison'];
  const result = (right: number) =>
    analyseForcedChoice(directionalQuestion, {
      alpha: '0.05',
      listenersPerSession: 1,
      attribute: 'bass',
      trials: alone(directionalQuestion, right, 20 - right),
    });

  it('seals its direction with the analysis, and asks for more of its attribute [C4]', () => {
    expect(method.registered({ attribute: 'bass' })).toEqual({
      name: 'directional-comparison/1',
      alternative: 'greater',
      missing: 'counted as wrong',
      direction: 'more in the first cable',
    });
    expect(method.question({ attribute: 'bass' })).toBe('Which one had more bass?');
    expect(result(15).attribute).toBe('bass');
  });

  it('lets a session know the attribute and not the direction [C4]', () => {
    const { protocol } = closedStudy(1, 'abx');
    const sealed = {
      ...protocol,
      method: 'directional-comparison',
      design: { ...protocol.design, attribute: 'bass' },
      analysis: { ...protocol.analysis, ...method.registered({ attribute: 'bass' }) },
    };
    const plan = sessionPlanOf(sealed);
    expect(plan.attribute).toBe('bass');
    expect(JSON.stringify(plan)).not.toMatch(/first cable|direction":|Northern|Southern/);
  });

  // R: binom.test(15, 20, alternative = "greater")$p.value = 0.02069
  it('finds more of it in the first cable alone [C4]', () => {
    expect(method.finding(result(15), context)).toMatchObject({
      row: '2',
      headline: 'One listener found more bass in Northern run than in Southern run more often than guessing allows.',
    });
    expect(method.finding(result(10), context).headline).toBe(
      'Inconclusive. The test did not detect more bass in Northern run than in Southern run, and does not exclude it.',
    );
    const reversed = method.finding(result(3), context);
    expect(reversed).toMatchObject({ row: '1', maySay: null });
    expect(reversed.modifiers.join(' ')).toContain('that the other cable has more of it is no finding');
  });
});
