import { z } from 'zod';
import { count, decimal, interval, resultFrame } from './result-frame.ts';
import { sessionCheck } from './session-checks.ts';

// The two cables stand in the protocol's order everywhere: 0 is its first cable, 1 its second.

const cable = z.union([z.literal(0), z.literal(1)]);
const perCable = z.tuple([count, count]);

export const listenerPreference = z.strictObject({
  listener: z.string(),
  answers: count,
  missing: count,
  /** Answers that stated no preference. */
  undecided: count,
  preferred: perCable,
  /** Exact two-sided p of this listener's own answers that preferred one; each of them faced a draw of its own. */
  p: decimal,
  /** The same, adjusted over all listeners by Holm's rule. */
  holmP: decimal,
  /** The cable that the adjusted p allows to name as this listener's, or null. */
  favours: cable.nullable(),
  /** Of the share of the first cable among the answers that preferred one; null when none did. */
  interval: interval.nullable(),
});
export type ListenerPreference = z.output<typeof listenerPreference>;

/** What the registered analysis of a paired preference comes to, as it stands on the record. */
export const preferenceResult = z.strictObject({
  ...resultFrame,
  method: z.literal('paired-preference'),
  missingAnswers: z.literal('left out'),
  alternative: z.literal('two-sided'),
  chance: z.strictObject({ numerator: z.literal(1), denominator: z.literal(2) }),
  noPreference: z.enum(['offered, left out of the test', 'not offered']),
  undecided: count,
  /** Answers that preferred one cable: what the test runs over. */
  decided: count,
  preferred: perCable,
  /** No answer of a preference is right or wrong, so there is never such a figure. */
  correct: z.never().optional(),
  /** The cable with more answers, or null when both have as many. */
  favours: cable.nullable(),
  /** Answers that preferred whichever cable was heard first; a habit, which the draw makes harmless. */
  heardFirst: count,
  byListener: z.array(listenerPreference),
  /** Listeners by the cable that most of their own answers preferred, and the exact two-sided sign test over them. */
  majorities: z.strictObject({ preferred: perCable, even: count, p: decimal, holdsForPeople: z.boolean() }),
  /**
   * The first cable's share of the answers that preferred one: Clopper-Pearson where every answer has a draw of its own, in
   * a group Student's t over trials, for this panel alone.
   */
  estimates: z.strictObject({ basis: z.enum(['own draws', 'trials']), share: decimal, interval }).nullable(),
  /** The registered margin about one half, and whether the listeners' majorities lie within it by two one-sided tests. */
  margin: z.strictObject({ share: decimal, confidence: decimal, isWithin: z.boolean() }).optional(),
  checks: z.array(sessionCheck),
});
export type PreferenceResult = z.output<typeof preferenceResult>;
