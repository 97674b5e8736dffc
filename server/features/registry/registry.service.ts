import {
  type ConsistencyFile,
  consistencyFormat,
  type InclusionFile,
  inclusionFormat,
  type RegistryHead,
  type RegistryListQuery,
  registryLeafFormat,
} from '#shared/contracts/registry.ts';
import { consistencyProof, inclusionProof } from '#shared/ledger/merkle.ts';
import type { PublicKey } from '#shared/ledger/signed-head.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { leafHashes, registryHeadOf } from '../../ledger/registry-log.ts';
import { keysOf, publicKeyView } from '../../ledger/signing-keys.ts';
import { findOrganisation } from '../organisations/organisations.store.ts';
import * as store from './registry.store.ts';
import { registryRowView } from './registry.views.ts';

const noRegistry = () => new Problem('not-found', 'There is no registry at this address.');

async function requireName(tx: Tx, organisationId: string): Promise<string> {
  const organisation = await findOrganisation(tx, organisationId);
  if (organisation === null) throw noRegistry();
  return organisation.name;
}

async function requireHead(tx: Tx, organisationId: string): Promise<RegistryHead> {
  const head = await registryHeadOf(tx, organisationId);
  if (head === null) throw new Problem('not-found', 'Nothing is sealed here yet.');
  return head;
}

export function listRegistry({ db }: Deps, organisationId: string, query: RegistryListQuery) {
  return withTransaction(db, async (tx) => {
    const organisation = await requireName(tx, organisationId);
    const found = await store.listLeaves(tx, organisationId, query);
    const beside = await store.besideLeaves(
      tx,
      found.rows.map(({ studyId }) => studyId),
    );
    const rows = found.rows.map((leaf) => registryRowView(leaf, beside));
    return { ...found, rows, organisation, head: await registryHeadOf(tx, organisationId) };
  });
}

export function getHead({ db }: Deps, organisationId: string): Promise<RegistryHead> {
  return withTransaction(db, (tx) => requireHead(tx, organisationId));
}

export function listRegistryKeys({ db }: Deps, organisationId: string): Promise<{ keys: PublicKey[] }> {
  return withTransaction(db, async (tx) => {
    await requireName(tx, organisationId);
    return { keys: (await keysOf(tx, organisationId)).map(publicKeyView) };
  });
}

/** The proof of an entry against the current head; null where it has no such entry. */
async function inclusionOf(tx: Tx, head: RegistryHead, index: number): Promise<InclusionFile | null> {
  const { organisation } = head;
  const row = await store.findLeaf(tx, organisation, index);
  if (row === null || index >= head.size) return null;
  const { studyId: study, version, digest, sealedAt } = row;
  return {
    format: inclusionFormat,
    organisation,
    leaf: { format: registryLeafFormat, study, version, digest, sealedAt },
    index,
    hashes: inclusionProof(await leafHashes(tx, organisation, head.size), index),
    head,
  };
}

/** The proof of an entry against the current head, which may be signed at a larger size a moment later. */
export function proveInclusion({ db }: Deps, organisationId: string, index: number): Promise<InclusionFile> {
  return withTransaction(db, async (tx) => {
    const proof = await inclusionOf(tx, await requireHead(tx, organisationId), index);
    if (proof === null) throw new Problem('not-found', 'The registry has no such entry.');
    return proof;
  });
}

/** The same for the last sealed version of a study's protocol; null where the organisation has no registry yet. */
export async function inclusionOfStudy(tx: Tx, organisationId: string, studyId: string): Promise<InclusionFile | null> {
  const head = await registryHeadOf(tx, organisationId);
  const index = await store.lastLeafOf(tx, organisationId, studyId);
  return head === null || index === null ? null : inclusionOf(tx, head, index);
}

export function proveConsistency(
  { db }: Deps,
  organisationId: string,
  { first, second }: { first: number; second: number },
): Promise<ConsistencyFile> {
  return withTransaction(db, async (tx) => {
    const { size } = await requireHead(tx, organisationId);
    const faults = [
      ...(second > size ? [{ pointer: '/query/second', detail: `The log has ${size} entries` }] : []),
      ...(first > second ? [{ pointer: '/query/first', detail: 'At most as many as the second' }] : []),
    ];
    if (faults.length > 0) throw new Problem('invalid-input', 'The log never grew from the one to the other.', faults);
    const hashes = consistencyProof(await leafHashes(tx, organisationId, second), first);
    return { format: consistencyFormat, organisation: organisationId, first, second, hashes };
  });
}

/** The registries of organisations that have published something, for the sitemap. */
export function publicRegistries({ db }: Deps): Promise<string[]> {
  return withTransaction(db, store.publishingOrganisations);
}
