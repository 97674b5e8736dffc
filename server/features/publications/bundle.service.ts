import { readFileSync } from 'node:fs';
import { bundleFiles } from '#shared/bundle/bundle-files.ts';
import { writeZip } from '#shared/bundle/zip.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { signaturesOf } from '../../ledger/head-signatures.ts';
import { readRecord } from '../../ledger/ledger.ts';
import { keysOf, publicKeyView } from '../../ledger/signing-keys.ts';
import { tokensOf } from '../../timestamps/tokens.store.ts';
import { inclusionOfStudy } from '../registry/registry.service.ts';
import type { Publication } from './publication.entity.ts';
import * as store from './publications.store.ts';

const words = (name: string) => readFileSync(new URL(`bundle/${name}`, import.meta.url), 'utf8');
const guide = words('GUIDE.txt');
const recompute = words('recompute.R');

// A bundle changes only when a token arrives or the publication is withdrawn, and is asked for by every visitor.
const mostKept = 20;
const kept = new Map<string, Uint8Array>();

type Growing = {
  readonly entries: Awaited<ReturnType<typeof readRecord>>;
  readonly registry: Awaited<ReturnType<typeof inclusionOfStudy>>;
};

async function madeOf(tx: Tx, row: Publication, { entries, registry }: Growing): Promise<Uint8Array> {
  const document = await store.documentOf(tx, row.id, row.digest);
  if (document === null) throw new Error(`publication ${row.id} has no document`);
  const published = entries.findIndex(({ kind, payload }) => kind === 'study-published' && payload.id === row.id);
  const tokens = new Map((await tokensOf(tx, row.studyId)).map((token) => [token.sequence, token]));
  const heads = (await signaturesOf(tx, row.studyId)).map((signature) => {
    const token = tokens.get(signature.sequence);
    return {
      signature,
      token:
        token === undefined
          ? null
          : {
              authority: token.authority,
              isLocal: token.isLocal,
              reply: new Uint8Array(token.reply),
              certificates: token.certificates,
            },
    };
  });
  const keys = (await keysOf(tx, row.organisationId)).map(publicKeyView);
  return writeZip(bundleFiles({ document, later: entries.slice(published), keys, heads, registry, guide, recompute }));
}

/**
 * The bundle of a publication as it is now: the frozen document with its tables, and what proves it as far as it has come.
 *
 * @throws Problem `not-found`
 */
export function getBundle({ db }: Pick<Deps, 'db'>, id: string): Promise<Uint8Array> {
  return withTransaction(db, async (tx) => {
    const row = await store.findPublication(tx, id);
    if (row === null) throw new Problem('not-found', 'Nothing is published at this address.');
    const entries = await readRecord(tx, row.studyId);
    const registry = await inclusionOfStudy(tx, row.organisationId, row.studyId);
    const keys = (await keysOf(tx, row.organisationId)).map(publicKeyView);
    const tokens = await store.countTokens(tx, row.studyId);
    const state = JSON.stringify([row.digest, entries.length, tokens, registry?.head.root ?? null, keys]);
    const known = kept.get(state);
    if (known !== undefined) return known;
    const made = await madeOf(tx, row, { entries, registry });
    if (kept.size >= mostKept) kept.delete(kept.keys().next().value ?? '');
    kept.set(state, made);
    return made;
  });
}
