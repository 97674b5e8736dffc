import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { analyseForcedChoice } from '#shared/findings/analyse-forced-choice.ts';
import { anyDifference, differenceFinding, differenceRows } from '#shared/findings/difference-finding.ts';
import type { FindingContext } from '#shared/findings/finding.ts';
import type { ForcedChoiceResult } from '#shared/findings/forced-choice-result.ts';
import { forcedChoiceWords } from '#shared/findings/forced-choice-words.ts';
import { preferenceRows } from '#shared/findings/preference-finding.ts';
import { abxQuestion } from '#shared/methods/abx.ts';

const context: FindingContext = {
  cables: ['Northern run', 'Southern run'],
  gate: { commitmentsHold: true, allTrialsAccounted: true, isBlind: true },
  endedEarly: null,
  setting: 'player, amplifier, loudspeakers',
};

const abxFinding = (result: ForcedChoiceResult, about: FindingContext) =>
  differenceFinding(result, about, { ...forcedChoiceWords, ...anyDifference });

/** A study in which each of some listeners is right in the first `right` trials; the last `silent` of them are missing. */
function study(listeners: number, trials: number, right: number, silent = 0, margin?: string, samplingFrame?: string) {
  return analyseForcedChoice(abxQuestion, {
    alpha: '0.05',
    margin,
    samplingFrame,
    listenersPerSession: listeners,
    trials: Array.from({ length: trials }, (_, index) => {
      const truth = index % 3 === 0 ? ('A' as const) : ('B' as const);
      const wrong = truth === 'A' ? ('B' as const) : ('A' as const);
      return {
        session: 1,
        trial: index + 1,
        right: truth,
        answers: Array.from({ length: listeners }, (_unused, listener) => ({
          listener: `L0${listener + 1}`,
          choice: index >= trials - silent ? null : index < right ? truth : wrong,
        })),
      };
    }),
  });
}

const forbidden = [
  /\bproves?\b/i,
  /identical/i,
  /cannot be heard/i,
  /inaudible/i,
  /95\s?% sure/i,
  /probability of guessing/i,
  /transparent/i,
];

describe('the finding', () => {
  it('takes one row for each result, and no forbidden word ever [T8]', () => {
    const rows = new Set<string>();
    for (const listeners of [1, 2, 4])
      for (const trials of [5, 8, 16, 24])
        for (let right = 0; right <= trials; right += 1)
          for (const silent of [0, 2])
            for (const commitmentsHold of [true, false])
              for (const endedEarly of [null, 'The room was needed.']) {
                const gate = { ...context.gate, commitmentsHold };
                const found = abxFinding(study(listeners, trials, right, silent), { ...context, gate, endedEarly });
                rows.add(found.row);
                const said = [found.headline, ...found.modifiers, found.scope, found.maySay ?? ''];
                expect(said.filter((words) => forbidden.some((word) => word.test(words)))).toEqual([]);
                expect(found.headline.length).toBeGreaterThan(20);
                expect(found.maySay === null).toBe(found.row === '0' || found.row === '1');
              }
    expect([...rows].sort()).toEqual(['0', '1', '2', '5']);
  });

  it('comes from its table: every result to one row, and every row by some result [T41] [T8]', () => {
    const rows = new Set<string>();
    for (const [listeners, trials, step] of [
      [1, 5, 1],
      [1, 16, 1],
      [1, 100, 3],
      [1, 400, 20],
      [3, 16, 1],
      [7, 24, 2],
    ] as const)
      for (let right = 0; right <= trials; right += step)
        for (const margin of [undefined, '0.2', '0.6'])
          for (const samplingFrame of listeners < 6 ? [undefined] : [undefined, 'readers of a magazine'])
            for (const silent of [0, 3]) {
              const result = study(listeners, trials, right, silent, margin, samplingFrame);
              const { row, ...found } = abxFinding(result, context);
              rows.add(row);
              expect([row === '3' || row === '4', margin === undefined].every(Boolean)).toBe(false);
              expect(row === '2' || row === '3').toBe(result.isSignificant && !result.isBelowGuessing);
              expect(row === '1').toBe(result.isBelowGuessing);
              expect(row === '3' || row === '4').toBe(result.margin?.isBelow === true && !result.isBelowGuessing);
              const said = [found.headline, ...found.modifiers, found.scope, found.maySay ?? '', ...found.mustNotSay];
              expect(said.filter((words) => forbidden.some((word) => word.test(words)))).toEqual([]);
              expect(new Set(found.modifiers).size).toBe(found.modifiers.length);
            }
    expect([...rows].sort()).toEqual([...differenceRows].sort());
    const listed = [...readFileSync('docs/spec/statistics.md', 'utf8').matchAll(/^\| (\d+|none) +\|/gm)].map(
      ([, row]) => row,
    );
    expect(listed).toEqual(['0', ...differenceRows, ...preferenceRows]);
  });

  it('speaks of one listener, and of a panel as at least one of its members [T8]', () => {
    expect(abxFinding(study(1, 16, 12), context).headline).toBe(
      'One listener told Northern run from Southern run more often than guessing allows.',
    );
    expect(abxFinding(study(3, 16, 14), context).headline).toMatch(/^At least one panel member told/);
  });

  it('counts a missing answer as wrong [T9]', () => {
    expect(study(1, 16, 14, 2)).toMatchObject({ answers: 16, missing: 2, correct: 14 });
    expect(study(1, 16, 16, 5)).toMatchObject({ answers: 16, missing: 5, correct: 11, isSignificant: false });
  });

  it('always says that the level was not recorded [T8]', () => {
    expect(abxFinding(study(1, 16, 12), context).modifiers.join(' ')).toMatch(/Level at the load was not recorded/);
  });
});
