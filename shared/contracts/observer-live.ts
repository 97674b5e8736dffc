import { z } from 'zod';
import { stepKinds } from './proctor-live.ts';
import { sessionPhases } from './sessions.ts';

const time = z.int();

/** What an observer may send: that they watched, in words of their own. */
export const observerCommand = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('sign'),
    remarks: z.string().trim().max(1000, 'At most 1,000 characters'),
    /** Whether their name may stand on the record. */
    isNamed: z.boolean(),
  }),
]);
export type ObserverCommand = z.output<typeof observerCommand>;

/** Everything an observer sees, whole. It has no field for a code, a cable, a level, the draw or an answer. */
export const observerView = z.strictObject({
  audience: z.literal('observer'),
  now: time,
  title: z.string(),
  session: z.int(),
  method: z.string(),
  observer: z.string(),
  name: z.string(),
  phase: z.enum(sessionPhases),
  paused: z
    .strictObject({ reason: z.enum(['break', 'too-loud', 'trouble']), since: time, leastEndsAt: time.nullable() })
    .nullable(),
  trial: z
    .strictObject({
      number: z.int(),
      of: z.int(),
      familiarisation: z.boolean(),
      stage: z.enum(['change', 'listening', 'answering', 'asking']),
      /** What is heard now, or comes next: A, B, X, first ...; empty where a listener asks for it, which is theirs to know. */
      presentation: z.string(),
      presentationNumber: z.int(),
      presentations: z.int(),
      steps: z.array(z.enum(stepKinds)),
      stepsDone: z.array(z.enum(stepKinds)),
      stageSince: time,
      endsAt: time.nullable(),
    })
    .nullable(),
  course: z.array(z.strictObject({ number: z.int(), state: z.enum(['locked', 'void', 'open', 'now']) })),
  seats: z.array(z.strictObject({ seat: z.string(), state: z.enum(['here', 'answered', 'left']) })),
  /** Trials at which this observer was present from the opening to the end. */
  watched: z.array(z.int()),
  canSign: z.boolean(),
  signed: z.boolean(),
});
export type ObserverView = z.output<typeof observerView>;
