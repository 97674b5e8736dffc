import type { ReactNode } from 'react';
import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { CopyButton } from '../ui/copy-button.tsx';
import { CourseLine } from '../ui/course-line.tsx';
import { ExitQuestions } from './exit-questions.tsx';
import { PhonePage } from './phone-page.tsx';
import { DisputedList, ReceiptList } from './receipt-list.tsx';
import { receiptsText } from './receipts-text.ts';
import type { Seat, SeatSnapshot } from './seat.ts';

function headingOf({ left, phase, rehearsal }: ListenerView): { title: string; detail: string } {
  if (rehearsal && !left)
    return { title: 'The rehearsal is over', detail: 'Thank you. Nothing was kept; there is no result.' };
  if (left)
    return { title: 'You have left the session', detail: 'Thank you for coming. Later trials go on without you.' };
  if (phase === 'abandoned')
    return {
      title: 'The session ended early',
      detail: 'Thank you. Every trial that had locked counts, and the session keeps its number.',
    };
  return {
    title: 'The session is over',
    detail: 'Thank you for listening. Nobody knows a result yet, not even the proctor.',
  };
}

type EndPageProps = { seat: Seat; view: ListenerView; snapshot: SeatSnapshot; alarm: ReactNode };

/** Thanks, and the receipts of this phone. */
export function EndPage({ seat, view, snapshot, alarm }: EndPageProps) {
  const { title, detail } = headingOf(view);
  const { receipts, answers, disputed } = snapshot;
  const late = answers.filter(({ state }) => state === 'late');
  const here = answers.filter(({ state }) => state === 'here');
  return (
    <PhonePage>
      <p className="pt-4 text-soft">
        {view.title}, session {view.session}, seat <span className="font-mono">{view.seat}</span>
      </p>
      <CourseLine trials={view.course} isCompact={true} className="-mx-5 mt-3" />
      <div className="flex flex-col gap-4 py-8">
        {alarm}
        <div role="status" className="flex flex-col gap-4">
          <h1 className="text-3xl">{title}</h1>
          <p className="text-xl text-soft">{detail}</p>
        </div>
        {here.map(({ trial }) => (
          <p key={trial} className="text-amber">
            Trial {trial}: your answer is still on this phone. Keep this page open.
          </p>
        ))}
        {late.map(({ trial, why }) => (
          <p key={trial}>
            <strong>Too late.</strong> {why}
          </p>
        ))}
        <DisputedList disputed={disputed} />
        {view.exit === null ? null : <ExitQuestions seat={seat} exit={view.exit} snapshot={snapshot} />}
        {receipts.length === 0 || view.rehearsal ? null : (
          <section className="mt-4 flex flex-col gap-4">
            <h2 className="text-xl">Your receipts</h2>
            <p className="text-soft">
              A receipt names the leaf that stands for your answer and the entry that locked it. Once the result is
              published, anyone can look both up in the record and see whether it still holds what you answered.
            </p>
            <CopyButton text={receiptsText(view, snapshot)} label="Copy the receipts" />
            <ReceiptList receipts={receipts} />
          </section>
        )}
      </div>
    </PhonePage>
  );
}
