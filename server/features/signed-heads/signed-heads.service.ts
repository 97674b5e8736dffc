import type { SignedHead, TimeState } from '#shared/contracts/signed-heads.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { signaturesOf } from '../../ledger/head-signatures.ts';
import { tokensOf } from '../../timestamps/tokens.store.ts';
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
