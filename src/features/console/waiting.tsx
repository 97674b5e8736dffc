import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Countdown } from '../../ui/countdown.tsx';
import { areLevelsIn, isAnybodySeated } from './next-act.ts';

type Wait = { words: string; until: number | null };

const isBeforeTrial = ({ phase }: ProctorView) => phase === 'planned' || phase === 'running';

/** What the console waits for while there is no next act; null where a page brings its own button. */
function waitOf(view: ProctorView): Wait | null {
  const { trial } = view;
  if (
    view.paused === null &&
    view.trial === null &&
    !areLevelsIn(view) &&
    view.cautionsConfirmed &&
    isBeforeTrial(view)
  )
    return { words: 'Waiting for the levels', until: null };
  if (view.phase === 'seating') return { words: 'Waiting for the first listener', until: null };
  if (view.phase === 'revealing') return { words: 'Phones that stay silent are left out in', until: view.dueAt };
  if (view.phase !== 'running') return null;
  if (trial === null) return isAnybodySeated(view) ? null : { words: 'Waiting for a listener', until: null };
  if (trial.stage === 'listening') return { words: 'The excerpt ends in', until: trial.endsAt };
  return { words: trial.practice === null ? 'The trial waits until' : 'The practice waits until', until: trial.endsAt };
}

/** Stands where the next act stands while somebody else is to act, so that nothing moves when it comes. */
export function Waiting({ view, clockOffsetMs }: { view: ProctorView; clockOffsetMs: number }) {
  const wait = waitOf(view);
  if (wait === null) return null;
  return (
    <p className="flex min-h-19 items-center gap-4 rounded bg-sheet px-6 py-3 text-2xl text-soft">
      {wait.words}
      {wait.until === null ? null : (
        <Countdown deadlineMs={wait.until} clockOffsetMs={clockOffsetMs} className="font-bold text-ink" />
      )}
    </p>
  );
}
