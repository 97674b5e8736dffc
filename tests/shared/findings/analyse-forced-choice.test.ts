import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyseForcedChoice } from '#shared/findings/analyse-forced-choice.ts';
import { forcedChoiceNullDistribution } from '#shared/findings/forced-choice-null-distribution.ts';
import type { ForcedChoiceTrial } from '#shared/findings/forced-choice-trials.ts';
import { canonicalJson } from '#shared/ledger/canonical-json.ts';
import { abxQuestion } from '#shared/methods/abx.ts';
import { registeredResult } from '#shared/methods/methods.ts';

type Choice = 'A' | 'B' | null;
const listeners = ['L01', 'L02', 'L03', 'L04'];
const choice = fc.constantFrom<Choice>('A', 'B', null);
const trialsOf = (seats: fc.Arbitrary<number>) =>
  fc.array(
    seats.chain((present) =>
      fc.record({
        truth: fc.constantFrom('A' as const, 'B' as const),
        choices: fc.array(choice, { minLength: present, maxLength: present }),
      }),
    ),
    { minLength: 1, maxLength: 24 },
  );
const study = (rows: readonly { truth: 'A' | 'B'; choices: readonly Choice[] }[]): ForcedChoiceTrial[] =>
  rows.map(({ truth, choices }, index) => ({
    session: 1,
    trial: index + 1,
    right: truth,
    answers: choices.map((given, seat) => ({ listener: listeners[seat] ?? 'L99', choice: given })),
  }));
const analyse = (trials: readonly ForcedChoiceTrial[], alpha = '0.05') =>
  analyseForcedChoice(abxQuestion, { alpha, listenersPerSession: 4, trials });

/** One listener, X always A: `right` answers A, `wrong` answers B, then nothing. */
const alone = (right: number, wrong: number, missing: number, listener = 'L01'): ForcedChoiceTrial[] =>
  Array.from({ length: right + wrong + missing }, (_, index) => ({
    session: 1,
    trial: index + 1,
    right: 'A',
    answers: [{ listener, choice: index < right ? ('A' as const) : index < right + wrong ? ('B' as const) : null }],
  }));

describe('the registered analysis', () => {
  // R: binom.test(12, 16, alternative = "greater")
  it('is the exact binomial for one listener at a time [T16]', () => {
    expect(analyse(alone(12, 4, 0))).toMatchObject({
      test: 'exact-binomial',
      p: { numerator: '2517', denominator: '65536', value: '0.0384063720703' },
      isSignificant: true,
      critical: { count: 12, attainedSize: '0.0384063720703' },
      coins: 16,
      leastAttainableP: '0.0000152587890625',
    });
  });

  it('chooses its test by the seats and not by who answered [T16]', () => {
    const silent = alone(12, 4, 0).map((trial) => ({
      ...trial,
      answers: [...trial.answers, { listener: 'L02', choice: null }],
    }));
    expect(analyse(silent)).toMatchObject({
      test: 'shared-presentations',
      critical: null,
      estimates: { basis: 'trials' },
    });
    const inTurn = [...alone(6, 2, 0), ...alone(6, 2, 0, 'L02').map((trial) => ({ ...trial, session: 2 }))];
    expect(analyse(inTurn)).toMatchObject({ test: 'exact-binomial', sessions: 2, listeners: 2, answers: 16 });
  });

  it('compares p with the level exactly: 1/16 reaches 0.0625 [T11]', () => {
    expect(analyse(alone(4, 0, 0), '0.0625')).toMatchObject({ isSignificant: true, canReachAlpha: true });
    expect(analyse(alone(4, 0, 0), '0.0624')).toMatchObject({ isSignificant: false, canReachAlpha: false });
  });

  it('leaves a group’s result alone when listeners within a trial change places [T4]', () => {
    fc.assert(
      fc.property(trialsOf(fc.integer({ min: 2, max: 4 })), (rows) => {
        const trials = study(rows);
        const turned = trials.map((trial) => ({ ...trial, answers: [...trial.answers].reverse() }));
        expect(analyse(turned)).toEqual(analyse(trials));
      }),
    );
  });

  // Under the null p must not be too small too often: over all 2^n draws, P(p <= alpha) <= alpha, answers held fixed.
  it('keeps its level over all draws, whatever the answers and the missing ones are [T16]', () => {
    fc.assert(
      fc.property(trialsOf(fc.integer({ min: 1, max: 4 })), fc.constantFrom('0.05', '0.1', '0.25'), (rows, alpha) => {
        const few = rows.slice(0, 7);
        const draws = 2 ** few.length;
        let significant = 0;
        for (let draw = 0; draw < draws; draw++) {
          const truths = few.map((row, index) => ({
            ...row,
            truth: (draw >> index) % 2 === 0 ? ('A' as const) : ('B' as const),
          }));
          if (analyse(study(truths), alpha).isSignificant) significant++;
        }
        expect(significant / draws).toBeLessThanOrEqual(Number(alpha));
      }),
      { numRuns: 25 },
    );
  });

  // R: pbinom(11, 16, 0.5, FALSE) with the two missing wrong, and not pbinom(11, 14, 0.5, FALSE) = 0.0065.
  it('counts a missing answer of one listener as wrong [T9]', () => {
    expect(analyse(alone(12, 2, 2))).toMatchObject({ answers: 16, missing: 2, correct: 12 });
    expect(analyse(alone(12, 2, 2)).p.value).toBe(analyse(alone(12, 4, 0)).p.value);
  });

  it('never gains from an answer that did not come: a wrong one in its place changes no claim [T9]', () => {
    fc.assert(
      fc.property(trialsOf(fc.constant(1)), (rows) => {
        const trials = study(rows);
        const wrong = trials.map((trial) => ({
          ...trial,
          answers: trial.answers.map((answer) => ({
            ...answer,
            choice: answer.choice ?? (trial.right === 'A' ? ('B' as const) : ('A' as const)),
          })),
        }));
        expect(analyse(trials).p).toEqual(analyse(wrong).p);
        expect(analyse(trials).correct).toBe(analyse(wrong).correct);
      }),
    );
  });

  // 2 of 16 would be "below chance" (R: pbinom(2, 16, .5) = 0.0021); with 12 silent it is 2 of 4, and no sign at all.
  it('does not take silence for swapped labels [T17]', () => {
    expect(analyse(alone(2, 14, 0))).toMatchObject({ isBelowGuessing: true, lowerTail: '0.00209045410156' });
    expect(analyse(alone(2, 2, 12))).toMatchObject({ isBelowGuessing: false, lowerTail: '0.687500000000' });
  });

  // R: binom.test(10, 16)$conf.int[1] and binom.test(12, 16)$conf.int[2]; binom.test(12, 16, alternative = "less").
  it('takes missing answers as wrong in lower limits and as right in upper ones [T17]', () => {
    const { estimates } = analyse(alone(10, 4, 2));
    expect(estimates?.correctRate).toBe('0.625000000000');
    expect(Number(estimates?.interval.lower)).toBeCloseTo(0.3543460943, 9);
    expect(Number(estimates?.interval.upper)).toBeCloseTo(0.9273379, 6);
    expect(Number(estimates?.aboveGuessing.oneSidedUpper.limit)).toBeCloseTo(0.8194951, 6);
  });

  it('gives the share above guessing and d′ by the answers with own draws, and by trials in a group [T19]', () => {
    const { estimates } = analyse(alone(12, 4, 0));
    expect(Number(estimates?.aboveGuessing.rate)).toBe(0.5);
    expect(Number(estimates?.aboveGuessing.oneSidedLower.limit)).toBeCloseTo(0.0312071578, 9);
    expect(Number(estimates?.dPrime.differencing?.dPrime)).toBeCloseTo(2.020039193, 9);
    expect(Number(estimates?.dPrime.independent?.dPrime)).toBeCloseTo(1.790434289, 9);
    expect(analyse(alone(16, 0, 0)).estimates?.dPrime.differencing).toMatchObject({
      dPrime: 'Infinity',
      upper: 'Infinity',
    });
    fc.assert(
      fc.property(trialsOf(fc.integer({ min: 2, max: 4 })), (rows) => {
        const { estimates: ofGroup, correct, answers } = analyse(study(rows));
        if (ofGroup === null) return;
        expect(ofGroup.basis).toBe('trials');
        expect(Number(ofGroup.correctRate)).toBeCloseTo(correct / answers, 10);
        expect(Number(ofGroup.interval.lower)).toBeLessThanOrEqual(Number(ofGroup.interval.upper));
      }),
    );
  });

  // R: p <- pbinom(c(9, 4) - 1, 12, 0.5, FALSE); p.adjust(p, "holm")
  it('gives each listener of a group their own exact p, adjusted for all [T18]', () => {
    const trials = Array.from({ length: 12 }, (_, index) => ({
      session: 1,
      trial: index + 1,
      right: 'B',
      answers: [
        { listener: 'L02', choice: index < 4 ? ('B' as const) : ('A' as const) },
        { listener: 'L01', choice: index < 9 ? ('B' as const) : ('A' as const) },
      ],
    }));
    expect(analyse(trials).byListener).toMatchObject([
      {
        listener: 'L01',
        answers: 12,
        correct: 9,
        p: '0.0729980468750',
        holmP: '0.145996093750',
        isAboveGuessing: false,
      },
      { listener: 'L02', answers: 12, correct: 4, p: '0.927001953125', holmP: '0.927001953125' },
    ]);
  });

  it('counts a listener who left among those adjusted for [T18]', () => {
    const left = alone(11, 1, 0).map((trial, index) =>
      index === 0 ? { ...trial, answers: [...trial.answers, { listener: 'L02', choice: null }] } : trial,
    );
    const [stayed, gone] = analyse(left).byListener;
    expect(gone).toMatchObject({ listener: 'L02', answers: 1, missing: 1, correct: 0, p: '1.00000000000' });
    expect(Number(stayed?.holmP)).toBeCloseTo(2 * Number(stayed?.p), 12);
  });

  it('is a result that the record can hold: no number that is not a whole one [T20]', () => {
    fc.assert(
      fc.property(trialsOf(fc.integer({ min: 0, max: 4 })), (rows) => {
        const result = analyse(study(rows));
        expect(registeredResult.parse(result)).toEqual(result);
        expect(() => canonicalJson(result)).not.toThrow();
      }),
    );
  });

  it('is p = 1 for a study without trials [T10]', () => {
    expect(analyse([])).toMatchObject({
      answers: 0,
      correct: 0,
      isSignificant: false,
      isBelowGuessing: false,
      canReachAlpha: false,
      estimates: null,
      byListener: [],
      p: { numerator: '1', denominator: '1', value: '1.00000000000' },
    });
  });

  it('refuses a trial that comes twice, a listener twice in one, and a level that is none [T10]', () => {
    const [first] = alone(1, 0, 0);
    if (first === undefined) throw new Error('no trial');
    expect(() => analyse([first, first])).toThrow(/session 1, trial 1 comes twice/);
    expect(() => analyse([{ ...first, answers: [...first.answers, ...first.answers] }])).toThrow(/two answers/);
    for (const alpha of ['0', '1', '5 %', '-0.05']) expect(() => analyse([first], alpha), alpha).toThrow(RangeError);
  });
});

describe('the chart of guessing', () => {
  it('adds up to one, and its tail from the count on is the registered p [T16]', () => {
    fc.assert(
      fc.property(trialsOf(fc.integer({ min: 1, max: 4 })), (rows) => {
        const trials = study(rows);
        const { correct, p } = analyse(trials);
        const bars = forcedChoiceNullDistribution(abxQuestion, trials);
        const sum = (from: number) =>
          bars.reduce((total, { count, chance }) => (count >= from ? total + chance : total), 0);
        expect(sum(0)).toBeCloseTo(1, 10);
        expect(sum(correct)).toBeCloseTo(Number(p.value), 10);
      }),
    );
  });
});
