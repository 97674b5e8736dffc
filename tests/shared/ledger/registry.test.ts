import { generateKeyPairSync, sign } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import {
  type InclusionFile,
  inclusionFormat,
  type RegistryHead,
  registryHeadFormat,
  registryLeafFormat,
} from '#shared/contracts/registry.ts';
import { consistencyProof, inclusionProof, treeRoot } from '#shared/ledger/merkle.ts';
import {
  growthFault,
  inclusionFault,
  leafText,
  readKeptFile,
  registryHeadBytes,
  registryHeadFault,
  registryLeafHash,
} from '#shared/ledger/registry.ts';
import { fingerprintOf, type PublicKey } from '#shared/ledger/signed-head.ts';

const organisation = '11111111-2222-4333-8444-555555555555';
const at = '2026-12-05T18:00:00.000Z';
// The three entries of docs/spec/registry.md, with the hashes that stand there.
const leaves = [
  { study: '3f0f7a52-5b0e-4b0c-9f6e-0c9b8f0c2a11', version: 1, digest: '1'.repeat(64), sealedAt: at },
  { study: '3f0f7a52-5b0e-4b0c-9f6e-0c9b8f0c2a11', version: 2, digest: '2'.repeat(64), sealedAt: at },
  { study: '7c9e6679-7425-40de-944b-e07fc1f90ae7', version: 1, digest: '3'.repeat(64), sealedAt: at },
];
const hashes = leaves.map(registryLeafHash);

function newKey(createdAt = at, retiredAt: string | null = null) {
  const { privateKey, publicKey } = generateKeyPairSync('ed25519');
  const raw = publicKey.export({ format: 'der', type: 'spki' }).subarray(-32).toString('hex');
  const known: PublicKey = { fingerprint: fingerprintOf(raw), publicKey: raw, createdAt, retiredAt };
  return { privateKey, known };
}
const key = newKey();

function headOf(size: number, change: Partial<RegistryHead> = {}, by = key): RegistryHead {
  const root = treeRoot(hashes.slice(0, size));
  const statement = { organisation, size, root, at, key: by.known.fingerprint, ...change };
  const signature = sign(null, registryHeadBytes(statement), by.privateKey).toString('hex');
  return { format: registryHeadFormat, ...statement, publicKey: by.known.publicKey, signature };
}

const entry = (index: number, size = 3): InclusionFile => ({
  format: inclusionFormat,
  organisation,
  leaf: { format: registryLeafFormat, ...(leaves[index] ?? leaves[0]) } as InclusionFile['leaf'],
  index,
  hashes: inclusionProof(hashes.slice(0, size), index),
  head: headOf(size),
});

describe('a registry', () => {
  it('hashes the entries of the document to the hashes of the document [E4]', () => {
    expect(leafText(leaves[0] as (typeof leaves)[0])).toBe(
      `{"digest":"${'1'.repeat(64)}","format":"fairlead-registry-leaf/1","sealedAt":"${at}","study":"3f0f7a52-5b0e-4b0c-9f6e-0c9b8f0c2a11","version":1}`,
    );
    expect(hashes).toEqual(documented.leaves);
    expect(treeRoot(hashes)).toBe(documented.root);
    expect(consistencyProof(hashes, 2)).toEqual([documented.leaves[2]]);
  });

  it('signs a statement that is written as documented [E5]', () => {
    const head = headOf(3);
    expect(Buffer.from(registryHeadBytes(head)).toString()).toBe(
      `{"at":"${at}","format":"fairlead-registry-head/1","key":"${head.key}","organisation":"${organisation}","root":"${head.root}","size":3}`,
    );
    expect(registryHeadFault(head, [key.known])).toBeNull();
  });

  const retired = newKey(at, '2026-12-05T17:00:00.000Z');
  it.each<[string, RegistryHead, readonly PublicKey[], string]>([
    ['another root', { ...headOf(3), root: '0'.repeat(64) }, [key.known], 'signature does not match'],
    ['another size', { ...headOf(3), size: 2 }, [key.known], 'signature does not match'],
    ['another organisation', { ...headOf(3), organisation: leaves[0]?.study ?? '' }, [key.known], 'signature'],
    ['a key in its own name', { ...headOf(3), publicKey: newKey().known.publicKey }, [key.known], 'fingerprint'],
    ['a stranger’s key', headOf(3, {}, newKey()), [key.known], 'does not name as its own'],
    ['a key that was retired by then', headOf(3, {}, retired), [retired.known], 'not in use'],
  ])('does not trust a head with %s [E5]', (_, head, keys, fault) => {
    expect(registryHeadFault(head, keys)).toContain(fault);
  });

  it('has grown where the newer head begins with the older log, and only there [E6]', () => {
    for (const [first, second] of [
      [1, 1],
      [1, 2],
      [1, 3],
      [2, 3],
      [3, 3],
    ] as const) {
      const proof = { hashes: consistencyProof(hashes.slice(0, second), first) };
      expect(growthFault(headOf(first), headOf(second), proof)).toBeNull();
    }
    expect(growthFault(headOf(3), headOf(2), null)).toContain('entries are gone');
    expect(growthFault(headOf(2), headOf(3), null)).toContain('an entry was altered');
    expect(growthFault(headOf(2, { root: '0'.repeat(64) }), headOf(2), null)).toContain('an entry was altered');
    const other = { ...headOf(2), organisation: leaves[0]?.study ?? '' };
    expect(growthFault(other, headOf(3), { hashes: consistencyProof(hashes, 2) })).toContain('two organisations');
  });

  it('shows that an entry is in the log, and sees any other entry, place or head [E7]', () => {
    for (const index of [0, 1, 2]) expect(inclusionFault(entry(index))).toBeNull();
    const [good, other] = [entry(1), entry(2)];
    const bad: InclusionFile[] = [
      { ...good, leaf: { ...good.leaf, digest: '4'.repeat(64) } },
      { ...good, leaf: { ...good.leaf, version: 3 } },
      { ...good, index: 2 },
      { ...good, hashes: other.hashes },
      { ...good, head: headOf(2) },
    ];
    for (const file of bad) expect(inclusionFault(file)).toContain('no proof leads');
    expect(inclusionFault({ ...good, organisation: leaves[0]?.study ?? '' })).toContain('another organisation');
  });

  it('reads the files that it gives out, and no others [E7]', () => {
    expect(readKeptFile(JSON.stringify(headOf(3)))).toEqual({ kind: 'head', head: headOf(3) });
    expect(readKeptFile(JSON.stringify(entry(1)))).toEqual({ kind: 'entry', ...entry(1) });
    for (const text of [
      '',
      'null',
      '[]',
      JSON.stringify({ ...headOf(3), more: 1 }),
      JSON.stringify({ ...entry(1), format: 'x' }),
    ])
      expect(readKeptFile(text)).toBeNull();
  });
});

const documented = {
  leaves: [
    'd7b6c28f32abc457876af23cfe448cca3d5dca75f2fc6549a23609c5c2f32a5e',
    '1272efe23c450060456821a4a2c4bfe47e7c278ac653a2948ea6342fe559032c',
    '693338cd064a553ce7c1e54ebe5ac9ef59592619dc75b8b512344d69f67a0a50',
  ],
  root: '5ab4920b56d790a12e3af8bc14f93f79c4f273be9a92dc22892cab173637e360',
};
