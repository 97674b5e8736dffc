import type { RemarkCommand, RemarkSaid } from '../contracts/remarks.ts';
import { canonicalJson, type Json } from '../ledger/canonical-json.ts';
import { digest, hexToBytes } from '../ledger/digest.ts';

export type RemarkContent = {
  readonly salt: string;
  readonly session: string;
  readonly seat: string;
  readonly about: string;
  readonly said: RemarkSaid;
};

/** The leaf that stands for a remark in the record: SHA-256 over the phone's salt and the canonical text. Phone and server compute it alike. */
export function remarkLeaf({ salt, session, seat, about, said }: RemarkContent): string {
  return digest('remark', hexToBytes(salt), canonicalJson({ session, seat, about, said } as unknown as Json));
}

export const aboutOf = (command: RemarkCommand): string =>
  command.kind === 'exit' ? 'exit' : `break/${command.break}`;

export const saidIn = (command: RemarkCommand): RemarkSaid =>
  command.kind === 'exit' ? command.answers : { fatigue: command.fatigue };
