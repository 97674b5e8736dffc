import { z } from 'zod';
import type { PortrayedCheck } from '../methods/portrait.ts';
import { binomialTest } from '../statistics/binomial-test.ts';
import { fisherExactTest } from '../statistics/fisher-exact.ts';
import { runsTest } from '../statistics/runs-test.ts';
import { trendTest } from '../statistics/trend-test.ts';
import { formatProbability } from './format-probability.ts';
import { recordDecimal } from './record-decimal.ts';
import { decimal } from './result-frame.ts';

// Checks of how the answers came about. They change no figure and drop no answer; what is flagged is said beside the finding.

export const checkNames = ['habit', 'place', 'trend', 'runs'] as const;
type CheckName = (typeof checkNames)[number];

export const sessionCheck = z.strictObject({
  /**
   * habit: one answer given more often than the others. place: more right answers where one label was right than where
   * others were. trend: right answers rise or fall over the quarters. runs: right and wrong in too long or too short runs.
   */
  check: z.enum(checkNames),
  /** The smallest tail among the listeners, adjusted for how many there are by Bonferroni. */
  tail: decimal,
  /** Whose it is. */
  listener: z.string(),
  isFlagged: z.boolean(),
});
export type SessionCheck = z.output<typeof sessionCheck>;

/** At this adjusted tail or below a caution is said (common practice, no source). */
const cautionAt = 0.01;

/** One listener's answers in the order in which they came; missing ones are not among them. */
export type AnswerCourse = {
  readonly listener: string;
  readonly answers: readonly { readonly choice: string; readonly right: string }[];
};

/**
 * Each check over all listeners. One listener gives one answer per trial, so that every check is sound for each of them in
 * a group too; taking the smallest tail times their number is sound however alike they answer.
 *
 * @param courses  what each listener answered, in order
 * @param labels   the answers to choose from, as likely to be right as each other
 * @param names    the checks to make: habit and place are no faults where a habit is part of the method's measure
 * @returns one entry for each check that anybody's answers allow
 * @example a listener who is right in the first 8 of 16 trials and wrong in the rest: runs 2/12870 * 2 = 0.0003, flagged
 * @see runsTest, trendTest, fisherExactTest and binomialTest for the sources; Bonferroni's inequality
 */
export function sessionChecks(
  courses: readonly AnswerCourse[],
  labels: readonly string[],
  names: readonly CheckName[] = checkNames,
): SessionCheck[] {
  const tailOf: Record<CheckName, (course: AnswerCourse) => number | null> = {
    habit: (course) => habitOf(course, labels),
    place: (course) => placeOf(course, labels),
    trend: trendOf,
    runs: runsOf,
  };
  return names.flatMap((check) => {
    const tails = courses.flatMap((course) => {
      const tail = tailOf[check](course);
      return tail === null ? [] : [{ listener: course.listener, tail }];
    });
    const [first, ...others] = tails;
    if (first === undefined) return [];
    const smallest = others.reduce((least, other) => (other.tail < least.tail ? other : least), first);
    const adjusted = Math.min(1, smallest.tail * tails.length);
    return [{ check, tail: recordDecimal(adjusted), listener: smallest.listener, isFlagged: adjusted <= cautionAt }];
  });
}

/** Trials as checks read them. */
type CourseTrial = {
  readonly session: number;
  readonly trial: number;
  readonly right: string;
  readonly answers: readonly { readonly listener: string; readonly choice: string | null }[];
};

/**
 * What each listener answered, in the order of sessions and trials; missing answers are left out.
 *
 * @returns one course for each listener who answered, in the order of their labels
 */
export function coursesOf(trials: readonly CourseTrial[]): AnswerCourse[] {
  const courses = new Map<string, { choice: string; right: string }[]>();
  const inOrder = [...trials].sort((a, b) => a.session - b.session || a.trial - b.trial);
  for (const { right, answers } of inOrder)
    for (const { listener, choice } of answers) {
      if (choice === null) continue;
      const course = courses.get(listener);
      if (course === undefined) courses.set(listener, [{ choice, right }]);
      else course.push({ choice, right });
    }
  return [...courses].sort(([a], [b]) => (a < b ? -1 : 1)).map(([listener, answers]) => ({ listener, answers }));
}

const isRight = ({ choice, right }: AnswerCourse['answers'][number]) => choice === right;

/** Each label against its share, two-sided; two labels are one question. */
function habitOf({ answers }: AnswerCourse, labels: readonly string[]): number | null {
  if (answers.length === 0) return null;
  const chance = { numerator: 1, denominator: labels.length };
  const tails = asked(labels).map(
    (label) =>
      binomialTest(answers.filter(({ choice }) => choice === label).length, answers.length, chance, 'two-sided').p,
  );
  return Math.min(1, Math.min(...tails) * tails.length);
}

/** Right answers where one label was right against those where another was. */
function placeOf({ answers }: AnswerCourse, labels: readonly string[]): number | null {
  const tails = asked(labels).flatMap((label) => {
    const here = answers.filter(({ right }) => right === label);
    const elsewhere = answers.filter(({ right }) => right !== label);
    if (here.length === 0 || elsewhere.length === 0) return [];
    const row = (of: AnswerCourse['answers']): [number, number] => {
      const right = of.filter(isRight).length;
      return [right, of.length - right];
    };
    return [fisherExactTest([row(here), row(elsewhere)], 'two-sided').p];
  });
  return tails.length === 0 ? null : Math.min(1, Math.min(...tails) * tails.length);
}

const asked = (labels: readonly string[]) => (labels.length === 2 ? labels.slice(0, 1) : labels);

const quarters = 4;

/** Over quarters, of four answers each at the least: the approximation says nothing of fewer. */
function trendOf({ answers }: AnswerCourse): number | null {
  if (answers.length < quarters * quarters) return null;
  const groups = Array.from({ length: quarters }, (_, quarter) => {
    const from = Math.floor((quarter * answers.length) / quarters);
    const to = Math.floor(((quarter + 1) * answers.length) / quarters);
    const own = answers.slice(from, to);
    return { successes: own.filter(isRight).length, trials: own.length, score: quarter };
  });
  return trendTest(groups).p;
}

function runsOf({ answers }: AnswerCourse): number | null {
  if (answers.length === 0) return null;
  const marks = answers.map(isRight);
  const right = marks.filter((mark) => mark).length;
  const runs = 1 + marks.filter((mark, index) => index > 0 && mark !== marks[index - 1]).length;
  return runsTest(right, marks.length - right, runs).pTwoSided;
}

const said: Record<CheckName, { readonly name: string; readonly found: string }> = {
  habit: { name: 'One answer preferred', found: 'gave one answer more often than the others' },
  place: {
    name: 'Right answers by place',
    found: 'was right more often where one answer was the right one than where another was',
  },
  trend: {
    name: 'Rise or fall over the quarters',
    found: 'was right more often at one end of the session than at the other',
  },
  runs: { name: 'Runs of right and wrong', found: 'was right and wrong in longer or shorter runs' },
};

/** What flagged checks add to a finding: a caution, and no new p. */
export function checkModifiers(checks: readonly SessionCheck[]): string[] {
  return checks
    .filter(({ isFlagged }) => isFlagged)
    .map(({ check, listener }) => `Caution: ${listener} ${said[check].found}, beyond chance; it changes no figure.`);
}

/** The checks as a report shows them, the flagged ones with whom they concern. */
export function portrayChecks(checks: readonly SessionCheck[]): PortrayedCheck[] {
  return checks.map(({ check, tail, listener, isFlagged }) => ({
    name: said[check].name,
    tail: formatProbability(Number(tail)),
    isFlagged,
    words: isFlagged ? `${listener} ${said[check].found}` : 'nothing beyond chance',
  }));
}
