import { fileDigest } from '#shared/ledger/digest.ts';
import { type Check, checksOfFile } from '#shared/ledger/verify.ts';

/** What the worker says of a file: its digest, one check after the other, and that all have run. */
export type VerifyMessage = { digest: string } | { check: Check } | { done: true };

const say = (message: VerifyMessage) => self.postMessage(message);

function textOf(bytes: Uint8Array): string | null {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return null;
  }
}

// A worker of its own, so that the page stays usable while a long record is hashed.
self.onmessage = ({ data }: MessageEvent<ArrayBuffer>) => {
  const bytes = new Uint8Array(data);
  say({ digest: fileDigest(bytes) });
  for (const check of checksOfFile(textOf(bytes))) say({ check });
  say({ done: true });
};
