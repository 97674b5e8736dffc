import { checksOfBundle } from '#shared/bundle/verify-bundle.ts';
import { documentIn, isZip } from '#shared/bundle/zip.ts';
import { bundleCheckNames, recordCheckNames } from '#shared/ledger/check-names.ts';
import { fileDigest } from '#shared/ledger/digest.ts';
import { type Check, checksOfFile } from '#shared/ledger/verify.ts';

/** What the worker says of a file: digests and the checks to come, one check after the other, and that all have run. */
export type VerifyMessage =
  | {
      /** Of the document: the file itself, or study.json in a bundle; null where a bundle has none. */
      readonly digest: string | null;
      readonly names: readonly { readonly id: Check['id']; readonly name: string }[];
    }
  | { readonly check: Check }
  | { readonly done: true };

const say = (message: VerifyMessage) => self.postMessage(message);

function textOf(bytes: Uint8Array): string | null {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return null;
  }
}

/** Browsers withhold their cryptography where an address has neither TLS nor is this machine's own. */
const cryptography = () => (globalThis.crypto?.subtle === undefined ? null : globalThis.crypto);

// A worker of its own, so that the page stays usable while a long record is hashed.
self.onmessage = async ({ data }: MessageEvent<ArrayBuffer>) => {
  const bytes = new Uint8Array(data);
  if (isZip(bytes)) {
    const document = documentIn(bytes);
    say({ digest: document === null ? null : fileDigest(document), names: bundleCheckNames });
    for await (const check of checksOfBundle(bytes, cryptography())) say({ check });
  } else {
    say({ digest: fileDigest(bytes), names: recordCheckNames });
    for (const check of checksOfFile(textOf(bytes))) say({ check });
  }
  say({ done: true });
};
