import argon2 from 'argon2';

// argon2id at the library's defaults takes some 0.1 s and 64 MiB; only a few run at a time, the others wait in line.
const atOnce = 2;
let running = 0;
const waiting: (() => void)[] = [];

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= atOnce) await new Promise<void>((resolve) => waiting.push(resolve));
  running += 1;
  try {
    return await work();
  } finally {
    running -= 1;
    waiting.shift()?.();
  }
}

export function hashPassword(password: string): Promise<string> {
  return inTurn(() => argon2.hash(password, { type: argon2.argon2id }));
}

export function verifyPassword(hash: string, password: string): Promise<boolean> {
  return inTurn(() => argon2.verify(hash, password));
}
