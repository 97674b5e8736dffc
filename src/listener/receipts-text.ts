import type { ListenerView } from '#shared/contracts/listener-live.ts';
import type { OwnAnswer } from './answers.ts';
import type { KeptReceipt } from './seat-memory.ts';

export type Kept = { readonly receipts: readonly KeptReceipt[]; readonly disputed: readonly OwnAnswer[] };

/** The receipts as text to keep, and after them what this phone sent where the server holds something else. */
export function receiptsText({ title, session, seat }: ListenerView, { receipts, disputed }: Kept): string {
  const head = `${title}, session ${session}, seat ${seat}`;
  const lines = receipts.map(
    ({ trial, leaf, sequence, digest }) => `trial ${trial}\n  leaf ${leaf}\n  entry ${sequence} ${digest}`,
  );
  const sent = disputed.map(
    ({ trial, choice, confidence, revision, salt }) =>
      `trial ${trial}, sent by this phone and not held: ${choice}${confidence === null ? '' : `, ${confidence}`}\n  revision ${revision} salt ${salt}`,
  );
  return [head, ...lines, ...sent].join('\n');
}
