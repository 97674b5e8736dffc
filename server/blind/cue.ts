import type { Method } from '#shared/methods/method.ts';
import { codeFitted } from '#shared/session/fitting.ts';
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

/** The codes that stand on a study's sleeves, in the order of their figures: which there are, and nothing of what they are. */
export async function codesOf(tx: Tx, studyId: string): Promise<string[]> {
  const codeKey = await readCodeKey(tx, studyId);
  if (codeKey === null) throw new Error('a session runs without its secrets');
  const { rows } = codeKey.open(new OpeningProof('cue'));
  return rows.map(({ code }) => code).sort();
}
