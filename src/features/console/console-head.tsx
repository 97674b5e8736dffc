import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { StatusWord } from '../../ui/status-word.tsx';

type ConsoleHeadProps = { view: ProctorView; isLost: boolean; back: { to: string; label: string } };

/** Which session this is, and whether its record is being held. */
export function ConsoleHead({ view, isLost, back }: ConsoleHeadProps) {
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-1 border-b border-rule px-5 py-3 lg:px-8">
      <h1 className="text-base font-normal text-soft">
        <strong className="mr-4 text-ink">{view.title}</strong>
        Session {view.session} · {view.room} · {view.method}
      </h1>
      <div className="flex flex-wrap items-center gap-x-6 gap-y-1">
        <span role="status">
          {isLost ? (
            <StatusWord tone="amber" hasDot={true}>
              No connection; the session goes on when it is back
            </StatusWord>
          ) : (
            <StatusWord tone="held" hasDot={true}>
              Record held, {view.record.entries} entries
            </StatusWord>
          )}
        </span>
        <a href={back.to} className="text-soft">
          {back.label}
        </a>
      </div>
    </div>
  );
}
