import { describe, expect, it } from 'vitest';
import { studyDraft } from '#shared/contracts/studies.ts';
import { methodIds, methods } from '#shared/methods/methods.ts';
import {
  effectScales,
  leastShare,
  mostShare,
  scaleFace,
  scaleFault,
  typedShare,
} from '../../src/features/studies/form/effect-scales.ts';
import { newStudyValues } from '../../src/features/studies/form/study-form-values.ts';
import { firstAim } from '../../src/features/studies/planner/plan-context.ts';
import { planOf, rateOf } from '../../src/features/studies/planner/plan-of.ts';
import { searchPlan } from '../../src/features/studies/planner/plan-search.ts';
import { mostTrialsInAll, splitTrials } from '../../src/features/studies/planner/split-trials.ts';

const facesOf = (id: keyof typeof methods, share: number) =>
  effectScales(methods[id]).map((scale) => [scale.label, scaleFace(scale, share)]);

describe('the effect that is to be found', () => {
  // d′ of .7 in ABX by differences is 1.72, of .6 in a triangle 1.97, by R's uniroot.
  it('says the same on every scale, in the words of the method [W2]', () => {
    expect(facesOf('abx', firstAim.share)).toEqual([
      ['Right', '70'],
      ['Heard', '40'],
      ['d′', '1.72'],
    ]);
    expect(facesOf('triangle', firstAim.share)[0]).toEqual(['Right', '60']);
    expect(facesOf('same-different', firstAim.share)[0]).toEqual(['Hits', '70']);
    expect(facesOf('paired-preference', firstAim.share)).toEqual([['For one cable', '70']]);
  });

  it('is taken from whichever is typed [W2]', () => {
    for (const id of methodIds)
      for (const scale of effectScales(methods[id]))
        for (const share of [0.05, 0.2, 0.4, 0.73, 0.9])
          expect(typedShare(scale, String(scale.ofShare(share))), `${id} ${scale.key}`).toBeCloseTo(share, 6);
  });

  it('refuses what is no effect, and says what can be entered [W2]', () => {
    const [rate, heard, dPrime] = effectScales(methods.abx);
    if (rate === undefined || heard === undefined || dPrime === undefined) throw new Error('a scale is missing');
    expect(['', 'abc', '50', '49.9', '100', '-3', '101'].map((text) => typedShare(rate, text))).toEqual(
      Array(7).fill(null),
    );
    expect(typedShare(heard, '98')).toBe(mostShare);
    expect(typedShare(heard, '1')).toBe(leastShare);
    expect(typedShare(dPrime, '0')).toBeNull();
    expect(typedShare(dPrime, '1e9')).toBeNull();
    expect(scaleFault(rate)).toBe('Enter 50.5 to 99.');
  });

  it('is no part of the draft [W2]', () => {
    expect(Object.keys(studyDraft.shape)).not.toContain('share');
    expect(Object.keys(newStudyValues).filter((key) => !(key in studyDraft.shape))).toEqual([]);
  });
});

describe('taking over the number of trials', () => {
  it('makes blocks of twenty at most where a study can hold them, and keeps the sessions that are planned [W3]', () => {
    expect(splitTrials(42, { sessions: 1 })).toEqual({ sessions: 3, trials: 14 });
    expect(splitTrials(42, { sessions: 4 })).toEqual({ sessions: 4, trials: 11 });
    expect(splitTrials(227, { sessions: 1 })).toEqual({ sessions: 12, trials: 19 });
    expect(splitTrials(8, { sessions: 6 })).toEqual({ sessions: 1, trials: 8 });
    expect(splitTrials(3, { sessions: 1 })).toEqual({ sessions: 1, trials: 5 });
    expect(splitTrials(1000, { sessions: 1 })).toEqual({ sessions: 20, trials: 50 });
    expect(splitTrials(mostTrialsInAll + 1, { sessions: 1 })).toBeNull();
  });

  it('is enough, and is what a draft may hold, whatever is needed [W3]', () => {
    const { sessions, trials } = studyDraft.shape;
    for (let needed = 1; needed <= mostTrialsInAll; needed++)
      for (const planned of [1, 3, 20]) {
        const split = splitTrials(needed, { sessions: planned });
        if (split === null) throw new Error(`${needed} do not fit`);
        expect(split.sessions * split.trials).toBeGreaterThanOrEqual(needed);
        expect(sessions.safeParse(split.sessions).success && trials.safeParse(split.trials).success).toBe(true);
      }
  });
});

describe('the plan', () => {
  const values = { ...newStudyValues, attribute: 'bass' };

  it('answers for every method, alone and in a group, with a margin and without [W5]', () => {
    for (const id of methodIds)
      for (const listeners of [1, 6])
        for (const marginPercent of [undefined, 20]) {
          const plan = planOf({ ...values, method: id, listenersPerSession: listeners, marginPercent });
          if (plan === null) throw new Error(`no plan for ${id}`);
          const { margin } = methods[id];
          expect(plan.choices.marginPercent).toBe(margin === null ? undefined : marginPercent);
          const found = searchPlan({
            ...{ method: id, trials: plan.trials, alpha: plan.alpha, listeners, goal: firstAim.goal },
            ...{ rate: rateOf(plan.method, firstAim.share), marginPercent: marginPercent ?? 20 },
          });
          expect(found.own === null).toBe(listeners > 1);
          expect(found.marginNeeded === null).toBe(margin === null || (listeners > 1 && margin.counts === 'trials'));
        }
  });

  // 214/227 by R's pbinom; people by two one-sided tests.
  it('names the trials, or the people, that a margin takes [W5]', () => {
    const asked = { trials: 16, alpha: 0.05, listeners: 1, rate: 0.7, goal: 0.8, marginPercent: 20 };
    expect(searchPlan({ ...asked, method: 'abx' }).marginNeeded).toMatchObject({ nFirst: 214, nSafe: 227 });
    const { marginNeeded } = searchPlan({ ...asked, method: 'paired-preference' });
    const { margin } = methods['paired-preference'].planned;
    expect(margin?.power(marginNeeded?.nSafe ?? 1, 0.2, 0)).toBeGreaterThanOrEqual(0.9);
    expect(margin?.power((marginNeeded?.nFirst ?? 2) - 1, 0.2, 0)).toBeLessThan(0.9);
  });

  it('goes on without a margin that the method does not take [W5]', () => {
    const plan = planOf({ ...values, method: 'paired-preference', marginPercent: 60 });
    expect(plan?.choices.marginPercent).toBeUndefined();
    expect(planOf({ ...values, marginPercent: Number.NaN })?.choices.marginPercent).toBeUndefined();
  });

  it('counts on request the most changes and time that a listener may ask for [S57]', () => {
    const trials = { ...values, trials: 10, sessions: 2, programme: [{ title: 'Piano', start: '', lengthS: 20 }] };
    const [fixed, asked] = [planOf(trials), planOf({ ...trials, onRequest: { most: 9 } })];
    // Two of familiarisation in each session.
    expect([fixed?.fittings, fixed?.isAtMost]).toEqual([2 * (10 * 3 + 2), false]);
    expect([asked?.fittings, asked?.isAtMost]).toEqual([2 * (10 * 9 + 2), true]);
    expect(asked?.minutes).toBeGreaterThan((fixed?.minutes ?? 0) * 2);
  });

  it('gives the same answer to the same question, and says which question it was [W9]', () => {
    const asked = { method: 'abx', trials: 16, alpha: 0.05, listeners: 1, rate: 0.7, goal: 0.8, marginPercent: 20 };
    expect(searchPlan(asked)).toEqual(searchPlan(asked));
    expect(searchPlan(asked).asked).toEqual(asked);
  });
});
