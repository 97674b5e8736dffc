import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { CopyButton } from '../ui/copy-button.tsx';
import { PhonePage } from './phone-page.tsx';
import type { KeptReceipt } from './seat-memory.ts';

function headingOf({ left, phase }: ListenerView): { title: string; detail: string } {
  if (left)
    return { title: 'You have left the session', detail: 'Thank you for coming. Later trials go on without you.' };
  if (phase === 'abandoned')
    return {
      title: 'The session ended early',
      detail: 'Thank you. Every trial that had locked counts, and the session keeps its number.',
    };
  return {
    title: 'The session is over',
    detail: 'Thank you for listening. Nobody knows a score yet, not even the proctor.',
  };
}

const textOf = (receipts: readonly KeptReceipt[]) =>
  receipts
    .map(({ trial, leaf, sequence, digest }) => `trial ${trial}  leaf ${leaf}  entry ${sequence}  ${digest}`)
    .join('\n');

/** Thanks, and the receipts of this phone. */
export function EndPage({ view, receipts }: { view: ListenerView; receipts: readonly KeptReceipt[] }) {
  const { title, detail } = headingOf(view);
  return (
    <PhonePage>
      <div className="flex flex-col gap-5 py-10">
        <p className="text-soft">
          {view.title}, session {view.session}, seat <span className="font-mono">{view.seat}</span>
        </p>
        <h1 className="text-3xl">{title}</h1>
        <p className="text-xl text-soft">{detail}</p>
        {receipts.length === 0 ? null : (
          <section className="mt-4 flex flex-col gap-4">
            <h2 className="text-xl">Your receipts</h2>
            <p className="text-soft">
              Each line is the digest of one answer and of the entry that locked it. Once the result is published, they
              show whether the record still holds what you answered.
            </p>
            <CopyButton text={textOf(receipts)} label="Copy the receipts" />
            <ol className="flex flex-col gap-3">
              {receipts.map(({ trial, leaf, sequence, digest }) => (
                <li key={trial} className="border-t border-rule pt-3">
                  Trial {trial}, entry {sequence}
                  <span className="block font-mono break-all text-soft">{leaf}</span>
                  <span className="block font-mono break-all text-soft">{digest}</span>
                </li>
              ))}
            </ol>
          </section>
        )}
      </div>
    </PhonePage>
  );
}
