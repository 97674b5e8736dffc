import type { RevealedKey } from '#shared/session/revealed-key.ts';
import type { Tx } from '../db/transaction.ts';
import { CodeKey } from './code-key.entity.ts';
import { DrawSecret } from './draw-secret.entity.ts';
import { Sealed } from './sealed.ts';

export type CodeRow = RevealedKey['codeKey']['rows'][number];
export type CodeKeySecret = RevealedKey['codeKey'];
export type DrawSecretValue = { secret: string; salt: string };

export async function saveCodeKey(tx: Tx, studyId: string, { rows, salt }: CodeKeySecret): Promise<void> {
  await tx.insert(CodeKey, { studyId, rows: JSON.stringify(rows), salt });
}

export async function deleteCodeKey(tx: Tx, studyId: string): Promise<void> {
  await tx.delete(CodeKey, { studyId });
}

export async function readCodeKey(tx: Tx, studyId: string): Promise<Sealed<CodeKeySecret> | null> {
  const row = await tx.findOneBy(CodeKey, { studyId });
  return row === null ? null : new Sealed({ rows: JSON.parse(row.rows) as CodeRow[], salt: row.salt });
}

export async function saveDrawSecret(tx: Tx, sessionId: string, { secret, salt }: DrawSecretValue): Promise<void> {
  await tx.insert(DrawSecret, { sessionId, secret, salt });
}

export async function readDrawSecret(tx: Tx, sessionId: string): Promise<Sealed<DrawSecretValue> | null> {
  const row = await tx.findOneBy(DrawSecret, { sessionId });
  return row === null ? null : new Sealed({ secret: row.secret, salt: row.salt });
}
