import { describe, expect, it } from 'vitest';
import { analyseForcedChoice } from '#shared/findings/analyse-forced-choice.ts';
import { anyDifference, differenceFinding } from '#shared/findings/difference-finding.ts';
import { type Finding, type FindingContext, finding } from '#shared/findings/finding.ts';
import type { ForcedChoiceResult } from '#shared/findings/forced-choice-result.ts';
import type { ForcedChoiceTrial } from '#shared/findings/forced-choice-trials.ts';
import { forcedChoiceWords } from '#shared/findings/forced-choice-words.ts';
import { abxQuestion } from '#shared/methods/abx.ts';

const context: FindingContext = {
  cables: ['Northern run', 'Southern run'],
  gate: { commitmentsHold: true, allTrialsAccounted: true, isBlind: true },
  endedEarly: null,
  setting: 'player, amplifier, loudspeakers',
};

const abxFinding = (result: ForcedChoiceResult, about: FindingContext) =>
  differenceFinding(result, about, { ...forcedChoiceWords, ...anyDifference });

/** One row per seat: how many of the first trials that listener has right. X is always A. */
function together(trials: number, right: readonly number[]): ForcedChoiceTrial[] {
  return Array.from({ length: trials }, (_, index) => ({
    session: 1,
    trial: index + 1,
    right: 'A',
    answers: right.map((count, seat) => ({ listener: `L0${seat + 1}`, choice: index < count ? 'A' : 'B' })),
  }));
}

/** The same listeners one after another, each in a session of their own. */
function inTurn(trials: number, right: readonly number[]): ForcedChoiceTrial[] {
  return right.flatMap((count, seat) =>
    together(trials, [count]).map((trial) => ({
      ...trial,
      session: seat + 1,
      answers: trial.answers.map((answer) => ({ ...answer, listener: `L0${seat + 1}` })),
    })),
  );
}

const found = (trials: readonly ForcedChoiceTrial[], alpha = '0.05'): Finding =>
  abxFinding(analyseForcedChoice(abxQuestion, { alpha, listenersPerSession: 1, trials }), context);
const words = ({ modifiers }: Finding) => modifiers.join(' ');

describe('what stands beside a headline', () => {
  // R: binom.test(12, 16): 0.4762 ... 0.9273, lower one-sided 0.5156; above guessing -0.05 ... 0.85 and 0.0312.
  it('gives the size of a difference with the one-sided lower limit that belongs to the test [T24]', () => {
    expect(words(found(together(16, [12])))).toContain(
      'Share of answers above guessing: 50% (95% interval 0% to 86%; one-sided 95% lower limit 3%).',
    );
    expect(words(found(together(16, [14]), '0.025'))).toContain('one-sided 97.5% lower limit');
  });

  // R: binom.test(9, 16, alternative = "less")$conf.int[2] = 0.7733, above guessing 0.5466: rounded up.
  // R: pbinom(11, 16, c(0.80, 0.81), lower.tail = FALSE) = 0.7982, 0.8273: the rate at 80 % power lies between.
  it('gives what an inconclusive test leaves open, rounded so that it excludes less [T24]', () => {
    const open = found(together(16, [9]));
    expect(open.row).toBe('5');
    expect(words(open)).toContain('An above-chance rate up to 55% is not excluded (one-sided 95% limit).');
    expect(words(open)).toContain('It could have found a listener who is right 81% of the time, with 80% power.');
  });

  it('gives no limit where scores were low, and counts trials in a group [T24]', () => {
    expect(words(found(together(60, [22])))).toContain('Scores were lower than guessing usually gives.');
    // R: 2 * (1/2 + qt(.95, 15) * sqrt(16/15 * 16 * 1) / 32) - 1 = 0.4527
    expect(words(found(together(16, [8, 8])))).toContain(
      'An above-chance rate up to 46% is not excluded (one-sided 95% limit; counted by trials, which the listeners shared).',
    );
    expect(words(found(together(16, [14, 14])))).toContain('counted by trials, which the listeners shared');
    expect(words(found(together(16, [16, 16])))).toContain('they were too few or all came out alike');
  });

  it('speaks of the panel’s average and not of people where several came one at a time [T24]', () => {
    for (const trials of [inTurn(16, [8, 9]), inTurn(16, [13, 12])])
      expect(words(found(trials))).toContain('the average over this panel’s answers, not about people in general');
    expect(words(found(together(16, [9])))).not.toContain('panel');
  });

  // R: p.adjust(pbinom(c(14, 9, 9) - 1, 16, .5, FALSE), "holm") = .0063 .804 .804; pooled pbinom(31, 48, .5, FALSE) = .0147.
  it('names a listener only when Holm’s rule allows it [T24]', () => {
    expect(words(found(inTurn(16, [14, 9, 9])))).toContain(
      'Above guessing on their own, adjusted by Holm’s rule: L01.',
    );
    expect(words(found(inTurn(16, [11, 11, 11])))).toContain(
      'The panel as a whole scored above chance; no single listener can be named.',
    );
    expect(words(found(together(16, [12])))).not.toContain('Holm');
  });

  it('calls a listener above guessing exploratory where the registered test found nothing [T24]', () => {
    const hint = found(inTurn(16, [15, 6, 6]));
    expect(hint.row).toBe('5');
    expect(words(hint)).toContain('Exploratory: L01 scored above guessing; this needs a new pre-registered test.');
    expect(hint.maySay).not.toContain('L01');
  });

  it('says that no result could have reached the level where none could [T24]', () => {
    expect(words(found(together(4, [4])))).toContain('no result could have reached the registered level');
    expect(words(found(together(5, [4])))).not.toContain('no result could have reached');
  });

  it('claims nothing for a study without answers [T24]', () => {
    const empty = found([]);
    expect(empty).toMatchObject({ row: '5', maySay: null });
    expect(words(empty)).toContain('No answers were counted.');
  });

  it('takes the record before the count, and the count from below before the one from above [T8]', () => {
    const result = analyseForcedChoice(abxQuestion, {
      alpha: '0.05',
      listenersPerSession: 1,
      trials: together(16, [16]),
    });
    for (const gate of [
      { commitmentsHold: false, allTrialsAccounted: true, isBlind: true },
      { commitmentsHold: true, allTrialsAccounted: false, isBlind: true },
      { commitmentsHold: true, allTrialsAccounted: true, isBlind: false },
    ])
      expect(abxFinding(result, { ...context, gate })).toMatchObject({ row: '0', maySay: null });
    expect(found(together(16, [2]))).toMatchObject({ row: '1', maySay: null });
    // R: pbinom(4, 16, 0.5) = 0.0384 is above .01.
    expect(found(together(16, [4])).row).toBe('5');
  });

  it('says when the study was ended early, and stays a registered result at the number reached [T24]', () => {
    const result = analyseForcedChoice(abxQuestion, {
      alpha: '0.05',
      listenersPerSession: 1,
      trials: together(12, [10]),
    });
    const early = abxFinding(result, { ...context, endedEarly: 'The room was needed.' });
    expect(early.row).toBe('2');
    expect(words(early)).toContain('Ended early while blind, at 12 trials: The room was needed.');
  });

  it('has the form that travels, and words without what is never said in every part [T8]', () => {
    const forbidden = /proves|identical|cannot be heard|inaudible|95\s?% sure|probability of guessing|transparent/i;
    for (const trials of [
      together(16, [12]),
      together(16, [9]),
      together(16, [2]),
      together(8, [8, 8, 8]),
      inTurn(16, [15, 6]),
    ]) {
      const result = found(trials);
      expect(finding.parse(result)).toEqual(result);
      expect(result.mustNotSay.length).toBeGreaterThan(0);
      for (const said of [
        result.headline,
        ...result.modifiers,
        result.scope,
        result.maySay ?? '',
        ...result.mustNotSay,
      ])
        expect(said).not.toMatch(forbidden);
    }
  });
});
