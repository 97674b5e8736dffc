import { methodOf } from '../methods/methods.ts';
import type { Protocol } from '../protocol/protocol.ts';
import type { AnswerContent } from '../session/answer-leaf.ts';
import { revealedDraw } from '../session/counted-trials.ts';
import type { Draw } from '../session/draw.ts';
import { sessionsInRecord } from '../session/read-record.ts';
import type { RemarkContent } from '../session/remark-leaf.ts';
import type { RequestContent } from '../session/request-leaf.ts';
import { revealedKey } from '../session/revealed-key.ts';
import type { SessionState } from '../session/state.ts';
import { canonicalJson, type Json } from './canonical-json.ts';
import type { Entry } from './chain.ts';

/** The parts of a published document, in the order in which they are checked. */
export const partNames = ['record', 'protocol', 'secrets', 'draws', 'answers', 'result'] as const;
export type PartName = (typeof partNames)[number];

/** What a published document holds beside its format. Read from a file, every part is still unknown. */
export type PublicationParts = { readonly [part in PartName]: unknown } & {
  /** The protocol's versions before the one in force, in order; left out where it was never amended. */
  readonly earlierProtocols?: unknown;
  /** What listeners said beside the trials; left out where nobody said anything. */
  readonly remarks?: unknown;
  /** What single listeners asked to hear, with the salts; left out where nothing was asked for. */
  readonly requests?: unknown;
};

/** What a session's draw came to, written out, so that nobody needs this program to read what X was. */
export type PublishedDraw = Draw & { readonly session: number };

export const publicationFormat = 'fairlead-publication';
export const publicationVersion = 1;

export type ClosedStudy = {
  readonly entries: readonly Entry[];
  /** The version in force. */
  readonly protocol: Protocol;
  /** The versions before it, in order. */
  readonly earlierProtocols?: readonly Protocol[];
  /** Answers held in time. Those of void trials have no leaf on the record and are left out. */
  readonly answers: readonly AnswerContent[];
  /** What listeners said beside the trials; those of before there were any have none. */
  readonly remarks?: readonly RemarkContent[];
  /** What single listeners asked to hear, void trials included. */
  readonly requests?: readonly RequestContent[];
};

type LockedTrial = { session: number; trial: number; leaves: readonly { seat: string }[] };

/** What names an answer, in the file as on the record. */
export const answerName = ({ session, trial, seat }: Pick<AnswerContent, 'session' | 'trial' | 'seat'>) =>
  `${session} ${trial} ${seat}`;

function lockedAnswers({ entries, answers }: ClosedStudy, sessionIds: ReadonlyMap<number, string>): AnswerContent[] {
  const locked = new Set(
    entries
      .filter(({ kind }) => kind === 'trial-locked')
      .flatMap(({ payload }) => {
        const { session, trial, leaves } = payload as unknown as LockedTrial;
        return leaves.map(({ seat }) => answerName({ session: sessionIds.get(session) ?? '', trial, seat }));
      }),
  );
  return answers
    .filter((answer) => locked.has(answerName(answer)))
    .map(({ session, trial, seat, choice, confidence, salt }) => ({ session, trial, seat, choice, confidence, salt }));
}

/** Requests as they were made: by session, trial and place. */
function inOrder(requests: readonly RequestContent[], states: readonly SessionState[]): RequestContent[] {
  return states.flatMap(({ sessionId }) =>
    requests
      .filter(({ session }) => session === sessionId)
      .sort((a, b) => a.trial - b.trial || a.presentation - b.presentation)
      .map(({ session, seat, trial, presentation, label, salt }) => ({
        session,
        seat,
        trial,
        presentation,
        label,
        salt,
      })),
  );
}

/**
 * The parts of a closed study's document: its record, protocol, revealed secrets, draws, answers with their salts, and
 * result. People stand in it by seat label or by a random id, never by name.
 *
 * @throws ZodError when the record has no revealed secrets
 */
export function publicationParts(study: ClosedStudy): PublicationParts {
  const { entries, protocol, earlierProtocols = [], requests = [], remarks = [] } = study;
  const method = methodOf(protocol.method);
  const states = sessionsInRecord(entries, method);
  const payloadOf = (wanted: string) => entries.find(({ kind }) => kind === wanted)?.payload;
  const secrets = revealedKey.parse(payloadOf('key-revealed'));
  const drawn = new Set(entries.filter(({ kind }) => kind === 'draw-fixed').map(({ payload }) => payload.session));
  const draws: PublishedDraw[] = states
    .filter(({ session }) => drawn.has(session))
    .map((state) => {
      const secret = secrets.draws.find(({ session }) => session === state.session)?.secret ?? '';
      return { session: state.session, ...revealedDraw(state, method, secret, secrets.codeKey.rows) };
    });
  const sessionIds = new Map(states.map(({ session, sessionId }) => [session, sessionId]));
  return {
    record: entries,
    protocol,
    ...(earlierProtocols.length === 0 ? {} : { earlierProtocols }),
    secrets,
    draws,
    answers: lockedAnswers(study, sessionIds),
    ...(remarks.length === 0
      ? {}
      : { remarks: remarks.map(({ session, seat, about, said, salt }) => ({ session, seat, about, said, salt })) }),
    ...(requests.length === 0 ? {} : { requests: inOrder(requests, states) }),
    result: payloadOf('result-recorded')?.result ?? null,
  };
}

/** The document as it is frozen: canonical text, so that one digest names it. */
export function publicationText(parts: PublicationParts): string {
  const { record, protocol, earlierProtocols, secrets, draws, answers, requests, remarks, result } = parts;
  const whole = {
    format: publicationFormat,
    version: publicationVersion,
    record,
    protocol,
    ...(earlierProtocols === undefined ? {} : { earlierProtocols }),
    secrets,
    draws,
    answers,
    ...(remarks === undefined ? {} : { remarks }),
    ...(requests === undefined ? {} : { requests }),
    result,
  };
  return canonicalJson(whole as unknown as Json);
}

/**
 * Reads a document back into its parts.
 *
 * @param text a downloaded file
 * @returns its parts, or in a sentence why it is no such document
 */
export function readPublication(text: string): { parts: PublicationParts } | { fault: string } {
  let whole: unknown;
  try {
    whole = JSON.parse(text);
  } catch {
    return { fault: 'It is not readable as JSON.' };
  }
  if (typeof whole !== 'object' || whole === null || Array.isArray(whole))
    return { fault: 'It is no published study.' };
  const { format, version, ...parts } = whole as Record<string, unknown>;
  if (format !== publicationFormat) return { fault: 'It is no published study.' };
  if (version !== publicationVersion)
    return { fault: `This program reads version ${publicationVersion} of the format.` };
  const absent = partNames.filter((name) => !Object.hasOwn(parts, name));
  if (absent.length > 0) return { fault: `It has no ${absent.join(', ')}.` };
  const known: readonly string[] = [...partNames, 'earlierProtocols', 'requests', 'remarks'];
  const unknown = Object.keys(parts).filter((name) => !known.includes(name));
  if (unknown.length > 0) return { fault: `It has a part that is not known: ${unknown.join(', ')}.` };
  return isCanonical(whole, text)
    ? { parts: parts as PublicationParts }
    : { fault: 'It is not written in canonical form (RFC 8785).' };
}

function isCanonical(whole: unknown, text: string): boolean {
  try {
    return canonicalJson(whole as Json) === text;
  } catch {
    return false;
  }
}
