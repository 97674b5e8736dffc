import { type RegistryHead, type RegistryLeaf, registryHeadFormat } from '#shared/contracts/registry.ts';
import { treeRoot } from '#shared/ledger/merkle.ts';
import { registryHeadBytes, registryLeafHash } from '#shared/ledger/registry.ts';
import type { Tx } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { Study } from '../features/studies/study.entity.ts';
import { RecordEntry } from './entry.entity.ts';
import { RegistryHeadRow } from './registry-head.entity.ts';
import { RegistryLeafRow } from './registry-leaf.entity.ts';
import { currentKey, lockOrganisation, signWith } from './signing-keys.ts';

type LogDeps = Pick<Deps, 'config' | 'random' | 'clock'>;

/** The hashes of an organisation's leaves, in order; of the first so many, where a size is given. */
export async function leafHashes(tx: Tx, organisationId: string, size?: number): Promise<string[]> {
  const rows = await tx.find(RegistryLeafRow, {
    select: { organisationId: true, index: true, hash: true },
    where: { organisationId },
    order: { index: 'ASC' },
    ...(size === undefined ? {} : { take: size }),
  });
  return rows.map(({ hash }) => hash);
}

async function signHead(tx: Tx, deps: LogDeps, organisation: string, hashes: readonly string[]): Promise<void> {
  const { fingerprint, publicKey, ...key } = await currentKey(tx, deps, organisation);
  const at = new Date(deps.clock.now()).toISOString();
  const statement = { organisation, size: hashes.length, root: treeRoot(hashes), at, key: fingerprint };
  const signature = signWith(deps, { fingerprint, publicKey, ...key }, registryHeadBytes(statement));
  const { organisation: organisationId, ...signed } = statement;
  await tx.insert(RegistryHeadRow, { organisationId, ...signed, publicKey, signature });
}

/**
 * Enters a sealed protocol in its organisation's registry and signs the new head. Called in the transaction that seals,
 * before anything else of it is signed: the organisation's row is locked first and its key after it, so that two
 * sealings take their places one after the other and none waits for the other's key.
 */
export async function enterProtocol(
  tx: Tx,
  deps: LogDeps,
  organisationId: string,
  sealed: Omit<RegistryLeaf, 'format'>,
): Promise<void> {
  await lockOrganisation(tx, organisationId);
  const hashes = await leafHashes(tx, organisationId);
  const hash = registryLeafHash(sealed);
  const { study: studyId, ...leaf } = sealed;
  await tx.insert(RegistryLeafRow, { organisationId, index: hashes.length, studyId, ...leaf, hash });
  await signHead(tx, deps, organisationId, [...hashes, hash]);
}

/** Enters, in the order of their sealing, what was sealed before there was a registry. Returns how many that were. */
export async function enterEarlierProtocols(tx: Tx, deps: LogDeps): Promise<number> {
  const sealings = await tx
    .createQueryBuilder(RecordEntry, 'entry')
    .innerJoin(Study, 'study', 'study.id = entry.studyId')
    .leftJoin(RegistryLeafRow, 'leaf', 'leaf.studyId = entry.studyId')
    .where("entry.kind = 'protocol-sealed' and leaf.hash is null")
    .orderBy('entry.at', 'ASC')
    .addOrderBy('entry.studyId', 'ASC')
    .getMany();
  for (const { studyId: study, at: sealedAt, payload } of sealings) {
    const { organisationId } = await tx.findOneByOrFail(Study, { id: study });
    const { protocolVersion: version, digest } = JSON.parse(payload);
    // Another process may start at the same time.
    await lockOrganisation(tx, organisationId);
    if (await tx.existsBy(RegistryLeafRow, { studyId: study, version })) continue;
    await enterProtocol(tx, deps, organisationId, { study, version, digest, sealedAt });
  }
  return sealings.length;
}

/** Every entry of an organisation's registry, in order. */
export function leavesOf(tx: Tx, organisationId: string): Promise<RegistryLeafRow[]> {
  return tx.find(RegistryLeafRow, { where: { organisationId }, order: { index: 'ASC' } });
}

const headOf = ({ organisationId, size, root, at, key, publicKey, signature }: RegistryHeadRow): RegistryHead => ({
  format: registryHeadFormat,
  organisation: organisationId,
  size,
  root,
  at,
  key,
  publicKey,
  signature,
});

/** Every head that was signed, the smallest first. */
export async function registryHeadsOf(tx: Tx, organisationId: string): Promise<RegistryHead[]> {
  const rows = await tx.find(RegistryHeadRow, { where: { organisationId }, order: { size: 'ASC' } });
  return rows.map(headOf);
}

/** The current head of an organisation's registry; null while nothing is entered. */
export async function registryHeadOf(tx: Tx, organisationId: string): Promise<RegistryHead | null> {
  const row = await tx.findOne(RegistryHeadRow, { where: { organisationId }, order: { size: 'DESC' } });
  return row === null ? null : headOf(row);
}
