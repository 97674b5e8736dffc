import type { Entry } from './chain.ts';

/** A version of a study's protocol, as its record says that it was sealed. */
export type SealedVersion = {
  /** The entry that seals it. */
  readonly sequence: number;
  readonly at: string;
  readonly version: number;
  readonly digest: string;
  readonly by: string;
  /** Why the version before was amended; null for the first. */
  readonly reason: string | null;
};

/** Every sealed version of the protocol, in the order of the record. The last is in force. */
export function sealedVersions(entries: readonly Entry[]): SealedVersion[] {
  return entries.flatMap(({ kind, sequence, at, payload }) => {
    if (kind !== 'protocol-sealed' && kind !== 'protocol-amended') return [];
    const isFirst = kind === 'protocol-sealed';
    return {
      sequence,
      at,
      version: Number(payload.protocolVersion),
      digest: String(payload.digest),
      by: String(isFirst ? payload.sealedBy : payload.amendedBy),
      reason: isFirst ? null : String(payload.reason),
    };
  });
}
