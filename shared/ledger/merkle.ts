import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, concatBytes, hexToBytes, utf8ToBytes } from './digest.ts';

// The Merkle tree of RFC 9162, Certificate Transparency Version 2.0, section 2.1. Leaves and nodes are hashed behind
// different first bytes, so that none passes for the other. Every hash is 64 lower-case hexadecimal digits.

const hashPattern = /^[0-9a-f]{64}$/;
const isHash = (text: unknown): text is string => typeof text === 'string' && hashPattern.test(text);

/** The root of a tree without leaves: SHA-256 of nothing. */
export const emptyRoot = bytesToHex(sha256(new Uint8Array(0)));

/** The hash of a leaf: SHA-256(0x00, content). Text is taken in UTF-8. */
export function leafHash(content: string | Uint8Array): string {
  const bytes = typeof content === 'string' ? utf8ToBytes(content) : content;
  return bytesToHex(sha256(concatBytes(new Uint8Array([0]), bytes)));
}

/** The hash of a node over two others: SHA-256(0x01, left, right). */
export function nodeHash(left: string, right: string): string {
  return bytesToHex(sha256(concatBytes(new Uint8Array([1]), hexToBytes(left), hexToBytes(right))));
}

/** The largest power of two below `size`, for sizes from 2: where a tree divides. */
function leftSize(size: number): number {
  let half = 1;
  while (half * 2 < size) half *= 2;
  return half;
}

/**
 * The root of the tree over some leaves, in their order.
 *
 * @param leaves hashes of leaves, from none to as many as there are
 * @example treeRoot([]) // SHA-256 of nothing
 * @see RFC 9162, section 2.1.1
 */
export function treeRoot(leaves: readonly string[]): string {
  const [only] = leaves;
  if (only === undefined) return emptyRoot;
  if (leaves.length === 1) return only;
  const half = leftSize(leaves.length);
  return nodeHash(treeRoot(leaves.slice(0, half)), treeRoot(leaves.slice(half)));
}

function requireWhole(value: number, least: number, most: number, what: string): void {
  if (!Number.isSafeInteger(value) || value < least || value > most)
    throw new RangeError(`${what} must be a whole number from ${least} to ${most}`);
}

/**
 * The hashes that lead from one leaf to the root, the deepest first.
 *
 * @param leaves hashes of all leaves of the tree, at least one
 * @param index  which leaf, from 0
 * @returns one hash for each level, at most log2 of the size, rounded up
 * @throws RangeError for an index that the tree does not have
 * @see RFC 9162, section 2.1.3.1
 */
export function inclusionProof(leaves: readonly string[], index: number): string[] {
  requireWhole(index, 0, leaves.length - 1, 'index');
  if (leaves.length === 1) return [];
  const half = leftSize(leaves.length);
  const [left, right] = [leaves.slice(0, half), leaves.slice(half)];
  return index < half
    ? [...inclusionProof(left, index), treeRoot(right)]
    : [...inclusionProof(right, index - half), treeRoot(left)];
}

function subproof(leaves: readonly string[], first: number, isWhole: boolean): string[] {
  if (first === leaves.length) return isWhole ? [] : [treeRoot(leaves)];
  const half = leftSize(leaves.length);
  const [left, right] = [leaves.slice(0, half), leaves.slice(half)];
  return first <= half
    ? [...subproof(left, first, isWhole), treeRoot(right)]
    : [...subproof(right, first - half, false), treeRoot(left)];
}

/**
 * The hashes which show that the first leaves of a tree are the leaves of an older tree, unchanged and in their order.
 *
 * @param leaves hashes of all leaves of the newer tree
 * @param first  size of the older tree, from 1 to the size of the newer
 * @returns no hash where both are of one size
 * @throws RangeError for a size that the tree cannot have had
 * @see RFC 9162, section 2.1.4.1
 */
export function consistencyProof(leaves: readonly string[], first: number): string[] {
  requireWhole(first, 1, leaves.length, 'first');
  return subproof(leaves, first, true);
}

const half = (value: number) => Math.floor(value / 2);
const isOdd = (value: number) => value % 2 === 1;
const isSize = (value: number, least: number) => Number.isSafeInteger(value) && value >= least;

type Inclusion = {
  /** Hash of the leaf. */
  readonly leaf: string;
  /** Its place, from 0. */
  readonly index: number;
  /** How many leaves the tree has. */
  readonly size: number;
  readonly root: string;
  readonly proof: readonly string[];
};

/**
 * Whether a leaf stands at its place in the tree of a root. Anything malformed is no proof.
 *
 * @see RFC 9162, section 2.1.3.2
 */
export function isIncluded({ leaf, index, size, root, proof }: Inclusion): boolean {
  if (!isSize(index, 0) || !isSize(size, 1) || index >= size) return false;
  if (![leaf, root, ...proof].every(isHash)) return false;
  let [at, last, hash] = [index, size - 1, leaf];
  for (const other of proof) {
    if (last === 0) return false;
    if (isOdd(at) || at === last) {
      hash = nodeHash(other, hash);
      while (!isOdd(at) && at !== 0) [at, last] = [half(at), half(last)];
    } else hash = nodeHash(hash, other);
    [at, last] = [half(at), half(last)];
  }
  return last === 0 && hash === root;
}

type Consistency = {
  /** Sizes of the older and the newer tree. */
  readonly first: number;
  readonly second: number;
  readonly firstRoot: string;
  readonly secondRoot: string;
  readonly proof: readonly string[];
};

/**
 * Whether the newer tree begins with every leaf of the older one. Anything malformed is no proof. Trees of one size are
 * consistent when their roots are alike, with a proof of no hash; an older tree has at least one leaf.
 *
 * @see RFC 9162, section 2.1.4.2
 */
export function isConsistent({ first, second, firstRoot, secondRoot, proof }: Consistency): boolean {
  if (!isSize(first, 1) || !isSize(second, first)) return false;
  if (![firstRoot, secondRoot, ...proof].every(isHash)) return false;
  if (first === second) return proof.length === 0 && firstRoot === secondRoot;
  let [at, last] = [first - 1, second - 1];
  while (isOdd(at)) [at, last] = [half(at), half(last)];
  // A whole older tree is a node of the newer one, and is not sent.
  const [start, ...others] = at === 0 ? [firstRoot, ...proof] : proof;
  if (start === undefined || proof.length === 0) return false;
  let [older, newer] = [start, start];
  for (const other of others) {
    if (last === 0) return false;
    if (isOdd(at) || at === last) {
      [older, newer] = [nodeHash(other, older), nodeHash(other, newer)];
      while (!isOdd(at) && at !== 0) [at, last] = [half(at), half(last)];
    } else newer = nodeHash(newer, other);
    [at, last] = [half(at), half(last)];
  }
  return last === 0 && older === firstRoot && newer === secondRoot;
}
