import { useState } from 'react';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { ConsoleActions } from './use-console.ts';

type SeatView = ProctorView['seats'][number];

const words = { ready: 'ready', answered: 'answered', away: 'away', left: 'has left' } as const;
const tones = { ready: 'held', answered: 'held', away: 'amber', left: 'neutral' } as const;

/** Who is here and who has answered; never what. */
export function SeatsPanel({ view, act, isBusy }: { view: ProctorView } & Pick<ConsoleActions, 'act' | 'isBusy'>) {
  const [excused, setExcused] = useState<SeatView | null>(null);
  const here = view.seats.filter(({ state }) => state === 'ready' || state === 'answered').length;
  const isOpen = view.phase === 'seating' || view.phase === 'revealing' || view.phase === 'running';
  return (
    <aside aria-label="Listeners" className="border-rule px-5 py-6 max-lg:border-t lg:w-[21.5rem] lg:border-l lg:px-7">
      <div className="flex items-baseline justify-between gap-4">
        <h2 className="text-lg">Listeners</h2>
        <span className="text-soft">
          {here} of {view.seats.length} here
        </span>
      </div>
      {view.seats.length === 0 ? <p className="mt-3 text-soft">Nobody is seated yet.</p> : null}
      <ul>
        {view.seats.map((seat) => (
          <li
            key={seat.seat}
            className="flex min-h-13 flex-wrap items-center gap-x-4 gap-y-1 border-b border-rule py-2"
          >
            <span className="font-mono text-soft">{seat.seat}</span>
            <span className="min-w-0 flex-1">{seat.place}</span>
            <StatusWord tone={tones[seat.state]}>
              {words[seat.state]}
              {seat.late ? ', one late' : ''}
            </StatusWord>
            {isOpen && seat.state === 'away' ? (
              <Button className="min-h-11" onClick={() => setExcused(seat)}>
                Excuse {seat.seat}
              </Button>
            ) : null}
          </li>
        ))}
      </ul>
      <p className="mt-5 text-soft">
        Scores stay sealed until the study is closed. Nobody, you included, can see who is right.
      </p>
      <ConfirmDialog
        isOpen={excused !== null}
        onOpenChange={(isShown) => (isShown ? undefined : setExcused(null))}
        title={`Excuse ${excused?.seat ?? ''}?`}
        consequence="The listener takes no further part. Answers of locked trials stay; later trials do not wait for this seat."
        confirmWord="Excuse the listener"
        keepWord="Wait for them"
        busy={isBusy}
        onConfirm={() => {
          if (excused === null) return;
          void act({ kind: 'excuse-seat', seat: excused.seat }).then(() => setExcused(null));
        }}
      />
    </aside>
  );
}
