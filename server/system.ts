import { randomBytes, randomUUID } from 'node:crypto';
import type { Clock, Random } from './deps.ts';

/** Randomness from the operating system. */
export const systemRandom: Random = {
  bytes: (_purpose, count) => randomBytes(count),
  id: () => randomUUID(),
};

const longestTimerMs = 2 ** 31 - 1;

/** The machine's clock. */
export const systemClock: Clock = {
  now: () => Date.now(),
  at: (atMs, callback) => {
    const timer = setTimeout(callback, Math.min(longestTimerMs, Math.max(0, atMs - Date.now())));
    return () => clearTimeout(timer);
  },
};
