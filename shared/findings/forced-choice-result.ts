import { z } from 'zod';
import { count, decimal, interval, resultFrame } from './result-frame.ts';

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
  /** By the method's rules of deciding. */
  dPrime: z.record(z.string(), sensitivity),
});
export type PooledEstimates = z.output<typeof pooledEstimates>;

/** What the registered analysis of a method with one right answer comes to, as it stands on the record. */
export const forcedChoiceResult = z.strictObject({
  ...resultFrame,
  method: z.enum(['abx', 'triangle', 'duo-trio', 'directional-comparison']),
  chance: z.strictObject({ numerator: z.literal(1), denominator: z.int().min(2) }),
  missingAnswers: z.literal('counted as wrong'),
  /** The level is one-sided. */
  alternative: z.literal('greater'),
  /** Of what the first cable was to have more; there only where the method asks for it. */
  attribute: z.string().optional(),
  correct: count,
  /** Chance of so few right answers or fewer, missing answers left out; at .01 or less the labels are suspect. */
  lowerTail: decimal,
  isBelowGuessing: z.boolean(),
  byListener: z.array(listenerResult),
  estimates: pooledEstimates.nullable(),
});
export type ForcedChoiceResult = z.output<typeof forcedChoiceResult>;
