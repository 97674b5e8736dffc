import { z } from 'zod';

/** Who is left out of a second result, where a study registers it. */
export const checkExclusion =
  'a second result leaves out listeners who do not hear the largest step of the check trials';

/** The registered analysis as a value: what is run once at closing, fixed before data. Part of the sealed protocol. */
export const registeredAnalysis = z.strictObject({
  /** The method's module and the version of its analysis, such as 'abx/1'. */
  name: z.string(),
  /** Significance level as decimal text. */
  alpha: z.string(),
  alternative: z.enum(['greater', 'two-sided']),
  /** Against a margin silence counts as right: either way it stands against whoever would gain by it. */
  missing: z.enum(['counted as wrong', 'counted as wrong, as right against the margin', 'left out']),
  /** Answers that state no preference; there only where the study offers that answer. */
  undecided: z.literal('left out').optional(),
  /** Which cable is expected to have more of the attribute; there only where the method asks for one. */
  direction: z.literal('more in the first cable').optional(),
  /** As decimal text, by the method's scale: a result whose limit lies below it shows that an effect is small. */
  margin: z.string().optional(),
  stopping: z.literal('fixed number of trials'),
  /** The all-listeners result comes first, whatever is registered here. */
  exclusions: z.enum(['none', checkExclusion]),
});
export type RegisteredAnalysis = z.output<typeof registeredAnalysis>;

/** A margin as decimal text: 20 per cent is '0.2'. */
export function marginText(percent: number): string {
  return (percent / 100).toString();
}
