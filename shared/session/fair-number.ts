import { concatBytes, hexToBytes, keyedDigest, utf8ToBytes } from '../ledger/digest.ts';

/**
 * A whole number from 0 to `below` - 1, each equally likely, from the seed and a label.
 *
 * HMAC-SHA-256(seed, label, counter) in counter mode gives bytes; those at or above the largest multiple of `below`
 * are passed over, so that no value is favoured.
 *
 * @param below 1 to 256
 * @throws RangeError outside that range
 */
export function fairNumber(seed: string, label: string, below: number): number {
  if (!Number.isInteger(below) || below < 1 || below > 256)
    throw new RangeError('below must be a whole number, 1 to 256');
  const key = hexToBytes(seed);
  const limit = 256 - (256 % below);
  for (let counter = 0; ; counter += 1) {
    const block = keyedDigest(
      key,
      concatBytes(utf8ToBytes(label), new Uint8Array([counter >>> 24, counter >>> 16, counter >>> 8, counter])),
    );
    for (const byte of block) if (byte < limit) return byte % below;
  }
}
