import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { describe, expect, it } from 'vitest';
import { countsOf, habitsWords, heardWords, secondWords } from '#shared/findings/check-report-words.ts';
import { checkResult } from '#shared/findings/check-result.ts';
import { fixedSequence } from '#shared/findings/fixed-sequence.ts';
import { type MethodId, methods } from '#shared/methods/methods.ts';
import { checkResultOf } from '#shared/methods/run-checks.ts';
import type { Protocol } from '#shared/protocol/protocol.ts';
import { checkExclusion } from '#shared/protocol/registered-analysis.ts';
import type { LockedTrial } from '#shared/session/counted-trials.ts';
import type { TrialKind } from '#shared/session/trial-kinds.ts';
import { protocolFor } from '../../support/closed-study.ts';

const cable = protocolFor('s', 1, 'abx').cables[0];

function registered(method: MethodId, sizes: readonly number[], excludes = false) {
  const protocol = protocolFor('s', 3, method);
  return {
    ...protocol,
    analysis: {
      ...protocol.analysis,
      exclusions: excludes ? checkExclusion : ('none' as const),
    } as Protocol['analysis'],
    checks: { reference: 0 as const, steps: sizes.map((milliDb) => ({ milliDb, trials: 8, cable })), same: 2 },
  };
}

let number = 0;
/** Trials of a kind, for each the truth and who answered what. */
function trials(
  kind: TrialKind,
  count: number,
  truth: string,
  answers: (index: number) => Record<string, string | null>,
) {
  return Array.from({ length: count }, (_, index): LockedTrial => {
    number += 1;
    const given = Object.entries(answers(index)).map(([listener, choice]) => ({ listener, choice }));
    return { session: 1, trial: number, excerpt: 0, kind, truth, answers: given };
  });
}
const rightIn = (count: number) => (index: number) => ({ L01: index < count ? 'A' : 'B' });

describe('the known differences', () => {
  it('are asked from large to small, each at the registered level, up to the first that is not heard [T80]', () => {
    const found = checkResultOf(registered('abx', [1000, 500, 300]), [
      ...trials('step/0', 8, 'A', rightIn(8)),
      ...trials('step/1', 8, 'A', rightIn(5)),
      ...trials('step/2', 8, 'A', rightIn(8)),
    ]);
    expect(found.steps.map(({ isAsked, isHeard }) => [isAsked, isHeard])).toEqual([
      [true, true],
      [true, false],
      [false, false],
    ]);
    expect(found.sensitiveTo).toBe(1000);
    expect(found.steps.map(heardWords)).toEqual(['yes', 'no', 'not asked']);
    expect(fixedSequence([true, false, true])).toEqual([
      { isAsked: true, holds: true },
      { isAsked: true, holds: false },
      { isAsked: false, holds: false },
    ]);
    expect(checkResult.parse(found)).toEqual(found);
  });

  it('are counted by the exact binomial where draws are own: 7 of 8 is p 9/256 [T80]', () => {
    // R: binom.test(7, 8, alternative = "greater")$p.value
    const [step] = checkResultOf(registered('abx', [1000]), trials('step/0', 8, 'A', rightIn(7))).steps;
    expect(step?.test).toMatchObject({ name: 'exact-binomial', p: { numerator: '9', denominator: '256' } });
    expect(step).toMatchObject({ trials: 8, answers: 8, missing: 0, rates: [{ label: 'Right', counted: 7, due: 8 }] });
    expect(step && countsOf(step)).toBe('7 of 8 right');
  });

  it('share one coin per trial in a group, whatever the number of listeners [T80]', () => {
    const all = (choice: string) => ({ L01: choice, L02: choice, L03: choice, L04: choice, L05: choice });
    const found = checkResultOf(
      registered('abx', [1000]),
      trials('step/0', 4, 'A', () => all('A')),
    );
    expect(found.steps[0]).toMatchObject({ answers: 20, isHeard: false });
    expect(found.steps[0]?.test).toMatchObject({ name: 'shared-presentations', canReachAlpha: false });
    expect(found.steps[0]?.test?.p).toMatchObject({ numerator: '1', denominator: '16' });
    expect(heardWords(found.steps[0] as never)).toBe('no, too few trials');
  });

  it('say of each listener how small a step they heard, by their own answers [T81]', () => {
    const found = checkResultOf(registered('abx', [1000, 500]), [
      ...trials('step/0', 8, 'A', (index) => ({ L01: 'A', L02: index % 2 ? 'A' : 'B' })),
      ...trials('step/1', 8, 'A', () => ({ L01: 'A', L02: 'A' })),
    ]);
    expect(found.byListener.map(({ listener, sensitiveTo }) => [listener, sensitiveTo])).toEqual([
      ['L01', 500],
      ['L02', null],
    ]);
  });

  it('count a missing answer as wrong, and a step that was never presented as not heard [T80]', () => {
    const found = checkResultOf(
      registered('abx', [1000, 500]),
      trials('step/0', 8, 'A', (index) => ({ L01: index === 0 ? null : 'A' })),
    );
    expect(found.steps[0]).toMatchObject({ missing: 1, isHeard: true, rates: [{ counted: 7, due: 8, missing: 1 }] });
    expect(found.steps[1]).toMatchObject({ trials: 0, test: null, isHeard: false, isAsked: true });
    expect(found.steps.map(heardWords)).toEqual(['yes', 'never presented']);
  });

  it('are scored by the method’s own test, in same-different by hits and false alarms [T80]', () => {
    const said = (choice: string) => () => ({ L01: choice });
    const found = checkResultOf(registered('same-different', [1000]), [
      ...trials('step/0', 4, 'AB', said('different')),
      ...trials('step/0', 4, 'AA', said('same')),
    ]);
    // R: 1 / choose(8, 4)
    expect(found.steps[0]?.test).toMatchObject({ p: { numerator: '1', denominator: '70' } });
    expect(found.steps[0] && countsOf(found.steps[0])).toBe('4 of 4 hits, 0 of 4 false alarms');
  });

  it('leave the same with the same out of every test: its answers tell habits [T82]', () => {
    const locked = [
      ...trials('same', 3, 'A', (index) => ({ L01: index === 0 ? 'A' : 'B' })),
      ...trials('same', 1, 'B', () => ({ L01: null })),
    ];
    const { same, steps } = checkResultOf(registered('abx', [1000]), locked);
    expect(same).toEqual({
      trials: 4,
      answers: 4,
      missing: 1,
      choices: [
        { choice: 'A', count: 1 },
        { choice: 'B', count: 2 },
      ],
    });
    expect(steps[0]?.trials).toBe(0);
    expect(habitsWords(same, methods.abx)).toContain('1 said A, 2 said B, 1 missing. No answer is right there');
  });

  it('decide alone who is left out of a registered second result; the first stays [T83]', () => {
    const locked = [
      ...trials('step/0', 8, 'A', () => ({ L01: 'A', L02: 'B' })),
      ...trials('main', 8, 'A', () => ({ L01: 'A', L02: 'B', L03: 'A' })),
    ];
    const { second } = checkResultOf(registered('abx', [1000], true), locked);
    expect(second).toMatchObject({ excluded: ['L02', 'L03'], result: { listeners: 1, correct: 8, answers: 8 } });
    expect(second?.result).toMatchObject({ test: 'exact-binomial', isSignificant: true });
    expect(checkResultOf(registered('abx', [1000]), locked)).not.toHaveProperty('second');
    const nobody = checkResultOf(
      registered('abx', [1000], true),
      trials('main', 5, 'A', () => ({ L01: 'A' })),
    );
    expect(nobody.second).toEqual({ excluded: ['L01'], result: null });
    expect(secondWords(nobody)[0]).toMatch(/without L01, .*: nobody is left/);
  });

  it('keep their level under a habit that a panel shares, over the whole ladder [T80] [T42]', () => {
    const studies = 400;
    const uniform = (
      (source) => () =>
        uniformFloat64(source)
    )(xoroshiro128plus(2026));
    const panel = ['L01', 'L02', 'L03', 'L04'];
    const habitual = (kind: TrialKind) =>
      Array.from({ length: 8 }, () => {
        const leansTo = uniform() < 0.5 ? 'A' : 'B';
        const other = leansTo === 'A' ? 'B' : 'A';
        const answers = Object.fromEntries(panel.map((label) => [label, uniform() < 0.8 ? leansTo : other]));
        return trials(kind, 1, uniform() < 0.5 ? 'A' : 'B', () => answers);
      }).flat();
    let found = 0;
    for (let study = 0; study < studies; study += 1) {
      const result = checkResultOf(registered('abx', [1000, 500]), [...habitual('step/0'), ...habitual('step/1')]);
      if (result.steps.some(({ isHeard }) => isHeard)) found += 1;
    }
    expect(found / studies).toBeLessThanOrEqual(0.05 + 3 * Math.sqrt((0.05 * 0.95) / studies));
    expect(found).toBeGreaterThan(0);
  });
});
