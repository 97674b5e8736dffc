import { z } from 'zod';
import { fatigues } from '../contracts/remarks.ts';
import type { Method } from '../methods/method.ts';
import { methodOf } from '../methods/methods.ts';
import { type Protocol, protocol } from '../protocol/protocol.ts';
import type { AnswerContent } from '../session/answer-leaf.ts';
import { sessionsInRecord } from '../session/read-record.ts';
import type { RemarkContent } from '../session/remark-leaf.ts';
import type { RequestContent } from '../session/request-leaf.ts';
import { type RevealedKey, revealedKey } from '../session/revealed-key.ts';
import type { SessionState } from '../session/state.ts';
import { trialKind } from '../session/trial-kinds.ts';
import type { Entry } from './chain.ts';
import type { PublicationParts, PublishedDraw } from './publication-parts.ts';

const hex = (bytes: number) => z.string().regex(new RegExp(`^[0-9a-f]{${bytes * 2}}$`));

/** An entry as it is read from a file. */
export const entryShape = z.strictObject({
  study: z.string(),
  sequence: z.int(),
  at: z.string(),
  kind: z.string(),
  version: z.int(),
  payload: z.record(z.string(), z.json()),
  nonce: hex(16),
  previous: hex(32),
  digest: hex(32),
});

const draw = z.strictObject({
  session: z.int(),
  firstSide: z.union([z.literal(0), z.literal(1)]),
  specimens: z.tuple([z.int(), z.int()]),
  truths: z.array(z.string()),
  kinds: z.array(trialKind).optional(),
  checkSpecimens: z.array(z.int()).optional(),
  separate: z.strictObject({ specimen: z.int(), deals: z.array(z.int()).optional() }).optional(),
});

const answer = z.strictObject({
  session: z.string(),
  trial: z.int(),
  seat: z.string(),
  choice: z.string(),
  confidence: z.string().nullable(),
  salt: hex(16),
});

const remark = z.strictObject({
  session: z.string(),
  seat: z.string(),
  about: z.string(),
  said: z.union([
    z.strictObject({
      wentBy: z.string(),
      noticed: z.enum(['yes', 'no']).nullable(),
      what: z.string(),
      guesses: z.array(z.string()),
    }),
    z.strictObject({ fatigue: z.enum(fatigues) }),
  ]),
  salt: hex(16),
});

const request = z.strictObject({
  session: z.string(),
  seat: z.string(),
  trial: z.int(),
  presentation: z.int(),
  label: z.string(),
  salt: hex(16),
});

/** What a part must look like to be read at all, in words for people. */
export class Unreadable extends Error {}

export function read<T>(what: string, schema: z.ZodType<T>, value: unknown): T {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  const [issue] = parsed.error.issues;
  throw new Unreadable(`${what} cannot be read: ${issue?.path.join('/') || 'the whole'}, ${issue?.message}.`);
}

export function once<T>(make: () => T): () => T {
  let made: { value: T } | null = null;
  return () => {
    made ??= { value: make() };
    return made.value;
  };
}

/** The parts of a study, each read on first use. @throws Unreadable by whichever part cannot be read */
export class StudyReading {
  readonly parts: PublicationParts;

  constructor(parts: PublicationParts) {
    this.parts = parts;
  }

  readonly entries = once((): readonly Entry[] => read('The record', z.array(entryShape).min(1), this.parts.record));
  readonly protocol = once((): Protocol => read('The protocol', protocol, this.parts.protocol));
  /** The versions before the one in force, in order. */
  readonly earlierProtocols = once((): readonly Protocol[] =>
    this.parts.earlierProtocols === undefined
      ? []
      : read('The earlier protocols', z.array(protocol).min(1), this.parts.earlierProtocols),
  );
  readonly secrets = once((): RevealedKey => read('The secrets', revealedKey, this.parts.secrets));
  readonly draws = once((): PublishedDraw[] => read('The draws', z.array(draw), this.parts.draws));
  readonly answers = once((): AnswerContent[] => read('The answers', z.array(answer), this.parts.answers));

  readonly remarks = once((): RemarkContent[] =>
    this.parts.remarks === undefined ? [] : read('The remarks', z.array(remark), this.parts.remarks),
  );
  readonly requests = once((): readonly RequestContent[] =>
    this.parts.requests === undefined ? [] : read('The requests', z.array(request).min(1), this.parts.requests),
  );

  /** The method as the record's sessions were planned with it; an amendment plans those anew that have not opened. */
  readonly method = once((): Method => {
    const planned = this.entries().findLast(({ kind }) => kind === 'session-planned' || kind === 'session-replanned');
    const plan = planned?.payload.plan as { method?: unknown } | undefined;
    return methodOf(String(plan?.method));
  });

  readonly sessions = once((): readonly SessionState[] =>
    this.payloadOf('session-planned') === undefined ? [] : sessionsInRecord(this.entries(), this.method()),
  );

  payloadOf(kind: string): Entry['payload'] | undefined {
    return this.entries().find((candidate) => candidate.kind === kind)?.payload;
  }
}
