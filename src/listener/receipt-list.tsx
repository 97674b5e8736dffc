import type { ListenerView } from '#shared/contracts/listener-live.ts';
import type { OwnAnswer } from './answers.ts';
import type { KeptReceipt } from './seat-memory.ts';

type Kept = { readonly receipts: readonly KeptReceipt[]; readonly disputed: readonly OwnAnswer[] };

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
