import { createHash } from 'node:crypto';
import type { Random } from '../deps.ts';

/** The secret of a link that opens something, 256 bits, and what is stored of it. Hex: no mail program cuts it short. */
export function newLinkToken(random: Random): { token: string; digest: string } {
  const token = random.bytes('link-token', 32).toString('hex');
  return { token, digest: linkTokenDigest(token) };
}

export const linkTokenDigest = (token: string) => createHash('sha256').update(token).digest('hex');
