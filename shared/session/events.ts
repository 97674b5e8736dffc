import { z } from 'zod';
import { cautions, stepKinds, voidReasons } from '../contracts/proctor-live.ts';
import { registeredLevels } from '../levels/registered-levels.ts';
import { rigPreset } from '../protocol/rig-preset.ts';
import { waysToRun } from '../protocol/ways-to-run.ts';
import { blockEvents } from './block-events.ts';
import { levelEvents } from './level-events.ts';
import { mostPractice, practice } from './practice.ts';
import { breaksDraft } from './registered-breaks.ts';
import { scanEvents } from './scan-events.ts';
import { soundEvents } from './sound.ts';
import { checkShape } from './trial-kinds.ts';

// What a session puts on its study's record. Payload shapes are permanent: a change means a new version.

const session = z.int().min(1);
const seat = z.string();
const hex32 = z.string().regex(/^[0-9a-f]{64}$/);
/** Below 0 for practice. */
const trial = z.int().min(-mostPractice);
const counted = z.int().min(0);

/** What a session takes from the sealed protocol; times in milliseconds. Trial 0 is the familiarisation trial. */
export const sessionPlan = z.strictObject({
  method: z.string(),
  methodSettings: z.array(z.string()).optional(),
  attribute: z.string().optional(),
  /** Check trials included: nothing in a session tells them apart. */
  trials: z.int(),
  spares: z.int(),
  /** How many of the trials are check trials; left out where there are none. */
  checks: checkShape.optional(),
  rig: z.enum(['loudspeaker', 'line', 'headphone']),
  /** How a change is made, as the protocol froze it; left out where it names no preset. */
  rigPreset: rigPreset.optional(),
  changeMs: z.int(),
  answerMs: z.int(),
  confidence: z.boolean(),
  ...waysToRun,
  programme: z.array(z.strictObject({ title: z.string(), start: z.string(), lengthMs: z.int() })),
  /** Left out where levels are not measured. */
  levels: registeredLevels.optional(),
  /** Left out where no breaks are registered. */
  breaks: breaksDraft.optional(),
});
export type SessionPlan = z.output<typeof sessionPlan>;

export const sessionEvents = {
  'session-planned': z.strictObject({ session, sessionId: z.uuid(), proctor: z.uuid(), plan: sessionPlan }),
  /** A planned session takes the plan of an amended protocol. */
  'session-replanned': z.strictObject({ session, plan: sessionPlan }),
  'cautions-confirmed': z.strictObject({ session, items: z.array(z.enum(cautions)) }),
  'seating-opened': z.strictObject({ session, commitment: hex32 }),
  'listener-joined': z.strictObject({
    session,
    seat,
    commitment: hex32,
    contributes: z.boolean(),
    consentVersion: z.int(),
    /** How the listener came. Records from before personal links say nothing: all came by code. */
    joinedBy: z.enum(['code', 'personal-link']).optional(),
  }),
  'contributions-fixed': z.strictObject({
    session,
    contributors: z.array(z.strictObject({ seat, commitment: hex32 })),
  }),
  'contribution-revealed': z.strictObject({ session, seat, value: hex32 }),
  'contribution-dropped': z.strictObject({ session, seat }),
  'draw-fixed': z.strictObject({ session, contributors: z.array(seat) }),
  'trial-opened': z.strictObject({ session, trial: counted, excerpt: z.int(), seats: z.array(seat) }),
  /** A trial that never counts; the trial of its steps and presentations is its number below 0. */
  'practice-opened': z.strictObject({ session, ...practice.shape, excerpt: z.int(), seats: z.array(seat) }),
  /** How many answered; what they answered is kept nowhere. */
  'practice-ended': z.strictObject({ session, number: practice.shape.number, answered: z.int().min(0), of: z.int() }),
  /** On request: the listener asked for a presentation. What was asked for lies beside the record, under its leaf. */
  'presentation-requested': z.strictObject({
    session,
    trial: counted,
    presentation: z.int().min(0),
    seat,
    leaf: hex32,
  }),
  'step-confirmed': z.strictObject({ session, trial, presentation: z.int(), step: z.enum(stepKinds) }),
  ...scanEvents,
  'listening-started': z.strictObject({
    session,
    trial,
    presentation: z.int(),
    /** How many registered lengths the change took; 1 is as registered. */
    lengths: z.int().min(1),
  }),
  'listening-ended': z.strictObject({ session, trial, presentation: z.int() }),
  'trial-locked': z.strictObject({
    session,
    trial: counted,
    reason: z.enum(['all-in', 'window-ended']),
    leaves: z.array(z.strictObject({ seat, leaf: hex32 })),
    missing: z.array(seat),
  }),
  'trial-voided': z.strictObject({
    session,
    trial,
    reason: z.enum(voidReasons),
    note: z.string(),
    answersHeld: z.int(),
  }),
  'answer-late': z.strictObject({ session, trial: counted, seat, leaf: hex32 }),
  paused: z.strictObject({ session, reason: z.enum(['break', 'too-loud', 'trouble']), seat: seat.nullable() }),
  /** `early`: why it went on before the registered break was over. */
  resumed: z.strictObject({ session, early: z.string().optional() }),
  'server-restarted': z.strictObject({ session }),
  'listener-left': z.strictObject({ session, seat, by: z.enum(['listener', 'proctor']) }),
  'deviation-recorded': z.strictObject({ session: session.nullable(), text: z.string() }),
  ...levelEvents,
  ...soundEvents,
  ...blockEvents,
  'session-finished': z.strictObject({ session }),
  'session-abandoned': z.strictObject({
    session,
    reason: z.string(),
    openTrial: trial.nullable(),
    answersHeld: z.int(),
  }),
} as const;

export type SessionEventKind = keyof typeof sessionEvents;
export type PayloadOf<K extends SessionEventKind> = z.output<(typeof sessionEvents)[K]>;
/** An event with the time at which it was decided, in milliseconds since 1970. */
export type SessionEvent = {
  [K in SessionEventKind]: { kind: K; at: number; payload: PayloadOf<K> };
}[SessionEventKind];

/** Reads an entry's kind and payload back as a session's event; null when it belongs to the study and to no session. */
export function readSessionEvent(kind: string, at: string, payload: unknown): SessionEvent | null {
  if (!Object.hasOwn(sessionEvents, kind)) return null;
  const known = kind as SessionEventKind;
  return { kind: known, at: Date.parse(at), payload: sessionEvents[known].parse(payload) } as SessionEvent;
}
