import type { SigningKey as SigningKeyReply } from '#shared/contracts/signing-keys.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { SigningKey } from '../../ledger/signing-key.entity.ts';
import { publicKeyView, rotateKey } from '../../ledger/signing-keys.ts';
import { namesOf } from '../users/users.store.ts';
import * as store from './signing-keys.store.ts';

async function viewsOf(tx: Tx, keys: readonly SigningKey[]): Promise<SigningKeyReply[]> {
  const heads = await store.countHeads(
    tx,
    keys.map(({ fingerprint }) => fingerprint),
  );
  const names = await namesOf(
    tx,
    keys.flatMap(({ createdBy }) => createdBy ?? []),
  );
  return keys.map((key) => ({
    ...publicKeyView(key),
    createdBy: key.createdBy === null ? null : (names.get(key.createdBy) ?? 'unknown'),
    retiredReason: key.retiredReason,
    heads: heads.get(key.fingerprint) ?? 0,
  }));
}

export function listKeys({ db }: Deps, organisationId: string, query: { q: string; page: number }) {
  return withTransaction(db, async (tx) => {
    const inUse = await store.findInUse(tx, organisationId);
    const [current = null] = inUse === null ? [] : await viewsOf(tx, [inUse]);
    const retired = await store.listRetired(tx, organisationId, query);
    return { ...retired, rows: await viewsOf(tx, retired.rows), current };
  });
}

/** Retires the key that was seen and makes the next; a key that somebody else has retired meanwhile is left alone. */
export function rotate(
  deps: Deps,
  { organisationId, userId }: { organisationId: string; userId: string },
  { retire, reason }: { retire: string | null; reason: string },
): Promise<{ ok: true }> {
  if (retire !== null && reason === '')
    throw new Problem('invalid-input', 'Say why the key is replaced.', [
      { pointer: '/reason', detail: 'Say why; it stays in the list of keys' },
    ]);
  return withTransaction(deps.db, async (tx) => {
    const rotated = await rotateKey(tx, deps, organisationId, { by: userId, reason, retire });
    if (rotated === null)
      throw new Problem('stale-view', 'The key has been replaced meanwhile. Look at the list and try again.');
    return { ok: true } as const;
  });
}
