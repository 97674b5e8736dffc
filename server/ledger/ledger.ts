import { canonicalJson, type Json } from '#shared/ledger/canonical-json.ts';
import { type Entry, nextEntry } from '#shared/ledger/chain.ts';
import type { Tx } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { Study } from '../features/studies/study.entity.ts';
import { RecordEntry } from './entry.entity.ts';
import { signHeads } from './head-signatures.ts';

export type NewEntry = {
  kind: string;
  /** Milliseconds since 1970. */
  at: number;
  payload: { readonly [key: string]: Json };
  session: number | null;
};

const payloadVersion = 1;

function entryOf(row: RecordEntry): Entry {
  return {
    study: row.studyId,
    sequence: row.sequence,
    at: row.at,
    kind: row.kind,
    version: row.version,
    payload: JSON.parse(row.payload),
    nonce: row.nonce,
    previous: row.previous,
    digest: row.digest,
  };
}

/**
 * Appends entries to a study's record, in order. The study's row is locked until the transaction ends, so that two
 * writers cannot both continue from one head; the primary key would refuse the second in any case. An entry that marks
 * one of the five moments is signed with it.
 */
export async function append(
  tx: Tx,
  deps: Pick<Deps, 'config' | 'random' | 'clock'>,
  studyId: string,
  entries: readonly NewEntry[],
): Promise<Entry[]> {
  const study = await tx.findOneOrFail(Study, { where: { id: studyId }, lock: { mode: 'pessimistic_write' } });
  let head = study.headDigest === null ? null : { sequence: study.headSequence, digest: study.headDigest };
  const chained: Entry[] = [];
  for (const { kind, at, payload } of entries) {
    const nonce = deps.random.bytes('entry-nonce', 16).toString('hex');
    const entry = nextEntry(head, {
      study: studyId,
      at: new Date(at).toISOString(),
      kind,
      version: payloadVersion,
      payload,
      nonce,
    });
    chained.push(entry);
    head = entry;
  }
  if (head === null || chained.length === 0) return [];
  await tx.insert(
    RecordEntry,
    chained.map((entry, index) => ({
      studyId,
      sequence: entry.sequence,
      sessionNumber: entries[index]?.session ?? null,
      at: entry.at,
      kind: entry.kind,
      version: entry.version,
      payload: canonicalJson(entry.payload),
      nonce: entry.nonce,
      previous: entry.previous,
      digest: entry.digest,
    })),
  );
  await tx.update(Study, { id: studyId }, { headSequence: head.sequence, headDigest: head.digest });
  await signHeads(tx, deps, study.organisationId, chained);
  return chained;
}

/** A study's whole record, in order. */
export async function readRecord(tx: Tx, studyId: string): Promise<Entry[]> {
  const rows = await tx.find(RecordEntry, { where: { studyId }, order: { sequence: 'ASC' } });
  return rows.map(entryOf);
}

/** The entries of one session, in order. */
export async function readSessionEntries(tx: Tx, studyId: string, sessionNumber: number): Promise<Entry[]> {
  const rows = await tx.find(RecordEntry, { where: { studyId, sessionNumber }, order: { sequence: 'ASC' } });
  return rows.map(entryOf);
}

/** The entries of some kinds, in order. */
export async function readKinds(tx: Tx, studyId: string, kinds: readonly string[]): Promise<Entry[]> {
  const rows = await tx
    .createQueryBuilder(RecordEntry, 'entry')
    .where('entry.studyId = :studyId and entry.kind in (:...kinds)', { studyId, kinds })
    .orderBy('entry.sequence', 'ASC')
    .getMany();
  return rows.map(entryOf);
}
