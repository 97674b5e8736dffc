import { describe, expect, it } from 'vitest';
import { analyseForcedChoice } from '#shared/findings/analyse-forced-choice.ts';
import { type KnownDifferences, knownDifferences } from '#shared/findings/check-result.ts';
import { anyDifference, differenceFinding } from '#shared/findings/difference-finding.ts';
import type { FindingContext } from '#shared/findings/finding.ts';
import { forcedChoiceWords } from '#shared/findings/forced-choice-words.ts';
import { abxQuestion } from '#shared/methods/abx.ts';

const context: FindingContext = {
  cables: ['Northern run', 'Southern run'],
  gate: { commitmentsHold: true, allTrialsAccounted: true, isBlind: true },
  endedEarly: null,
  setting: 'player, amplifier, loudspeakers',
};
const heard: KnownDifferences = {
  largest: { milliDb: 1000, isHeard: true, canReachAlpha: true },
  sensitiveTo: 500,
};
const failed: KnownDifferences = {
  largest: { milliDb: 1000, isHeard: false, canReachAlpha: true },
  sensitiveTo: null,
};

function found(right: number, known: KnownDifferences | null, margin?: string, trials = 400) {
  const result = analyseForcedChoice(abxQuestion, {
    alpha: '0.05',
    margin,
    listenersPerSession: 1,
    trials: Array.from({ length: trials }, (_, index) => ({
      session: 1,
      trial: index + 1,
      right: index % 2 ? 'A' : 'B',
      answers: [{ listener: 'L01', choice: index < right === (index % 2 === 1) ? 'A' : 'B' }],
    })),
  });
  return differenceFinding(result, { ...context, known }, { ...forcedChoiceWords, ...anyDifference });
}

describe('what known differences do to a finding', () => {
  it('bars rows 3 and 4 where the largest was not heard, and leaves every other row as it is [T84]', () => {
    const rows = new Map<string, Set<string>>();
    for (let right = 100; right <= 300; right += 5)
      for (const margin of [undefined, '0.2', '0.6']) {
        const [without, passed, barred] = [null, heard, failed].map((known) => found(right, known, margin).row);
        expect(passed).toBe(without);
        rows.set(without ?? '', (rows.get(without ?? '') ?? new Set()).add(barred ?? ''));
      }
    expect([...rows].map(([row, to]) => [row, [...to]]).sort()).toEqual([
      ['1', ['1']],
      ['2', ['2']],
      ['3', ['2']],
      ['4', ['5']],
      ['5', ['5']],
    ]);
  });

  it('puts a caution beside a difference, inside and outside, where it was not heard [T84]', () => {
    const { row, modifiers, maySay, mustNotSay } = found(280, failed);
    expect(row).toBe('2');
    expect(modifiers.join(' ')).toMatch(/did not hear a known difference of 1\u00a0dB in this set-up.*with caution/);
    expect(maySay).toMatch(/The same listeners did not hear a known difference of 1\u00a0dB in the same set-up\.$/);
    expect(mustNotSay).toContain('that there is no difference, or a small one');
    expect(found(280, heard).modifiers).toContain('These listeners heard a step of 0.5\u00a0dB in this set-up.');
    expect(found(280, null).modifiers.join(' ')).not.toMatch(/known difference|heard a step/);
  });

  it('says of a null whether this set-up would have shown a known difference, or that it is not known [T84]', () => {
    expect(found(200, null).modifiers).toContain(
      'No known difference was among the trials, so it is not known whether this set-up would have shown one.',
    );
    expect(found(200, heard).modifiers).toContain('These listeners heard a step of 0.5\u00a0dB in this set-up.');
    expect(found(200, failed).modifiers.join(' ')).toMatch(/Nothing follows from it that nothing was found/);
    expect(found(200, failed, '0.6').modifiers.join(' ')).toMatch(/registered margin, which may not be claimed/);
    expect(found(200, failed, '0.6').maySay).not.toMatch(/within the registered margin/);
  });

  it('says where the trials of the largest step were too few to be heard at all [T84]', () => {
    const few = { ...failed, largest: { ...failed.largest, canReachAlpha: false } };
    expect(found(200, few).modifiers.join(' ')).toMatch(/too few to reach the registered level/);
  });

  it('has nothing to go by where no step was registered [T84]', () => {
    expect(knownDifferences(undefined)).toBeNull();
    const same = { trials: 2, answers: 2, missing: 0, choices: [] };
    expect(knownDifferences({ alpha: '0.05', steps: [], sensitiveTo: null, byListener: [], same })).toBeNull();
  });
});
