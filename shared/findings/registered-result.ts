import { z } from 'zod';
import { recordDecimalPattern } from './record-decimal.ts';

// What the registered analysis comes to, as it stands on the record: whole numbers and decimal text only.

const decimal = z.string().regex(recordDecimalPattern);
const limit = z.union([decimal, z.literal('Infinity')]);
const count = z.int().min(0);
const digits = z.string().regex(/^\d+$/);

const interval = z.strictObject({ confidence: decimal, lower: decimal, upper: decimal });
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

/** Estimates that hold only where every answer has a draw of its own. */
export const pooledEstimates = z.strictObject({
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
  dPrime: z.strictObject({ differencing: sensitivity, independent: sensitivity }),
});
export type PooledEstimates = z.output<typeof pooledEstimates>;

export const registeredResult = z.strictObject({
  method: z.literal('abx'),
  randomisation: z.literal('independent fair draw per trial'),
  stopping: z.literal('fixed number of trials'),
  missingAnswers: z.literal('counted as wrong'),
  alternative: z.literal('greater'),
  test: z.enum(['exact-binomial', 'shared-presentations']),
  chance: z.strictObject({ numerator: z.literal(1), denominator: z.literal(2) }),
  /** As registered, one-sided. */
  alpha: z.string(),
  listenersPerSession: count,
  sessions: count,
  trials: count,
  listeners: count,
  answers: count,
  missing: count,
  correct: count,
  p: z.strictObject({ numerator: digits, denominator: digits, value: decimal }),
  isSignificant: z.boolean(),
  /** Chance of so few right answers or fewer, missing answers left out; at .01 or less the labels are suspect. */
  lowerTail: decimal,
  isBelowGuessing: z.boolean(),
  /** Draws that could change the count, and the smallest p they allow. */
  coins: count,
  leastAttainableP: decimal,
  canReachAlpha: z.boolean(),
  /** What the binomial test had to reach; null in a group, where no fixed number can be promised. */
  critical: z.strictObject({ count: z.int(), attainedSize: decimal }).nullable(),
  byListener: z.array(listenerResult),
  estimates: pooledEstimates.nullable(),
});
export type RegisteredResult = z.output<typeof registeredResult>;
