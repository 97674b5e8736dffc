import type { Entry } from '#shared/ledger/chain.ts';
import { momentOf } from '#shared/ledger/moments.ts';
import { type HeadSignature, statementBytes } from '#shared/ledger/signed-head.ts';
import type { Tx } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { requestToken } from '../timestamps/tokens.store.ts';
import { HeadSignatureRow } from './head-signature.entity.ts';
import { currentKey, signWith } from './signing-keys.ts';

type SignDeps = Pick<Deps, 'config' | 'random' | 'clock'>;

/** Signs every entry that marks a moment, in the transaction that writes it; a token is fetched afterwards. */
export async function signHeads(
  tx: Tx,
  deps: SignDeps,
  organisationId: string,
  entries: readonly Entry[],
): Promise<void> {
  for (const { study, sequence, kind, digest } of entries) {
    const moment = momentOf(kind);
    if (moment === null) continue;
    const key = await currentKey(tx, deps, organisationId);
    const at = new Date(deps.clock.now()).toISOString();
    const statement = { study, sequence, head: digest, moment, at, key: key.fingerprint };
    const signature = signWith(deps, key, statementBytes(statement));
    const { study: studyId, ...signed } = statement;
    await tx.insert(HeadSignatureRow, { ...signed, studyId, signature });
    await requestToken(tx, { studyId, sequence }, new Date(deps.clock.now()));
  }
}

const read = ({ studyId, sequence, head, moment, at, key, signature }: HeadSignatureRow): HeadSignature => ({
  study: studyId,
  sequence,
  head,
  moment,
  at,
  key,
  signature,
});

/** The signed heads of a study, in the order of the record. */
export async function signaturesOf(tx: Tx, studyId: string): Promise<HeadSignature[]> {
  const rows = await tx.find(HeadSignatureRow, { where: { studyId }, order: { sequence: 'ASC' } });
  return rows.map(read);
}

export async function signatureOf(tx: Tx, studyId: string, sequence: number): Promise<HeadSignature> {
  return read(await tx.findOneByOrFail(HeadSignatureRow, { studyId, sequence }));
}
