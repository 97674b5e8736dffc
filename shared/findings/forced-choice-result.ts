import { z } from 'zod';
import { amongListeners } from './among-listeners.ts';
import { count, decimal, interval, resultFrame } from './result-frame.ts';
import { sessionCheck } from './session-checks.ts';

export const limit = z.union([decimal, z.literal('Infinity')]);
const sensitivity = z.strictObject({ dPrime: limit, lower: limit, upper: limit });

export const listenerResult = z.strictObject({
  listener: z.string(),
  answers: count,
  missing: count,
  correct: count,
  /** Exact one-sided p of this listener's own answers; each of them faced a draw of its own. */
  p: decimal,
  /** The same, adjusted over all listeners by Holm's rule. */
  holmP: decimal,
  /** Whether the adjusted p reaches the level: only then may this listener be named. */
  isAboveGuessing: z.boolean(),
  /** Of the rate of right answers. */
  interval,
});
export type ListenerResult = z.output<typeof listenerResult>;

/** How the rate, its share above guessing and d′ are estimated. */
export const rateEstimates = z.strictObject({
  /** Clopper-Pearson where every answer has a draw of its own; in a group Student's t over trials, for this panel alone. */
  basis: z.enum(['own draws', 'trials']),
  correctRate: decimal,
  interval,
  /** Share of answers above guessing: as it comes, and with negative values set to 0. */
  aboveGuessing: z.strictObject({
    rawRate: decimal,
    rate: decimal,
    rawInterval: interval,
    interval,
    /** The dual of the registered test: above 0 when p lies below the level. */
    oneSidedLower: z.strictObject({ confidence: decimal, limit: decimal }),
    oneSidedUpper: z.strictObject({ confidence: decimal, limit: decimal }),
  }),
  /** By the method's rules of deciding. */
  dPrime: z.record(z.string(), sensitivity),
});
export type RateEstimates = z.output<typeof rateEstimates>;

/** For people of whom the listeners are a sample: by listeners, or by listeners and trials where they heard the same. */
const peopleEstimates = z.strictObject({
  basis: z.enum(['listeners', 'listeners and trials']),
  /** Whom the protocol says the listeners are drawn from. */
  samplingFrame: z.string(),
  interval,
  aboveGuessing: interval,
  /** Whether the lower limit lies above guessing: only then may a finding speak of listeners in general. */
  isAboveGuessing: z.boolean(),
});
export type PeopleEstimates = z.output<typeof peopleEstimates>;

/** What the registered analysis of a method with one right answer comes to, as it stands on the record. */
export const forcedChoiceResult = z.strictObject({
  ...resultFrame,
  method: z.enum(['abx', 'triangle', 'duo-trio', 'directional-comparison']),
  chance: z.strictObject({ numerator: z.literal(1), denominator: z.int().min(2) }),
  missingAnswers: z.enum(['counted as wrong', 'counted as wrong, as right against the margin']),
  /** The level is one-sided. */
  alternative: z.literal('greater'),
  /** Of what the first cable was to have more; there only where the method asks for it. */
  attribute: z.string().optional(),
  correct: count,
  /** Chance of so few right answers or fewer, missing answers left out; at .01 or less the labels are suspect. */
  lowerTail: decimal,
  isBelowGuessing: z.boolean(),
  byListener: z.array(listenerResult),
  estimates: rateEstimates.nullable(),
  /** There only where six listeners at least answered and the protocol says whom they are drawn from. */
  people: peopleEstimates.nullable(),
  /** The registered margin, and whether the one-sided upper limit of the share above guessing lies below it. */
  margin: z.strictObject({ share: decimal, confidence: decimal, isBelow: z.boolean() }).optional(),
  /**
   * How many times better guessing explains the answers than a share above guessing: spread evenly over 0 ... 1, and by
   * Beta(2, 2) of the rate above chance. In a group trials are counted, and the second is not given.
   */
  guessingFactor: z.strictObject({ uniform: decimal, middle: decimal.nullable() }).nullable(),
  amongListeners: amongListeners.nullable(),
  checks: z.array(sessionCheck),
});
export type ForcedChoiceResult = z.output<typeof forcedChoiceResult>;
