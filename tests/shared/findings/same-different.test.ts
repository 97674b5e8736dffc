import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyseSameDifferent } from '#shared/findings/analyse-same-different.ts';
import { differenceFinding } from '#shared/findings/difference-finding.ts';
import { finding } from '#shared/findings/finding.ts';
import { sameDifferentPortrait } from '#shared/findings/same-different-portrait.ts';
import type { SameDifferentAnswer, SameDifferentTrial } from '#shared/findings/same-different-trials.ts';
import { sameDifferentWords } from '#shared/findings/same-different-words.ts';
import { canonicalJson, type Json } from '#shared/ledger/canonical-json.ts';
import { registeredResult } from '#shared/methods/methods.ts';

type Choice = SameDifferentAnswer['choice'];
const listeners = ['L01', 'L02', 'L03'];
const context = {
  cables: ['Northern run', 'Southern run'] as const,
  gate: { commitmentsHold: true, allTrialsAccounted: true, isBlind: true },
  endedEarly: null,
  setting: 'player, amplifier, loudspeakers',
};

const study = (rows: readonly { isDifferent: boolean; choices: readonly Choice[] }[]): SameDifferentTrial[] =>
  rows.map(({ isDifferent, choices }, index) => ({
    session: 1,
    trial: index + 1,
    isDifferent,
    answers: choices.map((choice, seat) => ({ listener: listeners[seat] ?? '', choice })),
  }));
const analyse = (trials: readonly SameDifferentTrial[], alpha = '0.05') =>
  analyseSameDifferent({ alpha, listenersPerSession: 1, trials });

/** One listener: so many hits of so many different trials, so many false alarms of so many same ones. */
const alone = (hits: number, different: number, falseAlarms: number, same: number) =>
  study([
    ...Array.from({ length: different }, (_, index) => ({
      isDifferent: true,
      choices: [index < hits ? ('different' as const) : ('same' as const)],
    })),
    ...Array.from({ length: same }, (_, index) => ({
      isDifferent: false,
      choices: [index < falseAlarms ? ('different' as const) : ('same' as const)],
    })),
  ]);

const rows = (most: number) =>
  fc.array(
    fc.record({
      isDifferent: fc.boolean(),
      choices: fc.array(fc.constantFrom<Choice>('same', 'different', null), { minLength: 1, maxLength: 3 }),
    }),
    { minLength: 1, maxLength: most },
  );

describe('the registered analysis of same-different', () => {
  // R: fisher.test(matrix(c(7, 1, 2, 6), 2), alternative = "greater")$p.value = 0.0202797202797203
  it('is Fisher’s exact test for one listener [H2]', () => {
    const result = analyse(alone(7, 8, 2, 8));
    expect(result).toMatchObject({
      test: 'fixed-different-trials',
      p: { numerator: '29', denominator: '1430', value: '0.0202797202797' },
      isSignificant: true,
      critical: { count: 7 },
      differentTrials: 8,
    });
  });

  it('finds nothing in a habit, however strong: all “different” is p = 1 [H2]', () => {
    expect(analyse(alone(8, 8, 8, 8)).p.value).toBe('1.00000000000');
    expect(analyse(alone(0, 8, 0, 8)).p.value).toBe('1.00000000000');
  });

  it('keeps its level over all draws, answers and silence held fixed [H3]', () => {
    fc.assert(
      fc.property(rows(7), fc.constantFrom('0.05', '0.1', '0.25'), (given, alpha) => {
        let significant = 0;
        for (let draw = 0; draw < 2 ** given.length; draw++)
          if (
            analyse(study(given.map((row, index) => ({ ...row, isDifferent: ((draw >> index) & 1) === 1 }))), alpha)
              .isSignificant
          )
            significant++;
        expect(significant / 2 ** given.length).toBeLessThanOrEqual(Number(alpha));
      }),
      { numRuns: 25 },
    );
  });

  it('counts a missing answer as wrong: no answer in its place gives a larger p [H3]', () => {
    fc.assert(
      fc.property(rows(6), fc.infiniteStream(fc.constantFrom<Choice>('same', 'different')), (given, instead) => {
        const filled = given.map((row) => ({
          ...row,
          choices: row.choices.map((choice) => choice ?? (instead.next().value as Choice)),
        }));
        const exact = ({ p }: ReturnType<typeof analyse>) => Number(p.numerator) / Number(p.denominator);
        expect(exact(analyse(study(given)))).toBeGreaterThanOrEqual(exact(analyse(study(filled))) - 1e-15);
      }),
    );
    const silent = study([
      { isDifferent: true, choices: ['different'] },
      { isDifferent: false, choices: [null] },
    ]);
    expect(analyse(silent).p.value).toBe('1.00000000000');
  });

  it('does not take silence for swapped labels [T17]', () => {
    expect(analyse(alone(0, 8, 8, 8))).toMatchObject({ isBelowGuessing: true });
    const quiet = alone(0, 8, 0, 8).map((trial) => ({
      ...trial,
      answers: trial.answers.map((answer) => ({ ...answer, choice: trial.isDifferent ? answer.choice : null })),
    }));
    expect(analyse(quiet)).toMatchObject({ isBelowGuessing: false });
  });

  it('adjusts listeners by Holm, and is a result that the record can hold [T18] [T20]', () => {
    fc.assert(
      fc.property(rows(8), (given) => {
        const result = analyse(study(given));
        expect(registeredResult.parse(result)).toEqual(result);
        expect(() => canonicalJson(result as unknown as Json)).not.toThrow();
        for (const { p, holmP } of result.byListener) expect(Number(holmP)).toBeGreaterThanOrEqual(Number(p));
      }),
    );
  });

  it('has no figure of right answers anywhere [H4]', () => {
    const result = analyse(alone(7, 8, 2, 8));
    expect(result).not.toHaveProperty('correct');
    const portrait = sameDifferentPortrait(result);
    expect(portrait.figures.slice(0, 2).map(({ value }) => value)).toEqual(['7 / 8', '2 / 8']);
    const said = JSON.stringify([portrait.figures, portrait.conditions, portrait.distribution, portrait.listeners]);
    expect(said).not.toMatch(/right|correct/i);
  });
});

describe('the finding of same-different', () => {
  it('takes one row for each result, and no forbidden word [T8]', () => {
    const seen = new Set<string>();
    for (let hits = 0; hits <= 12; hits++)
      for (let falseAlarms = 0; falseAlarms <= 12; falseAlarms++) {
        const found = differenceFinding(analyse(alone(hits, 12, falseAlarms, 12)), context, sameDifferentWords);
        expect(finding.parse(found)).toEqual(found);
        seen.add(found.row);
        const said = [found.headline, ...found.modifiers, found.scope, found.maySay ?? ''].join(' ');
        expect(said).not.toMatch(
          /\bproves?\b|identical|cannot be heard|inaudible|95\s?% sure|probability of guessing|transparent/i,
        );
        expect(said).not.toMatch(/% right|Infinity|NaN/);
      }
    expect([...seen].sort()).toEqual(['1', '2', '5']);
  });

  it('says what was counted: hits and false alarms [H4] [T24]', () => {
    const found = differenceFinding(analyse(alone(7, 8, 2, 8)), context, sameDifferentWords);
    expect(found.headline).toBe('One listener told Northern run from Southern run more often than guessing allows.');
    expect(found.maySay).toContain(
      '“different” 7 times in 8 answers on different trials and 2 times in 8 on same ones, p = 0.0203',
    );
    expect(found.modifiers[0]).toMatch(/^“Different” was said on 88% of different trials and on 25% of same ones; d′ /);
  });

  it('says when the coins gave trials of one kind alone [H2]', () => {
    const found = differenceFinding(analyse(alone(5, 8, 0, 0)), context, sameDifferentWords);
    expect(found.row).toBe('5');
    expect(found.modifiers.join(' ')).toContain('The coins gave trials of one kind alone');
  });
});
