import { z } from 'zod';
import type { Fraction } from '../statistics/fraction.ts';
import { recordDecimalPattern } from './record-decimal.ts';

// What the registered results of all methods have in common, as they stand on the record: whole numbers and decimal
// text only.

export const decimal = z.string().regex(recordDecimalPattern);
export const count = z.int().min(0);
const digits = z.string().regex(/^\d+$/);

export const interval = z.strictObject({ confidence: decimal, lower: decimal, upper: decimal });

export const resultFrame = {
  randomisation: z.literal('independent fair draw per trial'),
  stopping: z.literal('fixed number of trials'),
  test: z.enum(['exact-binomial', 'shared-presentations', 'fixed-different-trials']),
  /** As registered. */
  alpha: z.string(),
  listenersPerSession: count,
  sessions: count,
  trials: count,
  listeners: count,
  /** Answers that were due, missing ones included. */
  answers: count,
  missing: count,
  p: z.strictObject({ numerator: digits, denominator: digits, value: decimal }),
  isSignificant: z.boolean(),
  /** Draws that could change the count, and the smallest p they allow. */
  coins: count,
  leastAttainableP: decimal,
  canReachAlpha: z.boolean(),
  /** What the binomial test had to reach; null in a group, where no fixed number can be promised. */
  critical: z.strictObject({ count: z.int(), attainedSize: decimal }).nullable(),
};
const frame = z.strictObject(resultFrame);
export type ResultFrame = z.output<typeof frame>;

/** At this lower tail or below, answers go against the draw more than guessing explains and the labels are suspect. */
export const suspectTail: Fraction = { numerator: 1n, denominator: 100n };
