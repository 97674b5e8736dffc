import { Problem } from '#shared/problem.ts';
import type { RevealedKey } from '#shared/session/revealed-key.ts';
import type { Tx } from '../db/transaction.ts';
import { Study } from '../features/studies/study.entity.ts';
import { RecordEntry } from '../ledger/entry.entity.ts';
import { OpeningProof } from './sealed.ts';
import { type CodeRow, readCodeKey, readDrawSecret } from './secrets.store.ts';

/** @throws Error unless the closing of the study is on its record, read afresh */
async function proveClosed(tx: Tx, studyId: string): Promise<OpeningProof> {
  const closed = await tx.existsBy(RecordEntry, { studyId, kind: 'study-closed' });
  if (!closed) throw new Error('the secrets of an open study stay sealed');
  return new OpeningProof('closed');
}

/** @throws Problem unless this person holds the codes and an opening of theirs is on the record */
async function proveHolder(tx: Tx, studyId: string, userId: string): Promise<OpeningProof> {
  const study = await tx.findOneByOrFail(Study, { id: studyId });
  const opened = await tx.existsBy(RecordEntry, { studyId, kind: 'code-key-opened' });
  if (study.codeHolderId !== userId || !opened)
    throw new Problem('not-allowed', 'Only the code holder sees the codes.');
  return new OpeningProof('code holder');
}

/** The code key for its holder, after the opening has been put on the record. */
export async function openForHolder(tx: Tx, studyId: string, userId: string): Promise<readonly CodeRow[]> {
  const proof = await proveHolder(tx, studyId, userId);
  const sealed = await readCodeKey(tx, studyId);
  if (sealed === null) throw new Problem('wrong-phase', 'No codes are drawn yet.');
  return sealed.open(proof).rows;
}

/** Both secrets, after closing. A session that was never opened for seating has none. */
export async function reveal(
  tx: Tx,
  studyId: string,
  sessions: readonly { readonly id: string; readonly number: number }[],
): Promise<RevealedKey> {
  const proof = await proveClosed(tx, studyId);
  const sealedKey = await readCodeKey(tx, studyId);
  const codeKey = sealedKey?.open(proof) ?? { rows: [], salt: '0'.repeat(64) };
  const draws: RevealedKey['draws'] = [];
  for (const { id, number } of sessions) {
    const sealed = await readDrawSecret(tx, id);
    if (sealed !== null) draws.push({ session: number, ...sealed.open(proof) });
  }
  return { codeKey, draws };
}
