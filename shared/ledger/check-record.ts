import { protocolDigest, sessionPlanOf } from '../protocol/protocol.ts';
import { canonicalJson, type Json } from './canonical-json.ts';
import { chainFault } from './chain.ts';
import { type SealedVersion, sealedVersions } from './protocol-versions.ts';
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

/** What is wrong with the versions that the record seals, each before the first session opened. */
function versionFaults(study: StudyReading, versions: readonly SealedVersion[]): string[] {
  const entries = study.entries();
  const protocols = [...study.earlierProtocols(), study.protocol()];
  const opened = entries.find(({ kind }) => kind === 'seating-opened')?.sequence ?? Number.POSITIVE_INFINITY;
  const faults: string[] = [];
  if (entries[0]?.kind !== 'protocol-sealed') faults.push('The record does not begin with the sealing of a protocol.');
  if (protocols.length !== versions.length)
    faults.push(`The record seals ${versions.length} versions of the protocol, and ${protocols.length} are here.`);
  for (const [index, { sequence, version, digest, reason }] of versions.entries()) {
    const protocol = protocols[index];
    const isFirst = index === 0;
    if (isFirst !== (reason === null)) faults.push(`Entry ${sequence} seals the protocol a second time.`);
    if (version !== index + 1) faults.push(`Entry ${sequence} seals version ${version} where ${index + 1} was due.`);
    if (!isFirst && sequence > opened)
      faults.push(`Entry ${sequence} amends the protocol after the first session had opened with entry ${opened}.`);
    if (protocol !== undefined && (digest !== protocolDigest(protocol) || protocol.version !== version))
      faults.push('The protocol does not match the digest that was sealed.');
    if (protocol !== undefined && protocol.study !== entries[0]?.study)
      faults.push('The protocol is that of another study.');
  }
  return faults;
}

/** Sessions that were cancelled before the protocol came into force were planned by an earlier version. */
function plannedOtherwise(study: StudyReading, since: number): string[] {
  const plan = canonicalJson(sessionPlanOf(study.protocol()) as unknown as Json);
  const cancelled = new Set(
    study
      .entries()
      .filter(({ kind, sequence }) => kind === 'session-abandoned' && sequence < since)
      .map(({ payload }) => payload.session),
  );
  return study
    .sessions()
    .filter(({ session }) => !cancelled.has(session))
    .filter((session) => canonicalJson(session.plan as unknown as Json) !== plan)
    .map(({ session }) => `Session ${session} was not planned as the protocol says.`);
}

/**
 * The protocol is the last that was sealed before the first session opened, as are the versions before it, and every
 * session was planned by it.
 */
export function checkProtocol(study: StudyReading): Verdict {
  const versions = sealedVersions(study.entries());
  const last = versions.at(-1)?.sequence ?? 1;
  const faults = [...versionFaults(study, versions), ...plannedOtherwise(study, last)];
  const opened = study.entries().find(({ kind }) => kind === 'trial-opened')?.sequence;
  const before = opened === undefined ? '' : `; the first trial opened with entry ${opened}`;
  const amended = versions.length === 1 ? '' : `, as version ${versions.length}`;
  return { faults, held: `Its digest is the one sealed with entry ${last}${amended}${before}.` };
}
