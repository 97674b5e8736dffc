import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { StatusWord } from '../../ui/status-word.tsx';
import { useSecondsSince } from './use-seconds-since.ts';

type ConsoleHeadProps = {
  view: ProctorView;
  isLost: boolean;
  clockOffsetMs: number;
  back: { to: string; label: string };
  /** What can be done about the session as a whole. */
  children?: ReactNode;
};

/** Which session this is, whether its record is being held, and what time it is. */
export function ConsoleHead({ view, isLost, clockOffsetMs, back, children }: ConsoleHeadProps) {
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-1 border-b border-rule px-5 py-3 lg:px-8">
      <h1 className="text-base font-normal text-soft">
        <strong className="mr-4 text-ink">{view.title}</strong>
        <span className="inline-block">
          Session {view.session} · {view.room} · {view.method}
        </span>
      </h1>
      <div className="flex flex-wrap items-center gap-x-6 gap-y-1">
        {isLost ? (
          <StatusWord tone="amber" hasDot={true}>
            No connection
          </StatusWord>
        ) : view.rehearsal ? (
          <StatusWord tone="amber" hasDot={true}>
            Rehearsal, on no record
          </StatusWord>
        ) : (
          <StatusWord tone="held" hasDot={true}>
            Record held, {view.record.entries} entries
          </StatusWord>
        )}
        {children}
        <TimeOfDay clockOffsetMs={clockOffsetMs} />
        <Link to={back.to} className="inline-flex min-h-11 items-center text-soft hover:text-ink">
          {back.label}
        </Link>
      </div>
    </div>
  );
}

const timeOfDay = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** By the server's clock, which is the one the record goes by. */
function TimeOfDay({ clockOffsetMs }: { clockOffsetMs: number }) {
  const seconds = useSecondsSince(0, clockOffsetMs);
  return <span className="font-mono text-soft tabular-nums">{timeOfDay.format(seconds * 1000)}</span>;
}
