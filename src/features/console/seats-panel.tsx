import { type ReactNode, useState } from 'react';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { SeatRow } from './seat-row.tsx';
import type { ConsoleActions } from './use-console.ts';

type SeatView = ProctorView['seats'][number];

type SeatsPanelProps = {
  /** What else stands beside the room. */
  children?: ReactNode;
  view: ProctorView;
  clockOffsetMs: number;
  actions: Pick<ConsoleActions, 'act' | 'isBusy' | 'problem' | 'forgetProblem'>;
};

/** Who is here and who has answered; never what. */
export function SeatsPanel({ view, clockOffsetMs, actions, children }: SeatsPanelProps) {
  const [excused, setExcused] = useState<SeatView | null>(null);
  const staying = view.seats.filter(({ state }) => state !== 'left');
  const here = staying.filter(({ state }) => state !== 'away').length;
  const isOpen = view.phase === 'seating' || view.phase === 'revealing' || view.phase === 'running';
  const ask = (seat: SeatView) => {
    actions.forgetProblem();
    setExcused(seat);
  };
  return (
    <aside aria-label="Listeners" className="border-rule px-5 py-6 max-lg:border-t lg:w-96 lg:border-l lg:px-7">
      <div className="flex items-baseline justify-between gap-4">
        <h2 className="text-lg">Listeners</h2>
        {view.seats.length === 0 ? null : (
          <span className="text-soft">
            {here} of {staying.length} here
          </span>
        )}
      </div>
      {view.seats.length === 0 ? <p className="mt-3 text-soft">Seats appear here as they are taken.</p> : null}
      <ul>
        {view.seats.map((seat) => (
          <SeatRow
            key={seat.seat}
            seat={seat}
            clockOffsetMs={clockOffsetMs}
            onExcuse={isOpen && seat.state !== 'left' ? () => ask(seat) : null}
          />
        ))}
      </ul>
      {view.phase === 'running' && view.join !== null ? (
        <p className="mt-5 text-soft">
          Whoever comes late joins with <span className="font-mono text-ink">{view.join.code}</span>
        </p>
      ) : null}
      <p className="mt-5 text-soft">
        Scores stay sealed until the study is closed. Nobody, you included, can see who is right.
      </p>
      {children === undefined ? null : <div className="mt-8">{children}</div>}
      <ConfirmDialog
        isOpen={excused !== null}
        onOpenChange={(isShown) => (isShown ? undefined : setExcused(null))}
        title={`Excuse ${excused?.seat ?? ''}?`}
        consequence="The listener takes no further part and cannot come back to this seat. Answers of locked trials stay; no trial waits for this seat any more."
        confirmWord="Excuse the listener"
        keepWord="Keep the seat"
        busy={actions.isBusy}
        {...(actions.problem === null ? {} : { problem: actions.problem })}
        onConfirm={() => {
          if (excused === null) return;
          void actions.act({ kind: 'excuse-seat', seat: excused.seat }).then((isDone) => isDone && setExcused(null));
        }}
      />
    </aside>
  );
}
