import type { ListenerView } from '#shared/contracts/listener-live.ts';
import type { KeptReceipt } from './seat-memory.ts';

/** The receipts as text to keep. */
export function receiptsText({ title, session, seat }: ListenerView, receipts: readonly KeptReceipt[]): string {
  const head = `${title}, session ${session}, seat ${seat}`;
  const lines = receipts.map(
    ({ trial, leaf, sequence, digest }) => `trial ${trial}\n  leaf ${leaf}\n  entry ${sequence} ${digest}`,
  );
  return [head, ...lines].join('\n');
}

function Check({ isOwn }: Pick<KeptReceipt, 'isOwn'>) {
  if (isOwn === null) return null;
  return isOwn ? (
    <p className="font-bold text-jacket">The leaf is the one this phone computed.</p>
  ) : (
    <p className="font-bold text-amber">The leaf is not what this phone sent. Tell the proctor.</p>
  );
}

export function ReceiptList({ receipts }: { receipts: readonly KeptReceipt[] }) {
  return (
    <ol className="flex flex-col gap-4">
      {receipts.map(({ trial, leaf, sequence, digest, isOwn }) => (
        <li key={trial} className="flex flex-col gap-2 border-t border-rule pt-4">
          <h3>Trial {trial}</h3>
          <Check isOwn={isOwn} />
          <dl className="text-soft">
            <dt className="text-ink">Leaf</dt>
            <dd className="mb-2 font-mono break-all">{leaf}</dd>
            <dt className="text-ink">Locked by entry {sequence} of the record</dt>
            <dd className="font-mono break-all">{digest}</dd>
          </dl>
        </li>
      ))}
    </ol>
  );
}
