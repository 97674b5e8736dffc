import type { SignedHead, TimeState } from '#shared/contracts/signed-heads.ts';
import type { HeadProofs } from '#shared/ledger/head-proofs.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { signaturesOf } from '../../ledger/head-signatures.ts';
import { keysOf, publicKeyView } from '../../ledger/signing-keys.ts';
import { tokensOf } from '../../timestamps/tokens.store.ts';
import { findStudy } from '../studies/studies.store.ts';
import * as store from './signed-heads.store.ts';

/** The signed heads of a study with their tokens, in the order of its record. */
export async function signedHeadsOf(tx: Tx, studyId: string): Promise<SignedHead[]> {
  const signatures = await signaturesOf(tx, studyId);
  const sessions = await store.sessionsOfEntries(
    tx,
    studyId,
    signatures.map(({ sequence }) => sequence),
  );
  const tokens = new Map((await tokensOf(tx, studyId)).map((token) => [token.sequence, token]));
  return signatures.map(({ sequence, head, moment, at, key }) => {
    const token = tokens.get(sequence);
    return {
      sequence,
      head,
      moment,
      session: sessions.get(sequence) ?? null,
      at,
      key,
      token:
        token === undefined
          ? null
          : { authority: token.authority, isLocal: token.isLocal, time: token.time, gapMs: token.gapMs },
    };
  });
}

/** Keys, signatures and tokens of a study's record, with everything that confirms them. */
export async function headProofsOf(tx: Tx, study: { id: string; organisationId: string }): Promise<HeadProofs> {
  const signatures = await signaturesOf(tx, study.id);
  const used = new Set(signatures.map(({ key }) => key));
  const keys = (await keysOf(tx, study.organisationId)).filter(({ fingerprint }) => used.has(fingerprint));
  const tokens = new Map((await tokensOf(tx, study.id)).map((token) => [token.sequence, token]));
  return {
    format: 'fairlead-signed-heads',
    version: 1,
    keys: keys.map(publicKeyView),
    heads: signatures.map((signature) => {
      const token = tokens.get(signature.sequence);
      if (token === undefined) return { ...signature, token: null };
      const { authority, isLocal, time, certificates } = token;
      const request = token.request.toString('base64');
      const reply = token.reply.toString('base64');
      return { ...signature, token: { authority, isLocal, time, request, reply, certificates } };
    }),
  };
}

export function studyHeadProofs({ db }: Deps, where: { organisationId: string; id: string }): Promise<HeadProofs> {
  return withTransaction(db, async (tx) => {
    const study = await findStudy(tx, where.organisationId, where.id);
    if (study === null) throw new Problem('not-found', 'There is no such study.');
    return headProofsOf(tx, study);
  });
}

export function timeStateOf({ db, timestamps }: Deps, organisationId: string): Promise<TimeState> {
  return withTransaction(db, async (tx) => {
    const { waiting, next } = await store.waitingFor(tx, organisationId);
    return {
      authority: timestamps === null ? null : { name: timestamps.name, isLocal: timestamps.isLocal },
      waiting,
      lastError: next?.lastError ?? null,
      nextAttemptAt: timestamps === null ? null : (next?.nextAttemptAt.toISOString() ?? null),
    };
  });
}
