import { createCipheriv, createDecipheriv, hkdfSync } from 'node:crypto';

const algorithm = 'aes-256-gcm';
const ivBytes = 12;
const tagBytes = 16;

// The secret of the environment is of any length; the cipher wants 32 bytes (HKDF, RFC 5869).
const cipherKey = (secret: string) => Buffer.from(hkdfSync('sha256', secret, '', 'fairlead/signing-key/1', 32));

/**
 * Encrypts the private part of a signing key for the database (AES-256-GCM, NIST SP 800-38D).
 *
 * @param secret from the environment, never stored beside it
 * @param owner  what the key belongs to: what is encrypted for one key cannot be put in another's place
 * @param iv     12 random bytes, never used twice
 */
export function encryptPrivatePart(secret: string, owner: string, iv: Buffer, privatePart: Buffer): string {
  const cipher = createCipheriv(algorithm, cipherKey(secret), iv);
  cipher.setAAD(Buffer.from(owner));
  const hidden = Buffer.concat([cipher.update(privatePart), cipher.final()]);
  return `1.${Buffer.concat([iv, cipher.getAuthTag(), hidden]).toString('base64')}`;
}

/** @throws Error where the secret is another one, or the row was altered */
export function decryptPrivatePart(secret: string, owner: string, stored: string): Buffer {
  const [version, text = ''] = stored.split('.');
  if (version !== '1') throw new Error('the private part was stored by another version of this program');
  const bytes = Buffer.from(text, 'base64');
  const decipher = createDecipheriv(algorithm, cipherKey(secret), bytes.subarray(0, ivBytes), {
    authTagLength: tagBytes,
  });
  decipher.setAAD(Buffer.from(owner));
  decipher.setAuthTag(bytes.subarray(ivBytes, ivBytes + tagBytes));
  return Buffer.concat([decipher.update(bytes.subarray(ivBytes + tagBytes)), decipher.final()]);
}
