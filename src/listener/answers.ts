import type { Confidence, HeldAnswer } from '#shared/contracts/listener-live.ts';
import { type AnswerContent, answerLeaf } from '#shared/session/answer-leaf.ts';

/** An answer as this phone keeps it, from the tap on. It is stored here before it is sent. */
export type OwnAnswer = {
  readonly trial: number;
  readonly choice: string;
  readonly confidence: Confidence | null;
  /** Counts the changes of this answer on this phone, from 1. */
  readonly revision: number;
  readonly salt: string;
  /** Held: the server has stored it. Here: it is still on this phone. Late: it came too late and does not count. */
  readonly state: 'here' | 'held' | 'late';
  readonly heldAt: number | null;
  /** What the server said of a late answer. */
  readonly why: string | null;
};

export type AnswerCommand = {
  kind: 'answer';
  trial: number;
  choice: string;
  confidence: Confidence | null;
  revision: number;
  salt: string;
};

/** A tap: a new answer, or the next revision of one, with a salt of its own. */
export function tapped(
  previous: OwnAnswer | null,
  tap: { trial: number; choice: string; confidence: Confidence | null; salt: string },
): OwnAnswer {
  const revision = previous?.trial === tap.trial ? previous.revision + 1 : 1;
  return { ...tap, revision, state: 'here', heldAt: null, why: null };
}

/** What is sent for an answer; sent again, it is counted once. */
export function commandOf({ trial, choice, confidence, revision, salt }: OwnAnswer): AnswerCommand {
  return { kind: 'answer', trial, choice, confidence, revision, salt };
}

/** The leaf that the record will carry for this answer; the phone computes it for itself. */
export function leafOf(answer: OwnAnswer, seat: Pick<AnswerContent, 'session' | 'seat'>): string {
  const { salt, trial, choice, confidence } = answer;
  return answerLeaf({ ...seat, salt, trial, choice, confidence });
}

/** The answer once the server has acknowledged it; an acknowledgement of an older revision changes nothing. */
export function acknowledged(answer: OwnAnswer, held: HeldAnswer): OwnAnswer {
  const isThis = held.trial === answer.trial && held.revision === answer.revision;
  return isThis ? { ...answer, state: 'held', heldAt: held.heldAt } : answer;
}

export function refusedAsLate(answer: OwnAnswer, why: string): OwnAnswer {
  return { ...answer, state: 'late', why };
}
