import { z } from 'zod';
import { recordDecimalPattern } from '../findings/record-decimal.ts';

const decimal = z.string().regex(recordDecimalPattern);

/** One cue and one question about it, as it stands on the record. */
export const cueLine = z.strictObject({
  /** `step/fit`, `change`, `listening`, `before`, `gap`, `answering`, `position`, `previous` or `alternation`. */
  cue: z.string(),
  /** truth: does the cue tell what was drawn? answers: do answers follow it, and better than what was drawn? */
  question: z.enum(['truth', 'answers']),
  /** In which way it told the most. */
  contrast: z.enum(['answer', 'cable', 'changed']),
  /** Which answer against the others, where there are more than two; whose answers, where they are looked at one by one. */
  label: z.string().nullable(),
  listener: z.string().nullable(),
  p: decimal,
  /** The same by Holm's rule over all lines. */
  adjusted: decimal,
  isFound: z.boolean(),
  /** Mean on one side less mean on the other: seconds, places in the session; or how often, and how often by chance. */
  effect: decimal.nullable(),
  expected: decimal.nullable(),
});
export type CueLine = z.output<typeof cueLine>;

/** What the cue audit of a closed study comes to. It claims nothing and changes no figure. */
export const cueAuditResult = z.strictObject({
  version: z.literal(1),
  /** At most so often something is found in a study where nothing but the sound told anything. */
  level: decimal,
  trials: z.int().min(0),
  /** Orders of the trials that were tried for whether answers follow a cue. */
  orders: z.int(),
  /** Whether so many trials could have shown anything at all. */
  couldFind: z.boolean(),
  lines: z.array(cueLine),
});
export type CueAuditResult = z.output<typeof cueAuditResult>;
