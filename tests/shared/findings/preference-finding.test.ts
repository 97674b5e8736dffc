import { describe, expect, it } from 'vitest';
import { analysePreference } from '#shared/findings/analyse-preference.ts';
import { type Finding, type FindingContext, finding } from '#shared/findings/finding.ts';
import { preferenceFinding } from '#shared/findings/preference-finding.ts';
import type { PreferenceChoice } from '#shared/findings/preference-trials.ts';

const context: FindingContext = {
  cables: ['Northern run', 'Southern run'],
  gate: { commitmentsHold: true, allTrialsAccounted: true, isBlind: true },
  endedEarly: null,
  setting: 'player, amplifier, loudspeakers',
};

type Panel = {
  listeners: number;
  forFirst: number;
  ties?: number;
  missing?: number;
  trials?: number;
  offers?: boolean;
  margin?: string;
};

/** Listeners who all hear the same trials; in each of the first `forFirst` trials all prefer the first cable. */
function study({ listeners, forFirst, ties = 0, missing = 0, trials = 16, offers = true, margin }: Panel) {
  return analysePreference({
    margin,
    alpha: '0.05',
    listenersPerSession: listeners,
    offersNoPreference: offers,
    trials: Array.from({ length: trials }, (_, index) => {
      const truth = index % 3 === 0 ? ('first' as const) : ('second' as const);
      const other = truth === 'first' ? ('second' as const) : ('first' as const);
      const left = trials - index;
      const own: PreferenceChoice =
        left <= missing ? null : left <= missing + ties ? 'none' : index < forFirst ? truth : other;
      return {
        session: 1,
        trial: index + 1,
        truth,
        answers: Array.from({ length: listeners }, (_unused, seat) => ({ listener: `L0${seat + 1}`, choice: own })),
      };
    }),
  });
}

const found = (panel: Panel, change: Partial<FindingContext> = {}): Finding =>
  preferenceFinding(study(panel), { ...context, ...change });

const never = [
  /\bis better\b/i,
  /\bmore audible\b|\baudible\b/i,
  /\bsuperior\b/i,
  /\bproves?\b/i,
  /identical/i,
  /cannot be heard/i,
  /inaudible/i,
  /probability of guessing/i,
  /transparent/i,
];

describe('the finding of a paired preference', () => {
  it('takes one row for each result, and never says better, audible or proven [F6]', () => {
    const rows = new Set<string>();
    for (const [listeners, margin] of [
      [1, undefined],
      [3, undefined],
      [8, undefined],
      [8, '0.4'],
    ] as const)
      for (let forFirst = 0; forFirst <= 16; forFirst += 1)
        for (const [ties, missing] of [
          [0, 0],
          [3, 0],
          [2, 1],
          [16, 0],
        ])
          for (const commitmentsHold of [true, false]) {
            const gate = { commitmentsHold, allTrialsAccounted: true, isBlind: true };
            const one = found({ listeners, forFirst, ties, missing, margin }, { gate });
            rows.add(one.row);
            expect(finding.parse(one)).toEqual(one);
            const said = [one.headline, ...one.modifiers, one.scope, one.maySay ?? ''];
            expect(said.filter((words) => never.some((word) => word.test(words)))).toEqual([]);
            expect(one.row === '0').toBe(!commitmentsHold);
          }
    expect([...rows].sort()).toEqual(['0', '10', 'none']);
  });

  it('names the cable, k of n answers, the listeners and those without a preference [F6]', () => {
    const one = found({ listeners: 3, forFirst: 12, ties: 2 });
    expect(one.headline).toBe(
      'This panel’s answers favoured Northern run over Southern run: 36 of the 42 answers that preferred one, by 3 listeners; 6 stated no preference.',
    );
    // R: every draw enumerated: 14 coins of 3 answers each are 12 of 14, binom.test(12, 14)$p.value = 0.01294
    expect(one.maySay).toContain('p = 0.0129, two-sided level 0.05');
    expect(one.maySay).toContain('loudness may explain the preference');
  });

  it('names the second cable where that one is favoured [F6]', () => {
    const one = found({ listeners: 1, forFirst: 2, offers: false });
    expect(one.headline).toBe(
      'One listener’s answers favoured Southern run over Northern run: 14 of the 16 answers that preferred one, by 1 listener.',
    );
    // R: binom.test(14, 16)$conf.int is 0.6165 to 0.9845
    expect(one.modifiers[0]).toBe(
      'Share of Southern run among the answers that preferred one: 88% (95% interval 61% to 99%).',
    );
  });

  it('shows no preference without saying that both are liked equally [F6]', () => {
    const one = found({ listeners: 1, forFirst: 9, ties: 1 });
    expect(one.row).toBe('none');
    expect(one.headline).toBe('No preference was shown between Northern run and Southern run.');
    expect(one.maySay).toContain('answers: Northern run 9, Southern run 6, no preference 1');
    expect(one.maySay).toContain('it does not show that both are liked equally');
    expect(one.mustNotSay).toContain('that both are liked equally');
    expect(found({ listeners: 1, forFirst: 0, ties: 16 }).maySay).toBeNull();
  });

  it('speaks of people only with the sign test over people, and says why where it does not [F5]', () => {
    const few = found({ listeners: 3, forFirst: 16 });
    expect(few.modifiers.join(' ')).toContain(
      'Repeated answers are not people: by their own majorities 3 of 3 listeners',
    );
    expect(few.mustNotSay).toContain('that more people prefer one of them');
    const many = found({ listeners: 8, forFirst: 16 });
    expect(many.modifiers.join(' ')).toContain('More people preferred Northern run: by their own majorities 8 of 8');
    expect(many.mustNotSay).not.toContain('that more people prefer one of them');
  });

  it('names listeners by Holm’s rule, and calls them exploratory where the panel showed nothing [F5]', () => {
    expect(found({ listeners: 2, forFirst: 16 }).modifiers).toContain(
      'On their own, adjusted by Holm’s rule: L01 preferred Northern run, L02 preferred Northern run.',
    );
    const divided = analysePreference({
      alpha: '0.05',
      listenersPerSession: 2,
      offersNoPreference: false,
      trials: Array.from({ length: 16 }, (_, index) => ({
        session: 1,
        trial: index + 1,
        truth: 'first' as const,
        answers: [
          { listener: 'L01', choice: 'first' as const },
          { listener: 'L02', choice: 'second' as const },
        ],
      })),
    });
    const one = preferenceFinding(divided, context);
    expect(one.row).toBe('none');
    expect(one.modifiers).toContain(
      'Exploratory: L01 preferred Northern run, L02 preferred Southern run; this needs a new pre-registered test.',
    );
  });

  it('says what was missing, what ended early and what could not be reached [F6]', () => {
    const one = found({ listeners: 1, forFirst: 5, missing: 1, trials: 6 }, { endedEarly: 'The room was needed.' });
    expect(one.modifiers).toEqual(
      expect.arrayContaining([
        'With so few answers that prefer one no result could have reached the registered level.',
        'Ended early while blind, at 6 trials: The room was needed.',
        '1 answer missing, left out.',
      ]),
    );
  });
});
