import * as z from 'zod/mini';
import { exitCommand, fatigueCommand } from './remarks.ts';

const hex = (bytes: number) => z.string().check(z.regex(new RegExp(`^[0-9a-f]{${bytes * 2}}$`)));
const time = z.int();

export const confidences = ['guessing', 'fairly', 'certain'] as const;
export type Confidence = (typeof confidences)[number];

/** What a listener's phone may send. Every command is acknowledged with a receipt or a problem. */
export const listenerCommand = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('reveal'), value: hex(32) }),
  z.strictObject({
    kind: z.literal('answer'),
    /** Below 0 in practice. */
    trial: z.int().check(
      z.minimum(-1000),
      z.maximum(1000),
      z.refine((trial) => trial !== 0, 'Nothing is asked in the familiarisation'),
    ),
    choice: z.string().check(z.minLength(1), z.maxLength(16)),
    confidence: z.nullable(z.enum(confidences)),
    /** Counts the changes of this answer on this phone, from 1: a repeat is harmless, an older one is ignored. */
    revision: z.int().check(z.positive(), z.maximum(10_000)),
    salt: hex(16),
  }),
  exitCommand,
  fatigueCommand,
  /** On request: what this phone wants to hear next, at its place in the trial, from 0. A repeat is harmless. */
  z.strictObject({
    kind: z.literal('request-presentation'),
    trial: z.int().check(z.positive(), z.maximum(1000)),
    presentation: z.int().check(z.nonnegative(), z.maximum(100)),
    label: z.string().check(z.minLength(1), z.maxLength(16)),
    salt: hex(16),
  }),
  z.strictObject({ kind: z.literal('too-loud') }),
  z.strictObject({ kind: z.literal('leave') }),
]);
export type ListenerCommand = z.output<typeof listenerCommand>;

/** What the server says to a stored answer: its leaf and when it was held (milliseconds since 1970). */
export const heldAnswer = z.strictObject({
  trial: z.int(),
  choice: z.string(),
  confidence: z.nullable(z.enum(confidences)),
  revision: z.int(),
  leaf: z.string(),
  heldAt: time,
});
export type HeldAnswer = z.output<typeof heldAnswer>;

export const courseRing = z.strictObject({
  number: z.int(),
  state: z.enum(['locked', 'void', 'open', 'now']),
});
export type CourseRing = z.output<typeof courseRing>;

/** The digest of the entry that locked a trial, and its place in the record: with the phone's own leaf, a receipt. */
export const lockReceipt = z.strictObject({ trial: z.int(), leaf: z.string(), sequence: z.int(), digest: z.string() });
export type LockReceipt = z.output<typeof lockReceipt>;

/**
 * Everything a listener's phone shows, whole. Built field by field: it has no field for a code, a cable,
 * the draw, a score or another listener's answer.
 */
export const listenerView = z.strictObject({
  audience: z.literal('listener'),
  title: z.string(),
  /** A run with invented codes, on no record. */
  rehearsal: z.boolean(),
  session: z.int(),
  /** The session's id, part of what an answer's leaf is made of. */
  sessionId: z.string(),
  seat: z.string(),
  now: time,
  phase: z.enum(['seating', 'revealing', 'running', 'finished', 'abandoned']),
  /** Whether this phone's randomness counts in the draw. */
  contributes: z.boolean(),
  revealWanted: z.boolean(),
  left: z.boolean(),
  paused: z.nullable(z.enum(['break', 'too-loud', 'trouble'])),
  /** The exit questions, once they are asked: what to guess, and the leaf of what was answered. */
  exit: z.nullable(z.strictObject({ guesses: z.array(z.string()), held: z.nullable(z.string()) })),
  /** The break after a block, and the leaf of how this listener felt. */
  break: z.nullable(z.strictObject({ number: z.int(), leastEndsAt: time, held: z.nullable(z.string()) })),
  course: z.array(courseRing),
  trial: z.nullable(
    z.strictObject({
      number: z.int(),
      of: z.int(),
      familiarisation: z.boolean(),
      /** A practice trial and whether its answer is told afterwards; null in a trial that counts. */
      practice: z.nullable(z.strictObject({ number: z.int(), feedback: z.boolean() })),
      takesPart: z.boolean(),
      /** *Asking* is this listener's turn on request: to ask again, or to answer. */
      stage: z.enum(['change', 'listening', 'asking', 'answering']),
      /** What is heard now (A, B, X, first ...), or comes next during a change. */
      presentation: z.string(),
      /** The same in a sentence: "A", "the first". */
      spoken: z.string(),
      presentationNumber: z.int(),
      presentations: z.int(),
      endsAt: z.nullable(time),
      held: z.nullable(heldAnswer),
      /** On request; null where presentations come in a fixed order. */
      requests: z.nullable(
        z.strictObject({
          /** How many more presentations the trial has. */
          left: z.int(),
          labels: z.array(
            z.strictObject({
              label: z.string(),
              /** How often it was asked for in this trial. */
              times: z.int(),
              /** Whether it can be asked for when it is this listener's turn. */
              canRequest: z.boolean(),
            }),
          ),
          takesAnswers: z.boolean(),
        }),
      ),
    }),
  ),
  question: z.strictObject({
    /** What a trial presents and what is asked, told before the first one. */
    explanation: z.string(),
    text: z.string(),
    /** Said during the last presentation: what is asked next. */
    announcement: z.string(),
    options: z.array(
      z.strictObject({
        value: z.string(),
        letter: z.optional(z.string()),
        sentence: z.string(),
        /** How the answer is named on a button: "A", "the first". */
        short: z.string(),
      }),
    ),
    confidence: z.boolean(),
  }),
  lastLock: z.nullable(lockReceipt),
  /** What was right in the practice trial that has just ended; null elsewhere, and always where answers count. */
  told: z.nullable(
    z.strictObject({
      practice: z.int(),
      /** What would have been right, as the answer says it. */
      right: z.string(),
      /** Whether this listener said so; null without an answer. */
      isRight: z.nullable(z.boolean()),
    }),
  ),
  /** The last trial's end as this listener needs to know it. */
  lastOutcome: z.nullable(
    z.strictObject({ trial: z.int(), outcome: z.enum(['locked', 'void']), counted: z.boolean() }),
  ),
});
export type ListenerView = z.output<typeof listenerView>;
