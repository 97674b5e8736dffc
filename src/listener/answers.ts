import type { Confidence, HeldAnswer, ListenerView } from '#shared/contracts/listener-live.ts';
import { answerLeaf } from '#shared/session/answer-leaf.ts';

/** A leaf that the record may carry for a trial; `isOwn` when this phone computed it from a salt of its own. */
export type PossibleLeaf = { readonly revision: number; readonly leaf: string; readonly isOwn: boolean };

/** An answer as this phone keeps it, from the tap on. It is stored here before it is sent. */
export type OwnAnswer = {
  readonly trial: number;
  readonly choice: string;
  readonly confidence: Confidence | null;
  /** Counts the changes of this answer on this phone, from 1. */
  readonly revision: number;
  /** Empty when the answer was learnt from the server, which never tells a salt. */
  readonly salt: string;
  /**
   * Here: still on this phone. Held: the server has stored it. Late: it came too late and does not count.
   * Refused: the server would not take it for another reason.
   */
  readonly state: 'here' | 'held' | 'late' | 'refused';
  readonly heldAt: number | null;
  /** What the server said of an answer that is late or refused. */
  readonly why: string | null;
  /** From the last acknowledged revision to the newest: any of them may be the one that locks. */
  readonly leaves: readonly PossibleLeaf[];
};

export type Tap = Pick<OwnAnswer, 'trial' | 'choice' | 'confidence' | 'salt'>;
export type SeatOfSession = { readonly session: string; readonly seat: string };

/** A tap: a new answer, or the next revision of one, with a salt of its own. */
export function tapped(previous: OwnAnswer | null, tap: Tap, { session, seat }: SeatOfSession): OwnAnswer {
  const earlier = previous?.trial === tap.trial ? previous : null;
  const revision = (earlier?.revision ?? 0) + 1;
  const leaf = answerLeaf({ ...tap, session, seat });
  const leaves = [...(earlier?.leaves ?? []), { revision, leaf, isOwn: true }];
  return { ...tap, revision, state: 'here', heldAt: null, why: null, leaves };
}

/** What is sent for an answer; sent again, it is counted once. */
export function commandOf({ trial, choice, confidence, revision, salt }: OwnAnswer) {
  return { kind: 'answer', trial, choice, confidence, revision, salt } as const;
}

/** An answer that this phone knows from the server alone: another window of the seat gave it, or memory was lost. */
export function learnt(held: HeldAnswer): OwnAnswer {
  const { trial, choice, confidence, revision, leaf, heldAt } = held;
  const leaves = [{ revision, leaf, isOwn: false }];
  return { trial, choice, confidence, revision, salt: '', state: 'held', heldAt, why: null, leaves };
}

/** Whether the server holds something else under the very revision that this phone sent. */
export function isDifferent({ trial, revision, leaves }: OwnAnswer, held: HeldAnswer): boolean {
  if (held.trial !== trial || held.revision !== revision) return false;
  return !leaves.some(({ leaf }) => leaf === held.leaf);
}

/**
 * The answer once the server has said what it holds. An older revision changes nothing but what may lock; a newer
 * or a different one is what counts, so the phone shows it instead of its own.
 */
export function acknowledged(answer: OwnAnswer, held: HeldAnswer): OwnAnswer {
  if (held.trial !== answer.trial) return answer;
  if (held.revision > answer.revision || isDifferent(answer, held)) return learnt(held);
  const leaves = answer.leaves.filter(({ revision }) => revision >= held.revision);
  if (held.revision < answer.revision) return { ...answer, leaves };
  return { ...answer, state: 'held', heldAt: held.heldAt, why: null, leaves };
}

export function refused(answer: OwnAnswer, state: 'late' | 'refused', why: string): OwnAnswer {
  return { ...answer, state, why };
}

/** What the locked leaf is to this phone: true = its own, false = not what it sent, null = it cannot tell. */
export function isOwnLeaf(answer: OwnAnswer | null, lockedLeaf: string): boolean | null {
  if (answer === null) return null;
  const found = answer.leaves.find(({ leaf }) => leaf === lockedLeaf);
  if (found === undefined) return false;
  return found.isOwn ? true : null;
}

/** How an answer is named in a sentence: "A", "the first". */
export function shortOf({ options }: ListenerView['question'], choice: string): string {
  return options.find(({ value }) => value === choice)?.short ?? choice;
}

export const capitalised = (words: string): string => `${words.charAt(0).toUpperCase()}${words.slice(1)}`;

export function answerTo(answers: readonly OwnAnswer[], trial: number | undefined): OwnAnswer | null {
  return answers.find((answer) => answer.trial === trial) ?? null;
}

/** The answers with this one in the place of its trial. */
export function withAnswer(answers: readonly OwnAnswer[], answer: OwnAnswer): readonly OwnAnswer[] {
  return [...answers.filter(({ trial }) => trial !== answer.trial), answer].sort((a, b) => a.trial - b.trial);
}

/** What is still to be delivered, the earliest trial first. */
export function nextToSend(answers: readonly OwnAnswer[]): OwnAnswer | null {
  return answers.find(({ state }) => state === 'here') ?? null;
}
