import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type AnswerCourse, checkModifiers, coursesOf, sessionChecks } from '#shared/findings/session-checks.ts';

const course = (
  marks: string,
  right = (index: number) => (index % 2 === 0 ? 'A' : 'B'),
  listener = 'L01',
): AnswerCourse => ({
  listener,
  answers: [...marks].map((mark, index) => {
    const truth = right(index);
    return { right: truth, choice: mark === '+' ? truth : truth === 'A' ? 'B' : 'A' };
  }),
});
const tailOf = (courses: readonly AnswerCourse[], check: string) =>
  Number(sessionChecks(courses, ['A', 'B']).find((one) => one.check === check)?.tail);

describe('checks of the answers', () => {
  // R: 2 * 2 / choose(16, 8), Wald and Wolfowitz's exact count
  it('find right and wrong answers that come in blocks [T40]', () => {
    expect(tailOf([course('++++++++--------')], 'runs')).toBeCloseTo(0.000310800310800311, 12);
  });

  // R: prop.trend.test(c(4, 4, 1, 0), rep(4, 4))
  it('find a fall over the quarters, and ask fewer than sixteen answers nothing [T40]', () => {
    expect(tailOf([course('++++++++-+------')], 'trend')).toBeCloseTo(0.0007232327, 9);
    expect(tailOf([course('++++++++-+-----')], 'trend')).toBeNaN();
  });

  // R: binom.test(14, 16)$p.value; fisher.test(matrix(c(8, 0, 2, 6), 2))$p.value
  it('find a habit of one answer, and right answers that hang on what was right [T40]', () => {
    const always = (given: number): AnswerCourse => ({
      listener: 'L01',
      answers: Array.from({ length: 16 }, (_, index) => ({
        right: index % 2 === 0 ? 'A' : 'B',
        choice: index >= 2 && index < 2 + given ? 'A' : 'B',
      })),
    });
    expect(tailOf([always(14)], 'habit')).toBeCloseTo(0.00418090820312, 12);
    const placed: AnswerCourse = {
      listener: 'L01',
      answers: Array.from({ length: 16 }, (_, index) => ({
        right: index < 8 ? 'A' : 'B',
        choice: index < 8 || index >= 10 ? 'A' : 'B',
      })),
    };
    expect(tailOf([placed], 'place')).toBeCloseTo(0.00699300699300699, 12);
  });

  it('adjust the smallest tail for how many listeners there are, and name whose it is [T40]', () => {
    const quiet = course('+-++-+--+-++--+-', undefined, 'L02');
    const [, , , runs] = sessionChecks([quiet, course('++++++++--------', undefined, 'L07')], ['A', 'B']);
    expect(runs).toMatchObject({ check: 'runs', listener: 'L07', isFlagged: true });
    expect(Number(runs?.tail)).toBeCloseTo(2 * 0.000310800310800311, 12);
    expect(checkModifiers(runs === undefined ? [] : [runs])).toEqual([
      'Caution: L07 was right and wrong in longer or shorter runs, beyond chance; it changes no figure.',
    ]);
    expect(checkModifiers(sessionChecks([quiet], ['A', 'B']))).toEqual([]);
  });

  it('leave missing answers out and take sessions and trials in their order [T40]', () => {
    expect(
      coursesOf([
        { session: 2, trial: 1, right: 'B', answers: [{ listener: 'L01', choice: 'B' }] },
        { session: 1, trial: 2, right: 'A', answers: [{ listener: 'L01', choice: null }] },
        { session: 1, trial: 1, right: 'A', answers: [{ listener: 'L01', choice: 'B' }] },
      ]),
    ).toEqual([
      {
        listener: 'L01',
        answers: [
          { choice: 'B', right: 'A' },
          { choice: 'B', right: 'B' },
        ],
      },
    ]);
  });

  it('flag guessers seldom: at most one in a hundred for each check [T40]', () => {
    // Every order of 12 guesses with six of each label right: 4096 courses.
    const flagged = { habit: 0, place: 0, runs: 0 };
    for (let code = 0; code < 4096; code += 1) {
      const marks = Array.from({ length: 12 }, (_, index) => ((code >> index) & 1 ? '+' : '-')).join('');
      for (const { check, isFlagged } of sessionChecks([course(marks)], ['A', 'B']))
        if (isFlagged && check in flagged) flagged[check as keyof typeof flagged] += 1;
    }
    for (const count of Object.values(flagged)) expect(count).toBeLessThanOrEqual(0.01 * 4096);
    expect(flagged.runs).toBeGreaterThan(0);
  });

  it('give tails from 0 to 1 for whatever was answered [T40]', () => {
    const answers = fc.array(
      fc.record({ choice: fc.constantFrom('1', '2', '3'), right: fc.constantFrom('1', '2', '3') }),
      {
        maxLength: 40,
      },
    );
    fc.assert(
      fc.property(fc.array(answers, { maxLength: 4 }), (given) => {
        const courses = given.map((own, index) => ({ listener: `L0${index + 1}`, answers: own }));
        for (const { tail } of sessionChecks(courses, ['1', '2', '3'])) {
          expect(Number(tail)).toBeGreaterThanOrEqual(0);
          expect(Number(tail)).toBeLessThanOrEqual(1);
        }
      }),
    );
  });
});
