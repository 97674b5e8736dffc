import { methodOf } from '../methods/methods.ts';
import { runRegistered } from '../methods/run-registered.ts';
import { type Protocol, protocolDigest } from '../protocol/protocol.ts';
import { type AnswerContent, answerLeaf, contributionCommitment } from '../session/answer-leaf.ts';
import { codeKeyCommitment, drawSecretCommitment } from '../session/commitments.ts';
import { sessionsInRecord } from '../session/read-record.ts';
import { type RevealedKey, revealedKey } from '../session/revealed-key.ts';
import type { SessionState } from '../session/state.ts';
import { canonicalJson, type Json } from './canonical-json.ts';
import { chainFault, type Entry } from './chain.ts';

export type Check = {
  readonly name: string;
  readonly outcome: 'pass' | 'fail' | 'not checkable';
  readonly reason: string;
};

export type ClosedStudy = {
  readonly entries: readonly Entry[];
  readonly protocol: Protocol;
  readonly answers: readonly AnswerContent[];
};

type Reading = ClosedStudy & { readonly sessions: readonly SessionState[]; readonly key: RevealedKey };

const verdict = (name: string, faults: readonly string[], reason: string): Check => ({
  name,
  outcome: faults.length === 0 ? 'pass' : 'fail',
  reason: faults[0] ?? reason,
});

const payloadOf = (entries: readonly Entry[], kind: string) => entries.find((entry) => entry.kind === kind)?.payload;

function recordUnbroken({ entries }: Reading): Check {
  const fault = chainFault(entries);
  const faults = fault === null ? [] : [`Entry ${fault.sequence}: ${fault.why}.`];
  return verdict('Record unbroken', faults, `${entries.length} entries, each linked to the one before.`);
}

function protocolUnchanged({ entries, protocol }: Reading): Check {
  const sealed = payloadOf(entries, 'protocol-sealed')?.digest;
  const faults = sealed === protocolDigest(protocol) ? [] : ['The protocol does not match the digest that was sealed.'];
  return verdict('Protocol unchanged since sealing', faults, 'Its digest is the one in the first entry.');
}

function commitmentsHold({ entries, key, sessions }: Reading): Check {
  const faults: string[] = [];
  const { salt, rows } = key.codeKey;
  if (payloadOf(entries, 'code-key-committed')?.commitment !== codeKeyCommitment(salt, rows))
    faults.push('The revealed code key is not the one committed to.');
  for (const entry of entries.filter(({ kind }) => kind === 'seating-opened')) {
    const draw = key.draws.find(({ session }) => session === entry.payload.session);
    if (draw === undefined || drawSecretCommitment(draw.salt, draw.secret) !== entry.payload.commitment)
      faults.push(`Session ${entry.payload.session}: the revealed secret is not the one committed to.`);
  }
  for (const { session, seats } of sessions)
    for (const { seat, revealed, commitment } of seats)
      if (revealed !== null && contributionCommitment(revealed) !== commitment)
        faults.push(`Session ${session}, ${seat}: the revealed number is not the one committed to.`);
  return verdict(
    'Commitments match what was revealed',
    faults,
    `Code key, ${key.draws.length} session secrets and the phones’ numbers.`,
  );
}

function leavesMatch({ entries, answers, sessions }: Reading): Check {
  const leaves = new Map(
    answers.map((answer) => [`${answer.session} ${answer.trial} ${answer.seat}`, answerLeaf(answer)]),
  );
  const ids = new Map(sessions.map(({ session, sessionId }) => [session, sessionId]));
  const faults: string[] = [];
  let seen = 0;
  for (const { kind, payload } of entries) {
    if (kind !== 'trial-locked') continue;
    const {
      session,
      trial,
      leaves: locked,
    } = payload as { session: number; trial: number; leaves: { seat: string; leaf: string }[] };
    for (const { seat, leaf } of locked) {
      seen += 1;
      if (leaves.get(`${ids.get(session)} ${trial} ${seat}`) !== leaf)
        faults.push(`Session ${session}, trial ${trial}, ${seat}: the answer does not match the record.`);
    }
  }
  return verdict('Answers match their leaves', faults, `${seen} answers, each as it was when its trial locked.`);
}

function trialsAccounted({ sessions }: Reading): Check {
  const faults: string[] = [];
  for (const [index, { session, ended }] of sessions.entries()) {
    if (session !== index + 1) faults.push(`Session ${index + 1} is missing.`);
    for (const [place, { trial }] of ended.entries())
      if (trial !== place + 1) faults.push(`Session ${session}: trial ${place + 1} is missing.`);
  }
  return verdict('Every session and trial accounted for', faults, 'Numbers run without gaps.');
}

function figuresRecomputed({ entries, protocol, sessions, key, answers }: Reading): Check {
  const name = 'Draws and figures recomputed';
  const recorded = payloadOf(entries, 'result-recorded')?.result;
  if (recorded === undefined) return { name, outcome: 'not checkable', reason: 'No result is on the record.' };
  const result = runRegistered(protocol, sessions, key, answers);
  const same = canonicalJson(result as unknown as Json) === canonicalJson(recorded);
  return verdict(
    name,
    same ? [] : ['The recomputed figures differ from the result on the record.'],
    'The registered analysis gives the recorded result.',
  );
}

/**
 * Checks a closed study from its record, its protocol and its answers. Pure: the same code runs on the server and wherever
 * somebody distrusts it.
 *
 * @returns one line per check, with its reason in plain words
 */
export function verifyStudy(study: ClosedStudy): Check[] {
  const method = methodOf(study.protocol.method);
  const key = revealedKey.parse(payloadOf(study.entries, 'key-revealed'));
  const reading: Reading = { ...study, sessions: sessionsInRecord(study.entries, method), key };
  return [
    recordUnbroken(reading),
    protocolUnchanged(reading),
    commitmentsHold(reading),
    leavesMatch(reading),
    trialsAccounted(reading),
    figuresRecomputed(reading),
  ];
}
