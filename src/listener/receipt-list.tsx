import type { Kept } from './receipts-text.ts';
import type { KeptReceipt } from './seat-memory.ts';

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

/** What this phone sent where the server holds something else, with the salt that proves it. */
export function DisputedList({ disputed }: Pick<Kept, 'disputed'>) {
  return disputed.map(({ trial, choice, revision, salt }) => (
    <p key={`${trial} ${revision}`} className="border-l-[5px] border-amber pl-4">
      Trial {trial}: this phone sent {choice}, and the server holds something else. Salt{' '}
      <span className="font-mono break-all">{salt}</span>
    </p>
  ));
}
