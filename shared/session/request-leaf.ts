import { canonicalJson } from '../ledger/canonical-json.ts';
import { digest, hexToBytes } from '../ledger/digest.ts';

/** What a listener asked for: beside the record until closing. */
export type RequestContent = {
  readonly salt: string;
  readonly session: string;
  readonly seat: string;
  readonly trial: number;
  /** The place of the presentation in its trial, from 0. */
  readonly presentation: number;
  readonly label: string;
};

/** The leaf that stands for a request in the record: SHA-256 over the phone's salt and the request's canonical text. */
export function requestLeaf({ salt, session, seat, trial, presentation, label }: RequestContent): string {
  return digest('request', hexToBytes(salt), canonicalJson({ session, seat, trial, presentation, label }));
}
