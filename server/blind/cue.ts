import type { Method } from '#shared/methods/method.ts';
import { codeFitted, truthOfPractice } from '#shared/session/fitting.ts';
import type { Practice } from '#shared/session/practice.ts';
import type { SessionState } from '#shared/session/state.ts';
import type { Tx } from '../db/transaction.ts';
import { OpeningProof } from './sealed.ts';
import { readCodeKey, readDrawSecret } from './secrets.store.ts';

export type CueQuestion = {
  readonly studyId: string;
  readonly sessionId: string;
  /** The revealed contributions in the order in which the record lists them. */
  readonly contributions: readonly string[];
  readonly method: Method;
  /** Its plan, and the void trials that spares stand for. */
  readonly state: Pick<SessionState, 'plan' | 'ended'>;
  /** From 1; 0 is the familiarisation trial. */
  readonly trial: number;
  /** The practice trial that it is in, or null. */
  readonly practice: Practice | null;
  readonly presentation: string;
};

/** The blind code that the proctor fits now. It goes to the proctor's audience alone and opens nothing else. */
export async function cueFor(tx: Tx, question: CueQuestion): Promise<string> {
  const proof = new OpeningProof('cue');
  const codeKey = await readCodeKey(tx, question.studyId);
  const draw = await readDrawSecret(tx, question.sessionId);
  if (codeKey === null || draw === null) throw new Error('a session runs without its secrets');
  return codeFitted({ ...question, secret: draw.open(proof).secret, rows: codeKey.open(proof).rows });
}

export type PracticeQuestion = Pick<CueQuestion, 'studyId' | 'sessionId' | 'contributions' | 'method'> & {
  readonly plan: SessionState['plan'];
  readonly practice: Practice;
};

/**
 * What was right in a practice trial, once it is over: told to the phones, and to nobody before. It comes from a label of
 * its own in the draw, and opens no trial that counts.
 */
export async function truthPractised(tx: Tx, question: PracticeQuestion): Promise<string> {
  const proof = new OpeningProof('cue');
  const draw = await readDrawSecret(tx, question.sessionId);
  if (draw === null) throw new Error('a session runs without its secrets');
  return truthOfPractice({ ...question, secret: draw.open(proof).secret, rows: [] }, question.practice);
}

/** The codes that stand on a study's sleeves, in the order of their figures: which there are, and nothing of what they are. */
export async function codesOf(tx: Tx, studyId: string): Promise<string[]> {
  const codeKey = await readCodeKey(tx, studyId);
  if (codeKey === null) throw new Error('a session runs without its secrets');
  const { rows } = codeKey.open(new OpeningProof('cue'));
  return rows.map(({ code }) => code).sort();
}
