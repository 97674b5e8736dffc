import { type ChainFault, chainFault, type Entry } from '#shared/ledger/chain.ts';
import { fileDigest, utf8ToBytes } from '#shared/ledger/digest.ts';
import { sealedVersions } from '#shared/ledger/protocol-versions.ts';

import { type HeadSignature, statementBytes, statementDigest } from '#shared/ledger/signed-head.ts';
import { signaturesFault } from '#shared/ledger/signed-record.ts';
import { readTimestampReply } from '#shared/ledger/timestamp-token.ts';
import { protocolDigest } from '#shared/protocol/protocol.ts';
import { answerLeaf } from '#shared/session/answer-leaf.ts';
import type { PayloadOf } from '#shared/session/events.ts';
import { type RequestContent, requestLeaf } from '#shared/session/request-leaf.ts';
import type { StudyPayloadOf } from '#shared/session/study-events.ts';
import type { Tx } from '../../db/transaction.ts';
import { signaturesOf } from '../../ledger/head-signatures.ts';
import { readRecord } from '../../ledger/ledger.ts';
import { keysOf, publicKeyView } from '../../ledger/signing-keys.ts';
import { tokenSignatureFault } from '../../timestamps/openssl.ts';
import type { TimestampToken } from '../../timestamps/timestamp-token.entity.ts';
import { tokensOf } from '../../timestamps/tokens.store.ts';
import { documentOf } from '../publications/publications.store.ts';
import type { Answer } from '../sessions/answer.entity.ts';
import { requestsOfSessions } from '../sessions/requests.store.ts';
import { answersOfSessions, sessionsOfStudy } from '../sessions/sessions.store.ts';
import { protocolOf } from '../studies/studies.service.ts';
import { studyById } from '../studies/studies.store.ts';
import type { Study } from '../studies/study.entity.ts';

export type StudyAudit = {
  readonly title: string;
  readonly entries: number;
  readonly signatures: number;
  readonly tokens: number;
  /** The first break; null when everything holds. */
  readonly fault: { readonly sequence: number | null; readonly why: string } | null;
};

/** The study's own row must agree with its record: whose it is, where it ends, which protocol was sealed. */
function studyFault(study: Study, entries: readonly Entry[]): StudyAudit['fault'] {
  const head = entries.at(-1);
  if (head === undefined) return { sequence: 1, why: `${study.headSequence} entries are expected, and there is none` };
  if (head.study !== study.id) return { sequence: 1, why: 'the entries are those of another study' };
  if (head.sequence !== study.headSequence)
    return { sequence: head.sequence, why: `the record should end with entry ${study.headSequence}` };
  if (head.digest !== study.headDigest)
    return { sequence: head.sequence, why: 'its digest is not the head that the study keeps' };
  const sealing = sealedVersions(entries).at(-1);
  if (sealing !== undefined && sealing.digest !== protocolDigest(protocolOf(study)))
    return { sequence: sealing.sequence, why: 'the protocol is not the one that was sealed' };
  return null;
}

/** Every answer of a locked trial is still the one whose leaf is on the record. */
function answersFault(entries: readonly Entry[], answers: readonly Answer[]): ChainFault | null {
  const sessionIds = new Map(
    entries.filter(({ kind }) => kind === 'session-planned').map(({ payload }) => [payload.session, payload.sessionId]),
  );
  const held = new Map(answers.map((answer) => [`${answer.sessionId} ${answer.trial} ${answer.seat}`, answer]));
  for (const { kind, sequence, payload } of entries) {
    if (kind !== 'trial-locked') continue;
    const { session, trial, leaves } = payload as unknown as PayloadOf<'trial-locked'>;
    for (const { seat, leaf } of leaves) {
      const answer = held.get(`${sessionIds.get(session)} ${trial} ${seat}`);
      const what = `the answer of ${seat} to trial ${trial} of session ${session}`;
      if (answer === undefined) return { sequence, why: `${what} is gone` };
      if (answerLeaf({ ...answer, session: answer.sessionId }) !== leaf)
        return { sequence, why: `${what} is not the one that was locked` };
    }
  }
  return null;
}

/** Every request is still the one whose leaf is on the record. */
function requestsFault(entries: readonly Entry[], requests: readonly RequestContent[]): ChainFault | null {
  const sessionIds = new Map(
    entries.filter(({ kind }) => kind === 'session-planned').map(({ payload }) => [payload.session, payload.sessionId]),
  );
  const leaves = new Map(
    requests.map((one) => [`${one.session} ${one.trial} ${one.presentation}`, requestLeaf(one)] as const),
  );
  for (const { kind, sequence, payload } of entries) {
    if (kind !== 'presentation-requested') continue;
    const { session, trial, presentation, leaf } = payload as unknown as PayloadOf<'presentation-requested'>;
    if (leaves.get(`${sessionIds.get(session)} ${trial} ${presentation}`) !== leaf)
      return {
        sequence,
        why: `presentation ${presentation + 1} of trial ${trial} of session ${session} is not as asked for`,
      };
  }
  return null;
}

/** What was published is still the document whose digest is on the record. */
async function publicationFault(tx: Tx, entries: readonly Entry[]): Promise<ChainFault | null> {
  const published = entries.find(({ kind }) => kind === 'study-published');
  if (published === undefined) return null;
  const { id, digest } = published.payload as unknown as StudyPayloadOf<'study-published'>;
  const document = await documentOf(tx, id, digest);
  if (document === null) return { sequence: published.sequence, why: 'the document that was published is gone' };
  return fileDigest(utf8ToBytes(document)) === digest
    ? null
    : { sequence: published.sequence, why: 'the document is not the one that was published' };
}

async function tokenFault(token: TimestampToken, signature: HeadSignature | undefined): Promise<string | null> {
  if (signature === undefined) return 'a token is for a head that is not signed';
  if (token.imprint !== statementDigest(signature)) return 'the token is for another statement';
  const read = readTimestampReply(token.reply).token;
  if (read?.imprint !== token.imprint || read.time !== token.time)
    return 'the token does not say what is kept beside it';
  const timeS = Math.floor(Date.parse(token.time) / 1000);
  const why = await tokenSignatureFault(statementBytes(signature), token.reply, token.certificates, timeS);
  return why === null ? null : `the token’s signature does not hold: ${why}`;
}

async function tokensFault(
  tokens: readonly TimestampToken[],
  signatures: readonly HeadSignature[],
): Promise<ChainFault | null> {
  for (const token of tokens) {
    const { sequence } = token;
    const why = await tokenFault(
      token,
      signatures.find((signature) => signature.sequence === sequence),
    ).catch((error: unknown) => `the token cannot be read: ${error instanceof Error ? error.message : String(error)}`);
    if (why !== null) return { sequence, why };
  }
  return null;
}

/** Verifies one study's record in the database: chain, signatures, tokens, locked answers, protocol, publication and head. */
export async function auditStudy(tx: Tx, studyId: string): Promise<StudyAudit> {
  const study = await studyById(tx, studyId);
  const entries = await readRecord(tx, studyId);
  const signatures = await signaturesOf(tx, studyId);
  const tokens = await tokensOf(tx, studyId);
  const keys = (await keysOf(tx, study.organisationId)).map(publicKeyView);
  const sessions = await sessionsOfStudy(tx, studyId);
  const answers = await answersOfSessions(
    tx,
    sessions.map(({ id }) => id),
  );
  const requests = await requestsOfSessions(
    tx,
    sessions.map(({ id }) => id),
  );
  const fault =
    chainFault(entries) ??
    studyFault(study, entries) ??
    signaturesFault(entries, signatures, keys) ??
    answersFault(entries, answers) ??
    requestsFault(entries, requests) ??
    (await publicationFault(tx, entries)) ??
    (await tokensFault(tokens, signatures));
  return { title: study.title, entries: entries.length, signatures: signatures.length, tokens: tokens.length, fault };
}
