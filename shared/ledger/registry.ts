import {
  type ConsistencyFile,
  type InclusionFile,
  inclusionFile,
  type RegistryHead,
  type RegistryLeaf,
  registryHead,
  registryHeadFormat,
  registryLeafFormat,
} from '../contracts/registry.ts';
import { canonicalJson } from './canonical-json.ts';
import { utf8ToBytes } from './digest.ts';
import { isConsistent, isIncluded, leafHash } from './merkle.ts';
import { fingerprintOf, isSignedBy, type PublicKey } from './signed-head.ts';

// An organisation's registry: a log whose leaves are its sealed protocols and whose heads it signs.

/** The content of a leaf: canonical JSON, whose UTF-8 is hashed. */
export function leafText({ study, version, digest, sealedAt }: Omit<RegistryLeaf, 'format'>): string {
  return canonicalJson({ format: registryLeafFormat, study, version, digest, sealedAt });
}

/** The hash of a leaf in the log's tree. */
export function registryLeafHash(leaf: Omit<RegistryLeaf, 'format'>): string {
  return leafHash(leafText(leaf));
}

type HeadStatement = Pick<RegistryHead, 'organisation' | 'size' | 'root' | 'at' | 'key'>;

/** The bytes that are signed for a head: canonical JSON in UTF-8. */
export function registryHeadBytes({ organisation, size, root, at, key }: HeadStatement): Uint8Array {
  return utf8ToBytes(canonicalJson({ format: registryHeadFormat, organisation, size, root, at, key }));
}

/**
 * Why a head cannot be trusted to be the organisation's, or null when it can.
 *
 * @param keys what the organisation names as its keys, the retired ones too
 */
export function registryHeadFault(head: RegistryHead, keys: readonly PublicKey[]): string | null {
  if (fingerprintOf(head.publicKey) !== head.key) return 'its key does not have the fingerprint that it names';
  if (!isSignedBy(head.signature, registryHeadBytes(head), head.publicKey))
    return 'its signature does not match what it says';
  const known = keys.find(({ fingerprint }) => fingerprint === head.key);
  if (known === undefined) return 'it is signed by a key that this organisation does not name as its own';
  if (head.at < known.createdAt || (known.retiredAt !== null && head.at > known.retiredAt))
    return 'it was signed when its key was not in use';
  return null;
}

/**
 * Why the log of a newer head is not the log of an older one, only longer; null when it is.
 *
 * @param proof the consistency proof between the two sizes; null where none was needed or given
 */
export function growthFault(
  older: Pick<RegistryHead, 'organisation' | 'size' | 'root'>,
  newer: Pick<RegistryHead, 'organisation' | 'size' | 'root'>,
  proof: Pick<ConsistencyFile, 'hashes'> | null,
): string | null {
  if (older.organisation !== newer.organisation) return 'the two heads are those of two organisations';
  if (newer.size < older.size) return `it had ${older.size} entries and has ${newer.size}: entries are gone`;
  const held = isConsistent({
    first: older.size,
    second: newer.size,
    firstRoot: older.root,
    secondRoot: newer.root,
    proof: proof?.hashes ?? [],
  });
  return held ? null : `its first ${older.size} entries are not those of the older head: an entry was altered`;
}

/** Why an entry is not in the log of the head that came with it, or null when it is. */
export function inclusionFault({ organisation, leaf, index, hashes, head }: InclusionFile): string | null {
  if (head.organisation !== organisation) return 'its head is that of another organisation';
  const held = isIncluded({ leaf: registryLeafHash(leaf), index, size: head.size, root: head.root, proof: hashes });
  return held ? null : `no proof leads from the entry to the root of the head with ${head.size} entries`;
}

/** A file that a visitor kept: a head, or an entry with its proof; null for anything else. */
export type KeptFile =
  | { readonly kind: 'head'; readonly head: RegistryHead }
  | ({ readonly kind: 'entry' } & InclusionFile);

export function readKeptFile(text: string): KeptFile | null {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    return null;
  }
  const head = registryHead.safeParse(value);
  if (head.success) return { kind: 'head', head: head.data };
  const entry = inclusionFile.safeParse(value);
  return entry.success ? { kind: 'entry', ...entry.data } : null;
}
