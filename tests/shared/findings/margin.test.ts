import { describe, expect, it } from 'vitest';
import { analyseForcedChoice } from '#shared/findings/analyse-forced-choice.ts';
import { analysePreference } from '#shared/findings/analyse-preference.ts';
import type { FindingContext } from '#shared/findings/finding.ts';
import type { ForcedChoiceTrial } from '#shared/findings/forced-choice-trials.ts';
import { abx, abxQuestion } from '#shared/methods/abx.ts';
import { pairedPreference } from '#shared/methods/paired-preference.ts';
import { triangle } from '#shared/methods/triangle.ts';

const context: FindingContext = {
  cables: ['Northern run', 'Southern run'],
  gate: { commitmentsHold: true, allTrialsAccounted: true, isBlind: true },
  endedEarly: null,
  setting: 'player, amplifier, loudspeakers',
};

/** Right and wrong spread over the trials as evenly as they go, so that no check is flagged. */
const isRightAt = (index: number, right: number, of: number) =>
  Math.floor(((index + 1) * right) / of) > Math.floor((index * right) / of);

function alone(right: number, of: number, missing = 0, seat = 1): ForcedChoiceTrial[] {
  return Array.from({ length: of }, (_, index) => {
    const truth = index % 2 === 0 ? 'A' : 'B';
    const other = truth === 'A' ? 'B' : 'A';
    const choice = index >= of - missing ? null : isRightAt(index, right, of - missing) ? truth : other;
    return { session: seat, trial: index + 1, right: truth, answers: [{ listener: `L0${seat}`, choice }] };
  });
}

const analyse = (trials: readonly ForcedChoiceTrial[], more: { margin?: string; samplingFrame?: string } = {}) =>
  analyseForcedChoice(abxQuestion, { alpha: '0.05', listenersPerSession: 1, trials, ...more });
const found = (trials: readonly ForcedChoiceTrial[], more: { margin?: string; samplingFrame?: string } = {}) =>
  abx.finding(analyse(trials, more), context);

describe('a registered margin', () => {
  // R: pbinom(51, 100, .6) = 0.0423, pbinom(52, 100, .6) = 0.0638
  it('is kept by so many right that the exact test at the margin reaches 5 %, and no more [T37]', () => {
    expect(analyse(alone(51, 100), { margin: '0.2' }).margin).toMatchObject({ isBelow: true, share: '0.200000000000' });
    expect(analyse(alone(52, 100), { margin: '0.2' }).margin?.isBelow).toBe(false);
    expect(analyse(alone(51, 100)).margin).toBeUndefined();
  });

  it('reads silence as right against the margin and as wrong in the test for a difference [T37]', () => {
    const silent = analyse(alone(48, 100, 4), { margin: '0.2' });
    expect(silent).toMatchObject({ correct: 48, missing: 4, margin: { isBelow: false } });
    expect(silent.missingAnswers).toBe('counted as wrong, as right against the margin');
    expect(analyse(alone(48, 100), { margin: '0.2' }).margin?.isBelow).toBe(true);
  });

  it('makes row 4 of a null, row 3 of a small difference, and leaves rows 2 and 5 with a word [T37]', () => {
    const null4 = found(alone(50, 100), { margin: '0.2' });
    expect(null4.row).toBe('4');
    expect(null4.headline).toBe(
      'The share of answers above guessing is below 20%, with 95% confidence under these conditions.',
    );
    expect(null4.maySay).toContain('were not told apart within the registered margin');
    // R: pbinom(539, 1000, .5, FALSE) = 0.0062; pbinom(540, 1000, .6) = 6.8e-5
    const small = found(alone(540, 1000), { margin: '0.2' });
    expect(small.row).toBe('3');
    expect(small.headline).toMatch(/^A difference was detected, and it is small\. One listener told/);
    const large = found(alone(12, 16), { margin: '0.2' });
    expect(large.row).toBe('2');
    expect(large.modifiers).toContain('It was not shown that the share of answers above guessing is below 20%.');
    const open = found(alone(8, 16), { margin: '0.2' });
    expect(open.row).toBe('5');
    expect(open.modifiers).toContain('It was not shown that the share of answers above guessing is below 20%.');
  });

  it('never comes of a test that found nothing without one [T37]', () => {
    for (let right = 0; right <= 200; right += 1) expect(['1', '2', '5']).toContain(found(alone(right, 200)).row);
  });

  it('counts trials where listeners heard the same, and speaks of their average [T37]', () => {
    const panel = (trials: number) =>
      Array.from({ length: trials }, (_, index): ForcedChoiceTrial => {
        const truth = index % 2 === 0 ? 'A' : 'B';
        const other = truth === 'A' ? 'B' : 'A';
        return {
          session: 1,
          trial: index + 1,
          right: truth,
          answers: Array.from({ length: 4 }, (_unused, seat) => ({
            listener: `L0${seat + 1}`,
            choice: seat < 2 === index % 4 < 2 || (seat === 3 && index % 3 === 0) ? truth : other,
          })),
        };
      });
    const result = analyse(panel(60), { margin: '0.4' });
    const upper = Number(result.estimates?.aboveGuessing.oneSidedUpper.limit);
    expect(result.margin?.isBelow).toBe(upper < 0.4);
    const one = found(panel(60), { margin: '0.4' });
    expect(one.headline).toContain('on the average over this panel’s answers');
  });

  it('is a third above guessing in a triangle as elsewhere [T37]', () => {
    const registered = triangle.registered({ marginPercent: 30 });
    expect(registered).toMatchObject({ margin: '0.3', missing: 'counted as wrong, as right against the margin' });
  });

  it('about one half counts people, each by their own majority [T37]', () => {
    const people = (forFirst: number, of: number) =>
      analysePreference({
        alpha: '0.05',
        listenersPerSession: 1,
        offersNoPreference: false,
        margin: '0.2',
        trials: Array.from({ length: of }, (_, index) => ({
          session: index + 1,
          trial: 1,
          truth: index % 2 === 0 ? ('first' as const) : ('second' as const),
          answers: [
            {
              listener: `L${String(index + 1).padStart(2, '0')}`,
              choice: index < forFirst === (index % 2 === 0) ? ('first' as const) : ('second' as const),
            },
          ],
        })),
      });
    // R: pbinom(16, 30, .7) = 0.0401, pbinom(17, 30, .7) = 0.0845
    expect(people(16, 30).margin?.isWithin).toBe(true);
    expect(people(14, 30).margin?.isWithin).toBe(true);
    expect(people(17, 30).margin?.isWithin).toBe(false);
    const one = pairedPreference.finding(people(15, 30), context);
    expect(one.row).toBe('11');
    expect(one.headline).toBe(
      'The share of people who prefer either cable lies between 30% and 70%, with 95% confidence.',
    );
    expect(one.mustNotSay).toContain('that both are liked equally');
    expect(pairedPreference.finding(people(26, 30), context).row).toBe('10');
    expect(pairedPreference.finding(people(20, 30), context)).toMatchObject({ row: 'none' });
  });
});

describe('people in general', () => {
  const turn = (rights: readonly number[], of: number) =>
    rights.flatMap((right, seat) => alone(right, of, 0, seat + 1));

  it('are spoken of only where the protocol says whose sample they are, six came and their limit lies above guessing [T38]', () => {
    const six = turn([14, 13, 15, 12, 14, 13], 16);
    expect(found(six).headline).toMatch(/^At least one of these listeners told/);
    const framed = found(six, { samplingFrame: 'subscribers of a hi-fi club' });
    expect(framed.headline).toMatch(
      /^Listeners in general, of whom these were a sample \(subscribers of a hi-fi club\), told/,
    );
    expect(framed.scope).toContain('listeners of whom these were a sample');
    expect(framed.mustNotSay.join()).not.toContain('listeners');
    expect(analyse(turn([14, 13, 15, 12, 14], 16), { samplingFrame: 'a club' }).people).toBeNull();
    // One hears it and five guess: the pooled test finds it, the limit over listeners does not.
    const one = turn([16, 9, 8, 10, 9, 8], 16);
    expect(analyse(one, { samplingFrame: 'a club' })).toMatchObject({
      isSignificant: true,
      people: { isAboveGuessing: false },
    });
    expect(found(one, { samplingFrame: 'a club' }).headline).toMatch(/^At least one of these listeners told/);
  });

  // R: x <- c(12,11,10,9,8,7)/16, right in the first trials; two-way variance max(V_l + V_t - V_cell, V_l, V_t), t on 5.
  it('are counted with the trials where they heard the same [T38]', () => {
    const trials = Array.from({ length: 16 }, (_, index): ForcedChoiceTrial => {
      const answers = [12, 11, 10, 9, 8, 7].map((right, seat) => ({
        listener: `L0${seat + 1}`,
        choice: index < right ? 'A' : 'B',
      }));
      return { session: 1, trial: index + 1, right: 'A', answers };
    });
    const { people, estimates } = analyse(trials, { samplingFrame: 'a club' });
    expect(people?.basis).toBe('listeners and trials');
    expect(Number(people?.interval.lower)).toBeCloseTo(0.3118074, 6);
    expect(Number(people?.interval.upper)).toBeCloseTo(0.8756926, 6);
    expect(Number(estimates?.interval.lower)).toBeCloseTo(0.3599716, 6);
    expect(Number(estimates?.interval.upper)).toBeCloseTo(0.8275284, 6);
    expect(Number(estimates?.aboveGuessing.oneSidedUpper.limit)).toBeCloseTo(0.5720507, 6);
  });
});

describe('evidence for guessing', () => {
  // R: 1 / (2^n * beta(1 + k, 1 + n - k) * pbeta(.5, 1 + k, 1 + n - k, FALSE) / .5), and with (2, 2)
  it('is quoted with both priors from a factor of ten on, and excludes nothing [T39]', () => {
    const { guessingFactor } = analyse(alone(45, 100));
    expect(Number(guessingFactor?.uniform)).toBeCloseTo(15.31275, 4);
    expect(Number(guessingFactor?.middle)).toBeCloseTo(10.25621, 4);
    const leaning = found(alone(45, 100)).modifiers.join(' ');
    expect(leaning).toContain('guessing explains the answers 15 times better');
    expect(leaning).toContain('10 times with Beta(2, 2)');
    expect(leaning).toContain('It excludes nothing.');
    expect(Number(analyse(alone(50, 100)).guessingFactor?.uniform)).toBeCloseTo(8.038513, 5);
    expect(found(alone(50, 100)).modifiers.join(' ')).not.toContain('Bayes factor');
    expect(found(alone(50, 100), { margin: '0.2' }).modifiers.join(' ')).not.toContain('Bayes factor');
  });
});
