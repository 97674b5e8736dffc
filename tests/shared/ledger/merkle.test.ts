import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { hexToBytes } from '#shared/ledger/digest.ts';
import {
  consistencyProof,
  emptyRoot,
  inclusionProof,
  isConsistent,
  isIncluded,
  leafHash,
  nodeHash,
  treeRoot,
} from '#shared/ledger/merkle.ts';

const leavesOf = (count: number) => Array.from({ length: count }, (_, index) => leafHash(`leaf ${index}`));
const largest = 70;
const leaves = leavesOf(largest);
const roots = Array.from({ length: largest + 1 }, (_, size) => treeRoot(leaves.slice(0, size)));
const rootOf = (size: number) => roots[size] ?? '';
const leafAt = (index: number) => leaves[index] ?? '';

// The eight leaves and the roots over the first of them by which the tests of Certificate Transparency's own
// implementation check RFC 6962 (go/merkletree/merkle_tree_test.go); RFC 9162 hashes alike.
const knownLeaves = [
  '',
  '00',
  '10',
  '2021',
  '3031',
  '40414243',
  '5051525354555657',
  '606162636465666768696a6b6c6d6e6f',
].map((hex) => leafHash(hexToBytes(hex)));
const knownRoots = [
  'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855',
  '6e340b9cffb37a989ca544e6bb780a2c78901d3fb33738768511a30617afa01d',
  'fac54203e7cc696cf0dfcb42c92a1d9dbaf70ad9e621f4bd8d98662f00e3c125',
  'aeb6bcfe274b70a14fb067a5e5578264db0fa9b51af5e0ba159158f329e06e77',
  'd37ee418976dd95753c1c73862b9398fa2a2cf9b4ff0fdfe8b30cd95209614b7',
  '4e3bbb1f7b478dcfe71fb631631519a3bca12c9aefca1612bfce4c13a86264d4',
  '76e67dadbcdf1e10e1b74ddc608abd2f98dfb16fbce75277b5232a127f2087ef',
  'ddb89be403809e325750d3d263cd78929c2942b7942a34b77e122c9594a74c8c',
  '5dc9da79a70659a9ad559cb701ded9a2ab9d823aad2f4960cfe370eff4604328',
];

describe('a Merkle tree', () => {
  it.each(knownRoots.map((root, size) => [size, root] as const))(
    'has the known root over %i known leaves [E1]',
    (size, root) => {
      expect(treeRoot(knownLeaves.slice(0, size))).toBe(root);
      if (size === 0) expect(emptyRoot).toBe(root);
    },
  );

  // RFC 9162, section 2.1.5: the tree of seven leaves with its named nodes, and the proofs that the RFC writes out.
  it('gives the proofs that the RFC writes out for seven leaves [E1]', () => {
    const [a, b, c, d, e, f, j] = leavesOf(7) as [string, string, string, string, string, string, string];
    const [g, h, i] = [nodeHash(a, b), nodeHash(c, d), nodeHash(e, f)];
    const [k, l] = [nodeHash(g, h), nodeHash(i, j)];
    const seven = [a, b, c, d, e, f, j];
    expect(treeRoot(seven)).toBe(nodeHash(k, l));
    expect(inclusionProof(seven, 0)).toEqual([b, h, l]);
    expect(inclusionProof(seven, 3)).toEqual([c, g, l]);
    expect(inclusionProof(seven, 4)).toEqual([f, j, k]);
    expect(inclusionProof(seven, 6)).toEqual([i, k]);
    expect(consistencyProof(seven, 3)).toEqual([c, d, g, l]);
    expect(consistencyProof(seven, 4)).toEqual([l]);
    expect(consistencyProof(seven, 6)).toEqual([i, j, k]);
  });

  it('proves every leaf of every size [E1]', () => {
    for (let size = 1; size <= largest; size += 1)
      for (let index = 0; index < size; index += 1) {
        const proof = inclusionProof(leaves.slice(0, size), index);
        expect(proof.length).toBeLessThanOrEqual(Math.ceil(Math.log2(size)));
        const claim = { leaf: leafAt(index), index, size, root: rootOf(size), proof };
        expect(isIncluded(claim), `${index} of ${size}`).toBe(true);
      }
  }, 300_000);

  it('proves that every size has grown from every smaller one [E1]', () => {
    for (let second = 1; second <= largest; second += 1)
      for (let first = 1; first <= second; first += 1) {
        const proof = consistencyProof(leaves.slice(0, second), first);
        const claim = { first, second, firstRoot: rootOf(first), secondRoot: rootOf(second), proof };
        expect(isConsistent(claim), `${first} to ${second}`).toBe(true);
      }
  }, 300_000);

  const sizes = fc.integer({ min: 1, max: largest }).chain((second) =>
    fc.record({
      second: fc.constant(second),
      first: fc.integer({ min: 1, max: second }),
      index: fc.integer({ min: 0, max: second - 1 }),
      at: fc.nat(),
    }),
  );
  const flipped = (hash: string) => (hash.startsWith('0') ? '1' : '0') + hash.slice(1);
  const bent = (proof: readonly string[], at: number) =>
    proof.map((hash, place) => (place === at % proof.length ? flipped(hash) : hash));

  it('takes no bent, shortened, lengthened or misplaced proof that a leaf is in it [E2]', () => {
    fc.assert(
      fc.property(sizes, ({ second: size, index, at }) => {
        const proof = inclusionProof(leaves.slice(0, size), index);
        const claim = { leaf: leafAt(index), index, size, root: rootOf(size), proof };
        const bad = [
          { ...claim, leaf: leafHash('another') },
          { ...claim, root: flipped(claim.root) },
          { ...claim, proof: [...proof, claim.leaf] },
          { ...claim, index: size },
          { ...claim, index: -1 },
          { ...claim, index: index + 0.5 },
          { ...claim, size: 0 },
          { ...claim, leaf: 'no hash' },
          ...(size > 1
            ? [
                { ...claim, proof: bent(proof, at) },
                { ...claim, proof: proof.slice(1) },
                { ...claim, proof: [...proof].reverse().map((hash) => hash.toUpperCase()) },
                { ...claim, index: (index + 1) % size },
              ]
            : []),
        ];
        for (const one of bad) expect(isIncluded(one)).toBe(false);
      }),
    );
  });

  it('takes no bent, shortened, lengthened or misplaced proof that it has grown [E2]', () => {
    fc.assert(
      fc.property(sizes, ({ first, second, at }) => {
        const proof = consistencyProof(leaves.slice(0, second), first);
        const claim = { first, second, firstRoot: rootOf(first), secondRoot: rootOf(second), proof };
        const bad = [
          { ...claim, firstRoot: flipped(claim.firstRoot) },
          { ...claim, secondRoot: flipped(claim.secondRoot) },
          { ...claim, proof: [...proof, claim.firstRoot] },
          { ...claim, first: 0 },
          { ...claim, first: second + 1 },
          { ...claim, second: Number.NaN },
          ...(first < second
            ? [
                { ...claim, proof: bent(proof, at) },
                { ...claim, proof: proof.slice(1) },
                { ...claim, proof: proof.slice(0, -1) },
                { ...claim, proof: [] },
                { ...claim, first: second },
              ]
            : []),
        ];
        for (const one of bad) expect(isConsistent(one)).toBe(false);
      }),
    );
  });

  it('shows a leaf that was changed, dropped or moved: no proof leads from the older root [E2]', () => {
    fc.assert(
      fc.property(sizes, ({ first, second, index }) => {
        fc.pre(index < first);
        const changed = leaves.slice(0, second).map((leaf, place) => (place === index ? leafHash('changed') : leaf));
        const dropped = leaves.slice(0, second + 1).filter((_, place) => place !== index);
        for (const other of [changed, dropped]) {
          fc.pre(other.length >= first && treeRoot(other.slice(0, first)) !== rootOf(first));
          const claim = { first, second: other.length, firstRoot: rootOf(first), secondRoot: treeRoot(other) };
          expect(isConsistent({ ...claim, proof: consistencyProof(other, first) })).toBe(false);
        }
      }),
    );
  });

  it('refuses to prove what cannot be [E2]', () => {
    for (const index of [-1, 3, 0.5, Number.NaN]) expect(() => inclusionProof(leavesOf(3), index)).toThrow(RangeError);
    for (const first of [0, 4, 1.5]) expect(() => consistencyProof(leavesOf(3), first)).toThrow(RangeError);
    expect(() => inclusionProof([], 0)).toThrow(RangeError);
  });
});
