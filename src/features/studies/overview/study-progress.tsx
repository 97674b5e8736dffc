import { isClosed, type Study } from '#shared/contracts/studies.ts';
import { formatCount } from '../../../lib/format.ts';
import { Progress } from '../../../ui/progress.tsx';

/** How far the study has come: sessions and locked trials, never answers. */
export function StudyProgress({ state, draft, progress }: Pick<Study, 'state' | 'draft' | 'progress'>) {
  const { sessionsOpened, sessionsEnded, trialsLocked, trialsRegistered } = progress;
  return (
    <section aria-label="Progress" className="flex flex-col gap-5">
      <div className="grid gap-x-12 gap-y-5 md:grid-cols-2">
        <Progress
          label="Trials locked"
          value={trialsLocked}
          max={trialsRegistered}
          valueText={`${trialsLocked} of ${trialsRegistered}`}
        />
        <Progress
          label="Sessions ended"
          value={sessionsEnded}
          max={Math.max(draft.sessions, sessionsEnded)}
          valueText={
            sessionsEnded > draft.sessions
              ? `${sessionsEnded}, ${draft.sessions} registered`
              : `${sessionsEnded} of ${draft.sessions}`
          }
        />
      </div>
      <p className="text-soft">
        {sessionsOpened === 0 ? 'No session has opened yet.' : openedWords(sessionsOpened)}{' '}
        {isClosed(state) ? '' : 'Scores stay hidden from everybody until the study is closed.'}
      </p>
    </section>
  );
}

function openedWords(sessionsOpened: number): string {
  return `${formatCount(sessionsOpened, 'session')} opened; every opened session counts, abandoned ones too.`;
}
