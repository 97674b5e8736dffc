import * as z from 'zod/mini';

// What a listener says beside the trials: after the last one, and how tired they are at a break. Read by nobody before closing.

const say = (most: number) => z.string().check(z.maxLength(most, `At most ${most} characters`));
const salt = z.string().check(z.regex(/^[0-9a-f]{32}$/));

export const fatigues = ['fresh', 'all right', 'tired'] as const;
export type Fatigue = (typeof fatigues)[number];

export const exitLimits = { wentBy: 500, what: 300, guess: 200 } as const;

/** Each may be left empty. Guesses stand in the order in which they were asked. */
export const exitAnswers = z.strictObject({
  wentBy: say(exitLimits.wentBy),
  /** Whether anything but the music was heard, seen or felt; null where it was left open. */
  noticed: z.nullable(z.enum(['yes', 'no'])),
  what: say(exitLimits.what),
  guesses: z.array(say(exitLimits.guess)).check(z.maxLength(4)),
});
export type ExitAnswers = z.output<typeof exitAnswers>;

/** What a remark is about, as it stands on the record: the end, or a break by its number. */
export const remarkAbout = z.string().check(z.regex(/^(exit|break\/[1-9]\d{0,2})$/));

export const exitCommand = z.strictObject({ kind: z.literal('exit'), salt, answers: exitAnswers });
export const fatigueCommand = z.strictObject({
  kind: z.literal('fatigue'),
  salt,
  break: z.int().check(z.positive(), z.maximum(999)),
  fatigue: z.enum(fatigues),
});
export type RemarkCommand = z.output<typeof exitCommand> | z.output<typeof fatigueCommand>;

/** What a remark says, as its leaf is made of it. */
export const remarkSaid = z.union([exitAnswers, z.strictObject({ fatigue: z.enum(fatigues) })]);
export type RemarkSaid = z.output<typeof remarkSaid>;
