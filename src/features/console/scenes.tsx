import type { ReactNode } from 'react';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { CableRun } from '../../ui/cable-run.tsx';
import { Progress } from '../../ui/progress.tsx';
import { isAnybodySeated, isComplete } from './next-act.ts';
import { Training } from './training.tsx';
import type { ConsoleActions } from './use-console.ts';

type SceneProps = { title: string; hasCable?: boolean; children: ReactNode };

/** One thing to know, large, and a line on it. */
function Scene({ title, hasCable = false, children }: SceneProps) {
  return (
    <section className="flex flex-1 flex-col gap-6">
      {hasCable ? <CableRun className="-mx-5 min-h-24 flex-1 lg:-mx-11" /> : <div className="flex-1" />}
      <div className="flex flex-col gap-3" aria-live="polite">
        <h2 className="text-step font-bold">{title}</h2>
        <div className="max-w-[46rem] text-xl text-soft">{children}</div>
      </div>
    </section>
  );
}

export function ReadyForListeners() {
  return (
    <Scene title="Ready for listeners">
      Opening seating commits the server to its part of the draw, before the first phone joins.
    </Scene>
  );
}

/** While the phones open what they committed to. */
export function Revealing({ view }: { view: ProctorView }) {
  const { done = 0, of = 0 } = view.revealed ?? {};
  return (
    <Scene title="The phones fix the draw" hasCable={true}>
      <p className="mb-5">
        Each phone gives the random number that it committed to. One that stays silent is left out, and the record says
        so.
      </p>
      <Progress label="Random numbers" value={done} max={Math.max(of, 1)} valueText={`${done} of ${of} are in`} />
    </Scene>
  );
}

/** While a session runs and no trial is open. */
export function BetweenTrials({ view, actions }: { view: ProctorView; actions: ConsoleActions }) {
  if (isComplete(view))
    return (
      <Scene title="Every trial has ended" hasCable={true}>
        Finish the session. Scores stay sealed until the study is closed.
      </Scene>
    );
  if (!isAnybodySeated(view))
    return (
      <Scene title="Nobody is seated any more" hasCable={true}>
        A listener can still join with the session code. If nobody will, end the session and say why.
      </Scene>
    );
  if (!view.familiarised)
    return (
      <Scene title="The draw is fixed" hasCable={true}>
        Now the familiarisation: both cables are heard once, labelled and sleeved. Nothing is asked, nothing counts.
      </Scene>
    );
  const { training, paused } = view;
  return (
    <>
      <Scene title={`Trial ${view.nextTrial ?? ''} is next`} hasCable={true}>
        Begin when everybody is ready. Take a break whenever ears need one.
      </Scene>
      {training === null || paused !== null ? null : <Training training={training} actions={actions} />}
    </>
  );
}
