import { generateKeyPairSync, sign } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { type Entry, nextEntry } from '#shared/ledger/chain.ts';
import {
  fingerprintOf,
  type HeadSignature,
  headFormat,
  type PublicKey,
  publicKeyPem,
  signatureFault,
  statementBytes,
} from '#shared/ledger/signed-head.ts';

const study = '3f0f7a52-5b0e-4b0c-9f6e-0c9b8f0c2a11';
const other = '3f0f7a52-5b0e-4b0c-9f6e-0c9b8f0c2a12';
const at = '2026-12-05T18:00:00.000Z';
const entryOf = (kind: string, of = study): Entry =>
  nextEntry(null, { study: of, at, kind, version: 1, payload: { a: 1 }, nonce: '0'.repeat(32) });
const sealing = entryOf('protocol-sealed');

function newKey(createdAt = at, retiredAt: string | null = null) {
  const { privateKey, publicKey } = generateKeyPairSync('ed25519');
  const raw = publicKey.export({ format: 'der', type: 'spki' }).subarray(-32).toString('hex');
  const known: PublicKey = { fingerprint: fingerprintOf(raw), publicKey: raw, createdAt, retiredAt };
  return { privateKey, publicKey, known };
}
const key = newKey();

function signed(change: Partial<HeadSignature> = {}, by = key): HeadSignature {
  const statement = {
    study,
    sequence: 1,
    head: sealing.digest,
    moment: 'sealing' as const,
    at,
    key: by.known.fingerprint,
    ...change,
  };
  return { ...statement, signature: sign(null, statementBytes(statement), by.privateKey).toString('hex') };
}

describe('a signed head', () => {
  it('holds for its entry and its key [K2]', () => {
    expect(signatureFault(signed(), sealing, key.known)).toBeNull();
  });

  it('is written as documented, with the public key as openssl writes it [K2]', () => {
    const { key: fingerprint } = signed();
    expect(Buffer.from(statementBytes(signed())).toString()).toBe(
      `{"at":"${at}","format":"${headFormat}","head":"${sealing.digest}","key":"${fingerprint}","moment":"sealing","sequence":1,"study":"${study}"}`,
    );
    expect(publicKeyPem(key.known.publicKey)).toBe(key.publicKey.export({ format: 'pem', type: 'spki' }));
  });

  const flipped = (hex: string) => (hex.startsWith('0') ? '1' : '0') + hex.slice(1);
  const again = newKey();
  const late = '2026-12-05T18:00:01.000Z';
  it.each<[string, HeadSignature, Entry | undefined, PublicKey | undefined, string]>([
    ['a flipped bit', { ...signed(), signature: flipped(signed().signature) }, sealing, key.known, 'does not match'],
    ['no signature', { ...signed(), signature: '' }, sealing, key.known, 'does not match'],
    ['what is no hexadecimal', { ...signed(), signature: 'zz'.repeat(64) }, sealing, key.known, 'does not match'],
    ['another time', { ...signed(), at: late }, sealing, key.known, 'does not match'],
    ['another study', { ...signed(), study: other }, sealing, key.known, 'another entry'],
    ['another study’s entry', signed(), entryOf('protocol-sealed', other), key.known, 'another entry'],
    ['another place', { ...signed(), sequence: 2 }, sealing, key.known, 'another entry'],
    ['an altered entry', signed(), { ...sealing, digest: 'f'.repeat(64) }, key.known, 'is not the entry'],
    ['another moment', signed({ moment: 'closing' }), sealing, key.known, 'the entry does not'],
    ['an entry of no moment', signed({ head: entryOf('x').digest }), entryOf('x'), key.known, 'the entry does not'],
    ['no entry', signed(), undefined, key.known, 'not on the record'],
    ['no key', signed(), sealing, undefined, 'no key'],
    ['another key', signed(), sealing, again.known, 'fingerprint'],
    [
      'another key under this name',
      signed({ key: key.known.fingerprint }, again),
      sealing,
      key.known,
      'does not match',
    ],
    [
      'a key swapped below its name',
      signed(),
      sealing,
      { ...again.known, fingerprint: key.known.fingerprint },
      'fingerprint',
    ],
    ['a key not made yet', signed(), sealing, { ...key.known, createdAt: late }, 'not in use'],
    ['a key retired before', signed({ at: late }), sealing, { ...key.known, retiredAt: at }, 'not in use'],
  ])('fails with %s [K2]', (_what, signature, entry, known, why) => {
    expect(signatureFault(signature, entry, known)).toContain(why);
  });

  it('holds under a key that was retired afterwards [K5]', () => {
    expect(signatureFault(signed(), sealing, { ...key.known, retiredAt: late })).toBeNull();
  });

  it('verifies the test vectors of RFC 8032, and refuses a signature whose S is not reduced [K2]', async () => {
    const { hashes, verify } = await import('@noble/ed25519');
    expect(hashes.sha512).toBeTypeOf('function');
    // RFC 8032, 7.1, test 2.
    const publicKey = '3d4017c3e843895a92b70aa74d1b7ebc9c982ccf2ec4968cc0cd55f12af4660c';
    const signature =
      '92a009a9f0d4cab8720e820b5f642540a2b27b5416503f8fb3762223ebdb69da085ac1e43e15996e458f3613d0f11d8c387b2eaeb4302aeeb00d291612bb0c00';
    const bytes = (hex: string) => Uint8Array.from(Buffer.from(hex, 'hex'));
    expect(verify(bytes(signature), bytes('72'), bytes(publicKey), { zip215: false })).toBe(true);
    const order = 2n ** 252n + 27742317777372353535851937790883648493n;
    const s = BigInt(`0x${Buffer.from(signature.slice(64), 'hex').reverse().toString('hex')}`) + order;
    const larger = Buffer.from(s.toString(16).padStart(64, '0'), 'hex').reverse().toString('hex');
    const refused = () =>
      verify(bytes(signature.slice(0, 64) + larger), bytes('72'), bytes(publicKey), { zip215: false });
    let outcome = false;
    try {
      outcome = refused();
    } catch {
      outcome = false;
    }
    expect(outcome).toBe(false);
  });
});
