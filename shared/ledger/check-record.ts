import { protocolDigest, sessionPlanOf } from '../protocol/protocol.ts';
import { canonicalJson, type Json } from './canonical-json.ts';
import { chainFault } from './chain.ts';
import type { StudyReading } from './study-reading.ts';
import type { Verdict } from './verify.ts';

/** Every entry is linked to the one before, and the entries tell of sessions that could have happened. */
export function checkRecord(study: StudyReading): Verdict {
  const entries = study.entries();
  const fault = chainFault(entries);
  if (fault !== null) return { faults: [`Entry ${fault.sequence}: ${fault.why}.`], held: '' };
  study.sessions();
  return { faults: [], held: `${entries.length} entries, each linked to the one before.` };
}

/** The protocol is the one that was sealed before anything else happened, and every session was planned by it. */
export function checkProtocol(study: StudyReading): Verdict {
  const protocol = study.protocol();
  const entries = study.entries();
  const [first] = entries;
  const faults: string[] = [];
  if (first?.kind !== 'protocol-sealed') faults.push('The record does not begin with the sealing of a protocol.');
  if (first?.payload.digest !== protocolDigest(protocol))
    faults.push('The protocol does not match the digest that was sealed.');
  if (protocol.study !== first?.study) faults.push('The protocol is that of another study.');
  const plan = canonicalJson(sessionPlanOf(protocol) as unknown as Json);
  for (const session of study.sessions())
    if (canonicalJson(session.plan as unknown as Json) !== plan)
      faults.push(`Session ${session.session} was not planned as the protocol says.`);
  const opened = entries.find(({ kind }) => kind === 'trial-opened')?.sequence;
  const before = opened === undefined ? '' : `; the first trial opened with entry ${opened}`;
  return { faults, held: `Its digest is the one sealed with entry 1${before}.` };
}
