import { z } from 'zod';
import { soundLevel } from '../exposure/sound-level.ts';
import { levelChecks } from '../levels/measured-levels.ts';
import { levelHandlings } from '../levels/registered-levels.ts';
import { sessionPhases } from './sessions.ts';

const time = z.int();
const version = { expectVersion: z.int().min(0) };
const say = (most: number) => z.string().trim().max(most, `At most ${most} characters`);

/** The kinds of a change's steps, each with one meaning everywhere. Which of them a session goes through its plan says. */
export const stepKinds = ['mute', 'unplug', 'fit', 'scan', 'check', 'settle', 'unmute'] as const;
export type ChangeStep = (typeof stepKinds)[number];

export const cautions = ['amplifier', 'shorts', 'mains', 'hearing', 'local-rules'] as const;
export type Caution = (typeof cautions)[number];

export const voidReasons = ['wrong-cable', 'noise', 'drop-out', 'listener-request', 'tool-failure', 'safety'] as const;
export type VoidReason = (typeof voidReasons)[number];

/** How a label's text came in. */
export const scannedBy = ['scanner', 'camera', 'typed'] as const;
export type ScannedBy = (typeof scannedBy)[number];

export const pauseReasons = ['break', 'trouble'] as const;

/** What the console may send. `expectVersion` is the version of the view that the proctor acted on. */
export const proctorCommand = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('confirm-cautions'), ...version, items: z.array(z.enum(cautions)).max(10) }),
  z.strictObject({ kind: z.literal('open-seating'), ...version }),
  z.strictObject({ kind: z.literal('close-seating'), ...version }),
  z.strictObject({ kind: z.literal('begin-familiarisation'), ...version }),
  /** A trial before the first one that never counts: blind, or on a known difference with feedback. */
  z.strictObject({
    kind: z.literal('begin-practice'),
    ...version,
    form: z.enum(['blind', 'feedback']),
    /** The place of the known difference, from 0, the largest first; null for the cables of the question. */
    step: z.int().min(0).max(20).nullable(),
  }),
  z.strictObject({ kind: z.literal('begin-trial'), ...version }),
  z.strictObject({ kind: z.literal('confirm-step'), ...version, step: z.enum(stepKinds) }),
  /** What a scanner, a camera or a person read off a label: at the step for it, or at the inventory. */
  z.strictObject({ kind: z.literal('scan-label'), ...version, text: z.string().max(64), by: z.enum(scannedBy) }),
  z.strictObject({
    kind: z.literal('confirm-by-hand'),
    ...version,
    reason: say(200).min(3, 'Say in a word why it is not scanned'),
  }),
  z.strictObject({ kind: z.literal('undo-step'), ...version }),
  /** The reason is needed where something is missing. */
  z.strictObject({ kind: z.literal('end-inventory'), ...version, reason: say(300) }),
  z.strictObject({ kind: z.literal('lock-trial'), ...version }),
  z.strictObject({
    kind: z.literal('void-trial'),
    ...version,
    reason: z.enum(voidReasons, 'Choose a reason'),
    note: say(300),
  }),
  z.strictObject({ kind: z.literal('pause'), ...version, reason: z.enum(pauseReasons) }),
  z.strictObject({
    kind: z.literal('resume'),
    ...version,
    /** Why the session goes on before its registered break is over. */
    reason: say(300).min(3, 'Say why').optional(),
  }),
  z.strictObject({ kind: z.literal('excuse-seat'), ...version, seat: z.string().max(8) }),
  z.strictObject({
    kind: z.literal('record-deviation'),
    ...version,
    text: say(1000).min(3, 'Say what differed and why'),
  }),
  z.strictObject({
    kind: z.literal('skip-levels'),
    ...version,
    reason: say(500).min(3, 'Say why they are not measured'),
  }),
  z.strictObject({ kind: z.literal('record-sound-level'), ...version, ...soundLevel.shape, reason: say(300) }),
  z.strictObject({ kind: z.literal('finish'), ...version }),
  z.strictObject({ kind: z.literal('abandon'), ...version, reason: say(500).min(3, 'Say why the session ends here') }),
]);
export type ProctorCommand = z.output<typeof proctorCommand>;

/** Everything the console shows, whole. The blind code now to be fitted is the one field that bears on a secret. */
export const proctorView = z.strictObject({
  audience: z.literal('proctor'),
  version: z.int(),
  now: time,
  title: z.string(),
  session: z.int(),
  room: z.string(),
  method: z.string(),
  rig: z.enum(['loudspeaker', 'line', 'headphone']),
  phase: z.enum(sessionPhases),
  /** What must be read and ticked. */
  cautions: z.array(z.enum(cautions)),
  cautionsConfirmed: z.boolean(),
  /** The steps of every change, in order, in the words of the rig's preset; `{code}` stands for the code to be fitted. */
  steps: z.array(
    z.strictObject({ kind: z.enum(stepKinds), leastS: z.int(), act: z.string(), how: z.string(), done: z.string() }),
  ),
  paused: z
    .strictObject({ reason: z.enum(['break', 'too-loud', 'trouble']), seat: z.string().nullable(), since: time })
    .nullable(),
  join: z.strictObject({ code: z.string(), address: z.string(), qrSvg: z.string().nullable() }).nullable(),
  /** Where an automatic step happens (randomness collected, answers closed), if one is due. */
  dueAt: time.nullable(),
  revealed: z.strictObject({ done: z.int(), of: z.int() }).nullable(),
  familiarised: z.boolean(),
  /** What training is still possible, before the first trial opens; null after it. */
  training: z
    .strictObject({
      practised: z.int(),
      /** How many known differences can be practised with feedback. */
      steps: z.int(),
    })
    .nullable(),
  trial: z
    .strictObject({
      number: z.int(),
      of: z.int(),
      familiarisation: z.boolean(),
      /** The practice trial that it is, or null. */
      practice: z
        .strictObject({ number: z.int(), form: z.enum(['blind', 'feedback']), step: z.int().nullable() })
        .nullable(),
      /** *Asking* is the listener's turn on request: nothing here tells what is asked for, or whether answers are open. */
      stage: z.enum(['change', 'listening', 'asking', 'answering']),
      presentationNumber: z.int(),
      /** On request the most that the trial may have. */
      presentations: z.int(),
      onRequest: z.boolean(),
      /** The blind code to be fitted, during a change and while it is heard. */
      code: z.string().nullable(),
      excerpt: z.string(),
      /** From where it is played, as the programme says; empty for its beginning. */
      excerptStart: z.string(),
      excerptS: z.int(),
      stepsDone: z.array(z.enum(stepKinds)),
      /** The next step, or null when none is to be confirmed. */
      step: z.enum(stepKinds).nullable(),
      /** From when that step may be confirmed; the last one waits for `endsAt` besides. */
      stepEndsAt: time.nullable(),
      /** How many ends of the cable that is in are scanned; 0 where none is to be. */
      scannedEnds: z.int(),
      /** The step that would be taken back, or null when none can be. */
      undo: z.enum(stepKinds).nullable(),
      /** Change: when listening may start. Listening: when it ends. Answering: when the window ends. */
      endsAt: time.nullable(),
      longChange: z.boolean(),
      answered: z.int(),
      expected: z.int(),
    })
    .nullable(),
  nextTrial: z.int().nullable(),
  /** What was scanned so far, confirmed by hand, and refused. */
  scans: z.strictObject({ made: z.int(), byHand: z.int(), wrong: z.int() }),
  /** The sleeves gone through once more after the last trial; null where none are. */
  inventory: z
    .strictObject({
      /** How many codes the study has. */
      of: z.int(),
      found: z.array(z.strictObject({ code: z.string() })),
      foreign: z.array(z.strictObject({ code: z.string() })),
      isEnded: z.boolean(),
      missing: z.array(z.strictObject({ code: z.string() })),
    })
    .nullable(),
  course: z.array(z.strictObject({ number: z.int(), state: z.enum(['locked', 'void', 'open', 'now']) })),
  seats: z.array(
    z.strictObject({
      seat: z.string(),
      place: z.string(),
      state: z.enum(['ready', 'answered', 'away', 'left']),
      awaySince: time.nullable(),
      late: z.boolean(),
    }),
  ),
  /** How loud it is at the listening position; null until it is recorded. */
  sound: soundLevel.extend({ advice: z.enum(['quiet', 'recommended', 'loud', 'warned', 'refused']) }).nullable(),
  /** How the levels stand, never a figure; null where the protocol registers none. */
  levels: z
    .strictObject({
      handling: z.enum(levelHandlings),
      /** Null where a measurement was left out. */
      checks: z.array(z.strictObject({ check: z.enum(levelChecks), at: time, isIn: z.boolean().nullable() })),
      due: z.enum(levelChecks).nullable(),
      /** Why the session cannot start as they are. */
      bar: z.string().nullable(),
    })
    .nullable(),
  record: z.strictObject({ entries: z.int(), sessionEntries: z.int() }),
  demo: z.boolean(),
  /** Where breaks are registered: how the block stands, and the break that is on. */
  block: z
    .strictObject({
      trials: z.int(),
      locked: z.int(),
      isBreakDue: z.boolean(),
      break: z
        .strictObject({ number: z.int(), leastEndsAt: time, why: z.string(), said: z.int(), of: z.int() })
        .nullable(),
    })
    .nullable(),
  /** How many have answered the exit questions, of how many asked; never what. */
  exit: z.strictObject({ said: z.int(), of: z.int() }).nullable(),
  /** A run with invented codes, on no record. */
  rehearsal: z.boolean(),
});
export type ProctorView = z.output<typeof proctorView>;
