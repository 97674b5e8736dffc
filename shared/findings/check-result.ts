import { z } from 'zod';
import { registeredResult } from '../methods/methods.ts';
import { count, decimal } from './result-frame.ts';

// What check trials come to, as it stands on the record beside the registered result: whole numbers and decimal text.

const rate = z.strictObject({ label: z.string(), counted: count, due: count, missing: count });

const test = z.strictObject({
  name: z.string(),
  p: z.strictObject({ numerator: z.string(), denominator: z.string(), value: decimal }),
  leastAttainableP: decimal,
  canReachAlpha: z.boolean(),
});

const step = {
  milliDb: z.int(),
  trials: count,
  answers: count,
  missing: count,
  /** In the method's own rates: right answers, or hits and false alarms. */
  rates: z.array(rate),
  /** Null where no trial of the step was locked. */
  test: test.nullable(),
  /** Whether p reached the registered level here and on every larger step. */
  isHeard: z.boolean(),
  /** Steps are asked from large to small; after the first that was not heard no other is. */
  isAsked: z.boolean(),
};
export const checkStep = z.strictObject(step);
export type CheckStep = z.output<typeof checkStep>;

const listenerSteps = z.strictObject({
  listener: z.string(),
  steps: z.array(checkStep),
  /** The smallest step that this listener heard, by their own answers alone; null for none. */
  sensitiveTo: z.int().nullable(),
});

export const checkResult = z.strictObject({
  /** The registered level, one-sided, that every step is held against. */
  alpha: z.string(),
  /** From the largest to the smallest. */
  steps: z.array(checkStep),
  /** The smallest step that the panel heard, all larger ones heard too; null for none. */
  sensitiveTo: z.int().nullable(),
  byListener: z.array(listenerSteps),
  /** The reference cable with itself: no answer is right, and the answers show habits. */
  same: z.strictObject({
    trials: count,
    answers: count,
    missing: count,
    choices: z.array(z.strictObject({ choice: z.string(), count })),
  }),
  /** The main trials once more without those who did not hear the largest step; only where that is registered. */
  second: z
    .strictObject({
      excluded: z.array(z.string()),
      /** Null where nobody is left. */
      result: registeredResult.nullable(),
    })
    .optional(),
});
export type CheckResult = z.output<typeof checkResult>;

/** What a finding asks of check trials: the largest step with its size and whether it was heard, and how far down. */
export type KnownDifferences = {
  readonly largest: { readonly milliDb: number; readonly isHeard: boolean; readonly canReachAlpha: boolean };
  readonly sensitiveTo: number | null;
};

/** What a finding asks of check trials; null where no step was registered, so that nothing is known. */
export function knownDifferences(checks: CheckResult | undefined): KnownDifferences | null {
  const largest = checks?.steps[0];
  if (checks === undefined || largest === undefined) return null;
  const { milliDb, isHeard, test: asked } = largest;
  return {
    largest: { milliDb, isHeard, canReachAlpha: asked?.canReachAlpha ?? false },
    sensitiveTo: checks.sensitiveTo,
  };
}
