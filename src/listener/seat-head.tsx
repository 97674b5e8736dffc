import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { Countdown } from '../ui/countdown.tsx';
import { CourseLine } from '../ui/course-line.tsx';

function headOf({ trial, phase, session }: ListenerView): string {
  if (trial === null) return phase === 'running' ? `Session ${session}` : 'Before the first trial';
  if (trial.practice !== null) return `Practice ${trial.practice.number}, not counted`;
  return trial.familiarisation ? 'Familiarisation, not counted' : `Trial ${trial.number} of ${trial.of}`;
}

function rehearsalHeadOf({ trial }: ListenerView): string {
  if (trial === null || trial.familiarisation) return 'Rehearsal';
  return trial.practice === null
    ? `Rehearsal, trial ${trial.number} of ${trial.of}`
    : `Rehearsal, practice ${trial.practice.number}`;
}

function statusOf({ trial, paused }: ListenerView, isLost: boolean): string {
  if (isLost) return 'No connection. It comes back by itself.';
  if (!isListenersTurn(trial)) return '';
  const takesAnswers = trial?.requests?.takesAnswers ?? true;
  if (paused !== null) return takesAnswers ? 'Paused. You can still answer.' : '';
  return takesAnswers ? 'Answers are open.' : 'Ask for what you want to hear.';
}

const isListenersTurn = (trial: ListenerView['trial']) =>
  trial?.takesPart === true && (trial.stage === 'answering' || trial.stage === 'asking');

type SeatHeadProps = { view: ListenerView; isLost: boolean; clockOffsetMs: number };

/** Where the session stands. The last row always has its height, so that nothing below it moves. */
export function SeatHead({ view, isLost, clockOffsetMs }: SeatHeadProps) {
  const { trial } = view;
  const endsAt = trial !== null && isListenersTurn(trial) ? trial.endsAt : null;
  return (
    <header className="pt-4 [@media(max-height:699px)]:pt-2">
      <div className="flex justify-between gap-4 px-5">
        <strong>{view.rehearsal ? rehearsalHeadOf(view) : headOf(view)}</strong>
        <span className="shrink-0 text-soft">
          Seat <span className="font-mono">{view.seat}</span>
        </span>
      </div>
      <CourseLine trials={view.course} isCompact={true} className="mt-3 [@media(max-height:699px)]:mt-1" />
      <div className="flex min-h-7 justify-between gap-4 px-5">
        <p role="status" className={isLost ? 'text-amber' : 'text-soft'}>
          {statusOf(view, isLost)}
        </p>
        {endsAt === null || isLost ? null : (
          <span className="shrink-0 text-soft">
            <Countdown deadlineMs={endsAt} clockOffsetMs={clockOffsetMs} /> left
          </span>
        )}
      </div>
    </header>
  );
}
