import { z } from 'zod';
import { limit } from './forced-choice-result.ts';
import { count, decimal, interval, resultFrame } from './result-frame.ts';
import { sessionCheck } from './session-checks.ts';

/** Answers due on trials of one kind. */
const answersOn = z.strictObject({ answers: count, different: count, same: count, missing: count });

export const sameDifferentListener = z.strictObject({
  listener: z.string(),
  answers: count,
  missing: count,
  onDifferent: answersOn,
  onSame: answersOn,
  /** Fisher's exact test of this listener's own answers, one-sided; each of them faced a draw of its own. */
  p: decimal,
  /** The same, adjusted over all listeners by Holm's rule. */
  holmP: decimal,
  /** Whether the adjusted p reaches the level: only then may this listener be named. */
  isAboveGuessing: z.boolean(),
  /** Of the rates of "different"; null where no trial of the kind was due. */
  hitInterval: interval.nullable(),
  falseAlarmInterval: interval.nullable(),
});
export type SameDifferentListener = z.output<typeof sameDifferentListener>;

/** What the registered analysis of same-different comes to, as it stands on the record. */
export const sameDifferentResult = z.strictObject({
  ...resultFrame,
  method: z.literal('same-different'),
  missingAnswers: z.literal('counted as wrong'),
  /** The level is one-sided. */
  alternative: z.literal('greater'),
  /** There is no percentage of right answers: it would mix hits with a habit of saying "different". */
  correct: z.never().optional(),
  /** Trials whose two cables were different ones; how many there were was left to the coins. */
  differentTrials: count,
  onDifferent: answersOn,
  onSame: answersOn,
  /** Chance of so few hits or fewer, missing answers left out; at .01 or less the labels are suspect. */
  lowerTail: decimal,
  isBelowGuessing: z.boolean(),
  byListener: z.array(sameDifferentListener),
  /** Where trials of both kinds came; null where limits cannot be had. */
  estimates: z
    .strictObject({
      /** Exact limits where every answer has a draw of its own; in a group Student's t over trials, for this panel alone. */
      basis: z.enum(['own draws', 'trials']),
      hitRate: decimal,
      hitInterval: interval,
      falseAlarmRate: decimal,
      falseAlarmInterval: interval,
      /** By differences; the limits hold for both rates together. */
      dPrime: z.strictObject({ dPrime: limit, lower: limit, upper: limit, criterion: limit }),
    })
    .nullable(),
  checks: z.array(sessionCheck),
});
export type SameDifferentResult = z.output<typeof sameDifferentResult>;
