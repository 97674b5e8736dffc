import { readFileSync } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { getPublicKey, hashes, sign } from '@noble/ed25519';
import { sha512 } from '@noble/hashes/sha2.js';
import { type BundledHead, type BundleSource, bundleFiles } from '#shared/bundle/bundle-files.ts';
import {
  type InclusionFile,
  inclusionFormat,
  type RegistryHead,
  type RegistryLeaf,
  registryHeadFormat,
  registryLeafFormat,
} from '#shared/contracts/registry.ts';
import { type Entry, nextEntry } from '#shared/ledger/chain.ts';
import { bytesToHex, fileDigest, hexToBytes, utf8ToBytes } from '#shared/ledger/digest.ts';
import { inclusionProof, treeRoot } from '#shared/ledger/merkle.ts';
import { momentOf } from '#shared/ledger/moments.ts';
import { sealedVersions } from '#shared/ledger/protocol-versions.ts';
import { type ClosedStudy, publicationParts, publicationText } from '#shared/ledger/publication-parts.ts';
import { registryHeadBytes, registryLeafHash } from '#shared/ledger/registry.ts';
import {
  fingerprintOf,
  type HeadSignature,
  type PublicKey,
  statementBytes,
  statementDigest,
} from '#shared/ledger/signed-head.ts';
import { timestampRequest } from '#shared/ledger/timestamp-token.ts';
import { localAuthority } from '../../server/timestamps/local-authority.ts';

hashes.sha512 = sha512;

const bundleText = (name: string) =>
  readFileSync(new URL(`../../server/features/publications/bundle/${name}`, import.meta.url), 'utf8');

/** A key pair of an organisation that signed from the first entry on. */
export function signingKey(createdAt: string, seed = 7): { secret: Uint8Array; key: PublicKey } {
  const secret = new Uint8Array(32).fill(seed);
  const publicKey = bytesToHex(getPublicKey(secret));
  return { secret, key: { fingerprint: fingerprintOf(publicKey), publicKey, createdAt, retiredAt: null } };
}

export function signedHeads(
  entries: readonly Entry[],
  { secret, key }: ReturnType<typeof signingKey>,
): HeadSignature[] {
  return entries.flatMap(({ study, sequence, digest, kind, at }) => {
    const moment = momentOf(kind);
    if (moment === null) return [];
    const statement = { study, sequence, head: digest, moment, at, key: key.fingerprint };
    return [{ ...statement, signature: bytesToHex(sign(statementBytes(statement), secret)) }];
  });
}

/** The entry that says where a document was published. */
export function publishedEntry(entries: readonly Entry[], document: string): Entry {
  const last = entries.at(-1);
  if (last === undefined) throw new Error('no record');
  return nextEntry(last, {
    study: last.study,
    at: last.at,
    kind: 'study-published',
    version: 1,
    payload: { by: '00000000-0000-4000-8000-000000000001', id: '0abcdefg', digest: fileDigest(utf8ToBytes(document)) },
    nonce: 'ab'.repeat(16),
  });
}

const organisation = '00000000-0000-4000-8000-00000000000f';

/** The registry of an organisation that sealed three protocols, the study's own in the middle; its head signed. */
export function inclusionIn(entries: readonly Entry[], { secret, key }: ReturnType<typeof signingKey>): InclusionFile {
  const sealed = sealedVersions(entries).at(-1);
  if (sealed === undefined) throw new Error('nothing is sealed');
  const study = entries[0]?.study ?? '';
  const leaf: RegistryLeaf = {
    format: registryLeafFormat,
    study,
    version: sealed.version,
    digest: sealed.digest,
    sealedAt: sealed.at,
  };
  const other = { ...leaf, study: organisation };
  const hashes = [other, leaf, { ...other, version: 2 }].map(registryLeafHash);
  const at = key.createdAt;
  const said = { organisation, size: hashes.length, root: treeRoot(hashes), at, key: key.fingerprint };
  const signature = bytesToHex(sign(registryHeadBytes(said), secret));
  const head: RegistryHead = { format: registryHeadFormat, ...said, publicKey: key.publicKey, signature };
  return { format: inclusionFormat, organisation, leaf, index: 1, hashes: inclusionProof(hashes, 1), head };
}

/** A source of a bundle around a closed study, signed throughout; without tokens. */
export function bundleSource(study: ClosedStudy, by = signingKey(study.entries[0]?.at ?? '')): BundleSource {
  const document = publicationText(publicationParts(study));
  const later = [publishedEntry(study.entries, document)];
  const heads = signedHeads([...study.entries, ...later], by).map((signature) => ({ signature, token: null }));
  const registry = inclusionIn(study.entries, by);
  return {
    document,
    later,
    keys: [by.key],
    heads,
    registry,
    guide: bundleText('GUIDE.txt'),
    recompute: bundleText('recompute.R'),
  };
}

/** The same with a token of a local authority for every head, made now. */
export async function stampedSource(source: BundleSource): Promise<BundleSource> {
  const folder = await mkdtemp(join(tmpdir(), 'fairlead-bundle-'));
  try {
    const authority = await localAuthority(folder);
    const heads: BundledHead[] = [];
    for (const { signature } of source.heads) {
      const reply = await authority.ask(timestampRequest(statementDigest(signature), '1122334455667788'));
      const { name, isLocal, trusted } = authority;
      heads.push({ signature, token: { authority: name, isLocal, reply, certificates: trusted ?? '' } });
    }
    return { ...source, heads };
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

export { bundleFiles, hexToBytes };
