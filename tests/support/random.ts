import { createHash } from 'node:crypto';
import type { Random, RandomPurpose } from '../../server/deps.ts';

const block = (text: string) => createHash('sha256').update(text).digest();

/** Randomness that a test can repeat: each purpose has a stream of its own, seeded by name unless a seed is given for it. */
export function repeatableRandom(seeds: Partial<Record<RandomPurpose, string>> = {}): Random {
  const used = new Map<string, number>();
  const take = (purpose: RandomPurpose, count: number): Buffer => {
    const chunks: Buffer[] = [];
    for (let have = 0; have < count; have += 32) {
      const counter = used.get(purpose) ?? 0;
      used.set(purpose, counter + 1);
      chunks.push(block(`${seeds[purpose] ?? 'same'}/${purpose}/${counter}`));
    }
    return Buffer.concat(chunks).subarray(0, count);
  };
  return {
    bytes: take,
    id: () => {
      const bytes = Buffer.from(take('id', 16));
      bytes.writeUInt8((bytes.readUInt8(6) & 0x0f) | 0x40, 6);
      bytes.writeUInt8((bytes.readUInt8(8) & 0x3f) | 0x80, 8);
      const hex = bytes.toString('hex');
      return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-${hex.slice(12, 16)}-${hex.slice(16, 20)}-${hex.slice(20)}`;
    },
  };
}
