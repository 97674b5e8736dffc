import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analysePreference } from '#shared/findings/analyse-preference.ts';
import { preferenceResult } from '#shared/findings/preference-result.ts';
import type { PreferenceChoice, PreferenceTrial } from '#shared/findings/preference-trials.ts';
import { recordDecimal } from '#shared/findings/record-decimal.ts';
import { canonicalJson, type Json } from '#shared/ledger/canonical-json.ts';
import { pairedPreference } from '#shared/methods/paired-preference.ts';
import { expectClose, reference } from '../../support/reference.ts';

const choice = fc.constantFrom<PreferenceChoice>('first', 'second', 'none', null);

/** Up to some trials of up to three listeners; each draw and each answer as it comes. */
const rows = (mostTrials: number, listeners: number) =>
  fc.integer({ min: 1, max: listeners }).chain((seats) =>
    fc.array(
      fc.record({
        truth: fc.constantFrom('first' as const, 'second' as const),
        choices: fc.array(choice, { minLength: seats, maxLength: seats }),
      }),
      { minLength: 1, maxLength: mostTrials },
    ),
  );

type Row = { truth: 'first' | 'second'; choices: readonly PreferenceChoice[] };
const study = (given: readonly Row[]): PreferenceTrial[] =>
  given.map(({ truth, choices }, index) => ({
    session: 1,
    trial: index + 1,
    truth,
    answers: choices.map((own, seat) => ({ listener: `L0${seat + 1}`, choice: own })),
  }));

const analyse = (trials: readonly PreferenceTrial[], alpha = '0.05') =>
  analysePreference({ alpha, listenersPerSession: 3, offersNoPreference: true, trials });

const places = { 1: 'first', 2: 'second', 0: 'none', [-1]: null } as const;
type Studied = {
  inputs: { truth: (0 | 1)[]; choices: (keyof typeof places)[][] };
  expected: {
    preferred: [number, number];
    undecided: number;
    missing: number;
    p: number;
    own: number[];
    holm: number[];
    signP: number;
  };
};

describe('the registered analysis of a paired preference', () => {
  it('gives what R gives when it goes through every draw of a study [F2] [F3] [F5]', () => {
    const records = reference<Studied['inputs'], Studied['expected']>('preference.json').filter(
      ({ fn }) => fn === 'study',
    );
    expect(records.length).toBe(24);
    for (const { id, inputs, expected, tol } of records) {
      const result = analyse(
        study(
          inputs.choices.map((choices, index) => ({
            truth: inputs.truth[index] === 0 ? 'first' : 'second',
            choices: choices.map((own) => places[own]),
          })),
        ),
      );
      const { preferred, undecided, missing } = result;
      const wanted = { preferred: expected.preferred, undecided: expected.undecided, missing: expected.missing };
      expect({ preferred, undecided, missing }, id).toEqual(wanted);
      expectClose(Number(result.p.value), expected.p, tol, 0, id);
      expectClose(Number(result.majorities.p), expected.signP, tol, 0, `${id} sign test`);
      for (const [index, own] of result.byListener.entries()) {
        expectClose(Number(own.p), expected.own[index] ?? Number.NaN, tol, 0, `${id} ${own.listener}`);
        expectClose(Number(own.holmP), expected.holm[index] ?? Number.NaN, tol, 0, `${id} ${own.listener} by Holm`);
      }
    }
  });

  it('leaves out what was not preferred: without those answers nothing of the test changes [F2]', () => {
    fc.assert(
      fc.property(rows(8, 3), (given) => {
        const all = analyse(study(given));
        const only = analyse(
          study(given).map((trial) => ({
            ...trial,
            answers: trial.answers.filter(({ choice: own }) => own === 'first' || own === 'second'),
          })),
        );
        expect(only.p).toEqual(all.p);
        expect(only.preferred).toEqual(all.preferred);
        expect(only.coins).toBe(all.coins);
        expect(all.answers).toBe(all.decided + all.undecided + all.missing);
        expect(only.undecided + only.missing).toBe(0);
      }),
    );
  });

  it('keeps its level over all draws, whatever the answers are [F3]', () => {
    fc.assert(
      fc.property(rows(6, 3), fc.constantFrom('0.05', '0.1', '0.2'), (given, alpha) => {
        const draws = 2 ** given.length;
        let found = 0;
        for (let draw = 0; draw < draws; draw += 1) {
          const redrawn = given.map((row, index) => ({
            ...row,
            truth: (draw >> index) % 2 === 0 ? ('first' as const) : ('second' as const),
          }));
          if (analyse(study(redrawn), alpha).isSignificant) found += 1;
        }
        expect(found / draws).toBeLessThanOrEqual(Number(alpha));
      }),
      { numRuns: 60 },
    );
  });

  it('does not care which cable the protocol names first [F3]', () => {
    fc.assert(
      fc.property(rows(8, 3), (given) => {
        const turned = given.map((row) => ({
          ...row,
          truth: row.truth === 'first' ? ('second' as const) : ('first' as const),
        }));
        const [one, other] = [analyse(study(given)), analyse(study(turned))];
        expect(other.p).toEqual(one.p);
        expect(other.preferred).toEqual([one.preferred[1], one.preferred[0]]);
        expect(other.heardFirst).toBe(one.heardFirst);
      }),
    );
  });

  it('is not moved by a habit of choosing the first: only the draw decides its p [F3]', () => {
    // Twelve trials, always “first”: the draws alone make it 6 : 6, and p is 1.
    const habit = study(
      Array.from({ length: 12 }, (_, index) => ({
        truth: index % 2 === 0 ? ('first' as const) : ('second' as const),
        choices: ['first'] as const,
      })),
    );
    expect(analyse(habit)).toMatchObject({ preferred: [6, 6], heardFirst: 12, favours: null, isSignificant: false });
    expect(analyse(habit).p).toMatchObject({ numerator: '1', denominator: '1' });
  });

  // Two halves of a panel, each consistent: a small p over answers when one half is larger, and no sentence about people.
  it('says more people only where people are tested too, and on the same side [F5]', () => {
    const panel = (forFirst: number, forSecond: number, trials: number) =>
      analyse(
        study(
          Array.from({ length: trials }, (_, index) => {
            const truth = index % 2 === 0 ? ('first' as const) : ('second' as const);
            const other = truth === 'first' ? ('second' as const) : ('first' as const);
            return {
              truth,
              choices: [...Array(forFirst).fill(truth), ...Array(forSecond).fill(other)] as PreferenceChoice[],
            };
          }),
        ),
      );
    const divided = panel(5, 3, 10);
    expect(divided.isSignificant).toBe(true);
    expect(divided.majorities).toMatchObject({ preferred: [5, 3], even: 0, holdsForPeople: false });
    const united = panel(9, 1, 10);
    expect(united.majorities).toMatchObject({ preferred: [9, 1], holdsForPeople: true });
    // R: binom.test(9, 10)$p.value
    expectClose(Number(united.majorities.p), 0.021484375, 1e-10, 0, 'sign test');
    expect(panel(9, 1, 4).majorities.holdsForPeople).toBe(false);
  });

  it('gives an interval by answers with draws of their own, and by trials in a group [F4]', () => {
    const own = analyse(study([{ truth: 'first', choices: ['first'] }]));
    const shared = analyse(study([{ truth: 'first', choices: ['first', 'first'] }]));
    expect([own.test, shared.test]).toEqual(['exact-binomial', 'shared-presentations']);
    expect(own.estimates?.basis).toBe('own draws');
    expect(shared.estimates).toBeNull();
    // R: trials of two answers each, for the first cable 2, 2, 1, 0: .625 +- qt(.975, 3) * sqrt(4/3 * 2.75) / 8
    const panel = analyse(
      study([
        { truth: 'first', choices: ['first', 'first'] },
        { truth: 'second', choices: ['second', 'second'] },
        { truth: 'first', choices: ['first', 'second'] },
        { truth: 'second', choices: ['first', 'first'] },
      ]),
    );
    expect(panel.estimates).toMatchObject({ basis: 'trials', share: '0.625000000000' });
    expectClose(Number(panel.estimates?.interval.lower), 0, 1e-10, 1, 'lower');
    expectClose(Number(panel.estimates?.interval.upper), 1, 1e-10, 1, 'upper');
    expect(analyse(study([{ truth: 'first', choices: ['none'] }])).estimates).toBeNull();
  });

  it('leaves out a half just where p reaches the level [F4]', () => {
    for (let trials = 1; trials <= 40; trials += 1)
      for (let first = 0; first <= trials; first += 1)
        for (const alpha of ['0.05', '0.01']) {
          const { isSignificant, estimates } = analyse(
            study(
              Array.from({ length: trials }, (_, index) => ({
                truth: 'first' as const,
                choices: [index < first ? ('first' as const) : ('second' as const)],
              })),
            ),
            alpha,
          );
          const { lower, upper } = estimates?.interval ?? { lower: '0', upper: '1' };
          expect(Number(lower) > 0.5 || Number(upper) < 0.5, `${first} of ${trials} at ${alpha}`).toBe(isSignificant);
        }
  });

  it('is a plain value that the record can hold, and has no NaN in it [F2]', () => {
    fc.assert(
      fc.property(rows(6, 3), (given) => {
        const result = analyse(study(given));
        expect(preferenceResult.parse(JSON.parse(canonicalJson(result as unknown as Json)))).toEqual(result);
      }),
    );
    expect(analyse([])).toMatchObject({ decided: 0, favours: null, isSignificant: false, estimates: null });
    expect(analyse([]).p.value).toBe(recordDecimal(1));
  });

  it('draws p as a picture: the bars as far from the middle add up to it [F3]', () => {
    fc.assert(
      fc.property(rows(8, 3), (given) => {
        const trials = study(given);
        const result = analyse(trials);
        const { beyond } = pairedPreference.portray(result, ['one', 'other']).distribution;
        const bars = pairedPreference.nullDistribution(trials);
        const far = bars.filter(({ count }) => count <= (beyond?.low ?? -1) || count >= (beyond?.high ?? -1));
        expectClose(
          far.reduce((sum, { chance }) => sum + chance, 0),
          Number(result.p.value),
          1e-11,
          0,
          'the bars',
        );
      }),
    );
  });

  it('refuses what cannot be: a level out of range, a trial twice, an answer that was not offered [F2]', () => {
    const trials = study([{ truth: 'first', choices: ['none'] }]);
    expect(() => analyse(trials, '1')).toThrow(RangeError);
    expect(() => analyse([...trials, ...trials])).toThrow('comes twice');
    expect(() =>
      analysePreference({ alpha: '0.05', listenersPerSession: 1, offersNoPreference: false, trials }),
    ).toThrow('no preference');
  });
});
