import { createPrivateKey, createPublicKey, type KeyObject, sign } from 'node:crypto';
import { IsNull } from 'typeorm';
import { fingerprintOf, type PublicKey } from '#shared/ledger/signed-head.ts';
import type { Tx } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { Organisation } from '../features/organisations/organisation.entity.ts';
import { decryptPrivatePart, encryptPrivatePart } from './private-part.ts';
import { SigningKey } from './signing-key.entity.ts';

type KeyDeps = Pick<Deps, 'config' | 'random' | 'clock'>;

// PrivateKeyInfo of an Ed25519 key: what stands before its 32 bytes (RFC 8410, section 7).
const pkcs8Start = Buffer.from('302e020100300506032b657004220420', 'hex');

function privateKeyOf(seed: Buffer): KeyObject {
  return createPrivateKey({ key: Buffer.concat([pkcs8Start, seed]), format: 'der', type: 'pkcs8' });
}

function publicKeyOf(privateKey: KeyObject): string {
  return createPublicKey(privateKey).export({ format: 'der', type: 'spki' }).subarray(-32).toString('hex');
}

const ownerOf = ({ fingerprint, organisationId }: Pick<SigningKey, 'fingerprint' | 'organisationId'>) =>
  `${organisationId} ${fingerprint}`;

/** The key in use, kept from being retired until the transaction ends; null while there is none. */
function keyInUse(tx: Tx, organisationId: string): Promise<SigningKey | null> {
  return tx.findOne(SigningKey, {
    where: { organisationId, retiredAt: IsNull() },
    lock: { mode: 'pessimistic_read' },
  });
}

/** One organisation’s keys are made and retired one after the other, and its sealings entered in its registry. */
export async function lockOrganisation(tx: Tx, id: string): Promise<void> {
  await tx.findOneOrFail(Organisation, { where: { id }, lock: { mode: 'pessimistic_write' } });
}

async function makeKey(
  tx: Tx,
  { config, random, clock }: KeyDeps,
  organisationId: string,
  createdBy: string | null,
): Promise<SigningKey> {
  const seed = random.bytes('signing-key', 32);
  const publicKey = publicKeyOf(privateKeyOf(seed));
  const fingerprint = fingerprintOf(publicKey);
  const iv = random.bytes('signing-key-iv', 12);
  const key: SigningKey = {
    fingerprint,
    organisationId,
    publicKey,
    privatePart: encryptPrivatePart(config.signingSecret, ownerOf({ fingerprint, organisationId }), iv, seed),
    createdAt: new Date(clock.now()),
    createdBy,
    retiredAt: null,
    retiredReason: null,
  };
  await tx.insert(SigningKey, key);
  return key;
}

/** The key by which an organisation signs now; made when it signs for the first time. */
export async function currentKey(tx: Tx, deps: KeyDeps, organisationId: string): Promise<SigningKey> {
  const known = await keyInUse(tx, organisationId);
  if (known !== null) return known;
  await lockOrganisation(tx, organisationId);
  return (await keyInUse(tx, organisationId)) ?? makeKey(tx, deps, organisationId, null);
}

/**
 * Retires the key in use and makes the next one. What the old one signed stays verifiable.
 *
 * @param retire the fingerprint of the key that is meant, null for none
 * @returns null, and changes nothing, where another key is in use
 */
export async function rotateKey(
  tx: Tx,
  deps: KeyDeps,
  organisationId: string,
  { by, reason, retire }: { by: string | null; reason: string; retire: string | null },
): Promise<SigningKey | null> {
  await lockOrganisation(tx, organisationId);
  const known = await tx.findOne(SigningKey, {
    where: { organisationId, retiredAt: IsNull() },
    lock: { mode: 'pessimistic_write' },
  });
  if ((known?.fingerprint ?? null) !== retire) return null;
  const now = new Date(deps.clock.now());
  await tx.update(SigningKey, { organisationId, retiredAt: IsNull() }, { retiredAt: now, retiredReason: reason });
  return makeKey(tx, deps, organisationId, by);
}

/** Signs with a key (Ed25519, RFC 8032); 128 hexadecimal digits. @throws Error when its private part cannot be opened */
export function signWith({ config }: Pick<Deps, 'config'>, key: SigningKey, message: Uint8Array): string {
  const seed = decryptPrivatePart(config.signingSecret, ownerOf(key), key.privatePart);
  return sign(null, message, privateKeyOf(seed)).toString('hex');
}

/** Every key of an organisation, the newest first. */
export function keysOf(tx: Tx, organisationId: string): Promise<SigningKey[]> {
  return tx.find(SigningKey, { where: { organisationId }, order: { createdAt: 'DESC', retiredAt: 'ASC' } });
}

export function publicKeyView({ fingerprint, publicKey, createdAt, retiredAt }: SigningKey): PublicKey {
  return {
    fingerprint,
    publicKey,
    createdAt: createdAt.toISOString(),
    retiredAt: retiredAt?.toISOString() ?? null,
  };
}

/** Keys in use whose private part the secret of the environment does not open. */
async function unopenableKeys(tx: Tx, { config }: Pick<Deps, 'config'>): Promise<SigningKey[]> {
  const inUse = await tx.findBy(SigningKey, { retiredAt: IsNull() });
  return inUse.filter((key) => {
    try {
      decryptPrivatePart(config.signingSecret, ownerOf(key), key.privatePart);
      return false;
    } catch {
      return true;
    }
  });
}

const formatKeys = (count: number) => (count === 1 ? 'the signing key of one organisation' : `${count} signing keys`);

/**
 * Sees to it, before the server opens, that every key in use can sign: no sealing and no session must fail on it later.
 *
 * @param isLost the secret is gone for good: keys that it does not open are replaced, and the list of keys says why
 * @returns how many were replaced
 * @throws Error in words for whoever starts the server
 */
export async function requireOpenableKeys(tx: Tx, deps: KeyDeps, isLost: boolean): Promise<number> {
  const closed = await unopenableKeys(tx, deps);
  if (closed.length > 0 && !isLost)
    throw new Error(
      `SIGNING_SECRET does not open ${formatKeys(closed.length)}. Set the secret that was set before. If it is lost, start once with SIGNING_SECRET_LOST=on: such keys are replaced, and what they signed still verifies.`,
    );
  const reason = 'The secret that opens its private part was lost.';
  for (const { organisationId, fingerprint } of closed)
    await rotateKey(tx, deps, organisationId, { by: null, reason, retire: fingerprint });
  return closed.length;
}
