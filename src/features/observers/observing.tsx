import type { ObserverCommand, ObserverView } from '#shared/contracts/observer-live.ts';
import { Countdown } from '../../ui/countdown.tsx';
import { CourseLine } from '../../ui/course-line.tsx';
import { nowWords, watchedWords } from './observing-words.ts';
import { SignWatched } from './sign-watched.tsx';

const stateWords = { here: 'seated', answered: 'has answered', left: 'has left' } as const;
const stepWords: { readonly [step: string]: string } = {
  mute: 'Mute',
  unplug: 'Unplug',
  fit: 'Fit',
  scan: 'Scan',
  check: 'Check',
  settle: 'Settle',
  unmute: 'Unmute',
};

type ObservingProps = {
  view: ObserverView;
  isLost: boolean;
  clockOffsetMs: number;
  send: (command: ObserverCommand) => Promise<void>;
};

/** What a witness sees: phase, trial, steps, times, who has answered; at the end, what they sign. */
export function Observing({ view, isLost, clockOffsetMs, send }: ObservingProps) {
  const { title, detail } = nowWords(view);
  const isOver = view.phase === 'finished' || view.phase === 'abandoned';
  const endsAt = view.paused?.leastEndsAt ?? view.trial?.endsAt ?? null;
  return (
    <main className="mx-auto flex min-h-dvh w-full max-w-5xl flex-col gap-8 px-5 py-6 lg:px-10">
      <header className="flex flex-wrap justify-between gap-x-8 gap-y-1 text-soft">
        <span>
          {view.title}, session {view.session}, {view.method}
        </span>
        <span>
          Observer <span className="font-mono">{view.observer}</span>
        </span>
      </header>
      <CourseLine trials={view.course} />
      {isLost ? (
        <p role="alert" className="rounded border-2 border-amber px-5 py-4">
          <strong className="block text-xl text-amber">The connection is lost</strong>
          What happens now is not counted as watched. The page comes back by itself.
        </p>
      ) : null}
      <div role="status" className="flex flex-col gap-2">
        <h1 className="text-step font-bold">{title}</h1>
        <p className="text-xl text-soft">{detail}</p>
      </div>
      {endsAt === null || isLost || isOver ? null : (
        <p className="text-xl">
          <Countdown deadlineMs={endsAt} clockOffsetMs={clockOffsetMs} /> left
        </p>
      )}
      {view.trial?.stage === 'change' ? (
        <ol className="flex flex-wrap gap-x-6 gap-y-2 text-xl">
          {view.trial.steps.map((step) => {
            const isDone = view.trial?.stepsDone.includes(step) ?? false;
            return (
              <li key={step} className={isDone ? 'text-jacket' : 'text-soft'}>
                {stepWords[step] ?? step}
                {isDone ? ', done' : ''}
              </li>
            );
          })}
        </ol>
      ) : null}
      {isOver ? (
        <SignWatched view={view} send={send} />
      ) : (
        <section aria-label="Listeners">
          <ul className="grid gap-x-8 border-t border-rule sm:grid-cols-2 lg:grid-cols-3">
            {view.seats.map(({ seat, state }) => (
              <li key={seat} className="flex justify-between gap-4 border-b border-rule py-2">
                <span className="font-mono">{seat}</span>
                <span className={state === 'answered' ? 'font-semibold text-jacket' : 'text-soft'}>
                  {stateWords[state]}
                </span>
              </li>
            ))}
          </ul>
          <p className="mt-4 text-soft">{watchedWords(view)}</p>
        </section>
      )}
      <p className="mt-auto text-soft">
        You see no code, no level and no answer, so that you can tell nobody. Keep this page open while you watch.
      </p>
    </main>
  );
}
