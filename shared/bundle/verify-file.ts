import { bundleCheckNames, type NamedCheck, recordCheckNames } from '../ledger/check-names.ts';
import type { WebCrypto } from '../ledger/token-signature.ts';
import { type Check, checksOfFile } from '../ledger/verify.ts';
import { utf8Text } from './bytes.ts';
import { checksOfBundle } from './verify-bundle.ts';
import { documentIn, isZip } from './zip.ts';

export type FileChecks = {
  /** Of every check to come, in order. */
  readonly names: readonly NamedCheck[];
  /** The published document: the file itself, or study.json of a bundle; null where a bundle has none. */
  readonly document: Uint8Array | null;
  readonly checks: AsyncIterable<Check>;
};

async function* checksOfRecord(bytes: Uint8Array): AsyncGenerator<Check> {
  yield* checksOfFile(utf8Text(bytes));
}

/**
 * The checks of whatever file somebody brings, a bundle or the record alone. A browser and the command line run this.
 *
 * @param crypto `globalThis.crypto`, or null where there is none; only tokens need it
 */
export function checksOfAnyFile(bytes: Uint8Array, crypto: WebCrypto | null): FileChecks {
  return isZip(bytes)
    ? { names: bundleCheckNames, document: documentIn(bytes), checks: checksOfBundle(bytes, crypto) }
    : { names: recordCheckNames, document: bytes, checks: checksOfRecord(bytes) };
}

/** What all lines come to: 0 when every one passes, 1 when one fails, 2 when none fails and not every one can be checked. */
export function statusOf(checks: readonly Check[]): 0 | 1 | 2 {
  if (checks.some(({ outcome }) => outcome === 'fail')) return 1;
  return checks.every(({ outcome }) => outcome === 'pass') ? 0 : 2;
}
