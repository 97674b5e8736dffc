import { utf8Text } from '#shared/bundle/bytes.ts';
import { checksOfAnyFile } from '#shared/bundle/verify-file.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import type { NamedCheck } from '#shared/ledger/check-names.ts';
import { fileDigest } from '#shared/ledger/digest.ts';
import { type FoundReceipt, findReceipts, readReceipts } from '#shared/ledger/receipts.ts';
import type { Check } from '#shared/ledger/verify.ts';

/** A file to check; then, as often as one likes, a text with receipts to look up in its record. */
export type VerifyRequest = { readonly file: ArrayBuffer } | { readonly receipts: string };

export type ReceiptsOutcome = { readonly found: readonly FoundReceipt[]; readonly notHeld: number };

/** What the worker says: digests and the checks to come, one check after the other, that all have run; and of receipts. */
export type VerifyMessage =
  | {
      /** Of the document: the file itself, or study.json in a bundle; null where a bundle has none. */
      readonly digest: string | null;
      readonly names: readonly NamedCheck[];
    }
  | { readonly check: Check }
  | { readonly done: true }
  | { readonly receipts: ReceiptsOutcome };

const say = (message: VerifyMessage) => self.postMessage(message);

/** Browsers withhold their cryptography where an address has neither TLS nor is this machine's own. */
const cryptography = () => (globalThis.crypto?.subtle === undefined ? null : globalThis.crypto);

let document: Uint8Array | null = null;
let entries: readonly Entry[] | null = null;

async function check(bytes: Uint8Array): Promise<void> {
  const file = checksOfAnyFile(bytes, cryptography());
  document = file.document;
  entries = null;
  say({ digest: document === null ? null : fileDigest(document), names: file.names });
  for await (const check of file.checks) say({ check });
  say({ done: true });
}

/** The page asks only of a record that passed its check, so that it has the shape of one. */
function lookUp(text: string): void {
  entries ??= (JSON.parse(utf8Text(document ?? new Uint8Array()) ?? '') as { record: readonly Entry[] }).record;
  const read = readReceipts(text);
  say({ receipts: { found: findReceipts(read, entries), notHeld: read.notHeld } });
}

// A worker of its own, so that the page stays usable while a long record is hashed.
self.onmessage = async ({ data }: MessageEvent<VerifyRequest>) => {
  if ('file' in data) await check(new Uint8Array(data.file));
  else lookUp(data.receipts);
};
