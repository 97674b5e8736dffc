import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Countdown } from '../../ui/countdown.tsx';
import { LinkButton } from '../../ui/link-button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { Cautions } from './cautions.tsx';
import { pauseWords } from './console-words.ts';
import type { NextAct } from './next-act.ts';
import { NextActButton } from './next-act-button.tsx';
import { Seating } from './seating.tsx';
import { TrialPanel } from './trial-panel.tsx';
import type { ConsoleActions } from './use-console.ts';

type ConsoleBodyProps = {
  view: ProctorView;
  clockOffsetMs: number;
  actions: ConsoleActions;
  next: NextAct | null;
  onNext: () => void;
  back: { to: string; label: string };
};

/** What the proctor does now. */
export function ConsoleBody({ view, clockOffsetMs, actions, next, onNext, back }: ConsoleBodyProps) {
  return (
    <div className="flex min-w-0 flex-1 flex-col gap-6 px-5 py-7 lg:px-11">
      {view.paused === null ? null : (
        <Notice tone="amber" title={`${pauseWords(view.paused)}.`}>
          Nothing goes on until you resume.
        </Notice>
      )}
      <Scene view={view} clockOffsetMs={clockOffsetMs} actions={actions} back={back} />
      <p role="alert" className="text-amber empty:hidden">
        {actions.problem}
      </p>
      {next === null ? null : <NextActButton next={next} clockOffsetMs={clockOffsetMs} onPress={onNext} />}
    </div>
  );
}

type SceneProps = Pick<ConsoleBodyProps, 'view' | 'clockOffsetMs' | 'actions' | 'back'>;

function Scene({ view, clockOffsetMs, actions, back }: SceneProps) {
  if (view.phase === 'planned')
    return view.cautionsConfirmed ? (
      <Scenery
        title="Ready for listeners"
        detail="Opening seating commits this server to its part of the draw, before the first phone joins."
      />
    ) : (
      <Cautions view={view} act={actions.act} isBusy={actions.isBusy} />
    );
  if (view.phase === 'seating' && view.join !== null) return <Seating join={view.join} isDemo={view.demo} />;
  if (view.phase === 'revealing') return <Revealing view={view} clockOffsetMs={clockOffsetMs} />;
  if (view.phase === 'finished' || view.phase === 'abandoned') return <Ended view={view} back={back} />;
  if (view.trial !== null) return <TrialPanel trial={view.trial} view={view} clockOffsetMs={clockOffsetMs} />;
  if (!view.familiarised)
    return (
      <Scenery
        title="The draw is fixed"
        detail="Now the familiarisation: A and B are heard once, labelled and sleeved. Nothing is asked, nothing counts."
      />
    );
  if (view.nextTrial !== null)
    return (
      <Scenery
        title={`Trial ${view.nextTrial} is next`}
        detail="Begin it when everybody is ready. Take a break whenever ears need one."
      />
    );
  return (
    <Scenery title="Every trial has ended" detail="Finish the session. Scores stay sealed until the study is closed." />
  );
}

function Scenery({ title, detail }: { title: string; detail: string }) {
  return (
    <section className="flex flex-1 flex-col justify-center gap-3" aria-live="polite">
      <h2 className="text-step font-bold">{title}</h2>
      <p className="max-w-[40rem] text-xl text-soft">{detail}</p>
    </section>
  );
}

function Revealing({ view, clockOffsetMs }: { view: ProctorView; clockOffsetMs: number }) {
  const { done = 0, of = 0 } = view.revealed ?? {};
  return (
    <section className="flex flex-1 flex-col justify-center gap-3" aria-live="polite">
      <h2 className="text-step font-bold">
        {done} of {of} random numbers are in
      </h2>
      <p className="text-xl text-soft">
        Phones that stay silent are left out in{' '}
        {view.dueAt === null ? null : <Countdown deadlineMs={view.dueAt} clockOffsetMs={clockOffsetMs} />}, and the
        record says so.
      </p>
    </section>
  );
}

function Ended({ view, back }: { view: ProctorView; back: { to: string; label: string } }) {
  const count = (state: string) => view.course.filter((ring) => ring.state === state).length;
  return (
    <section className="flex flex-1 flex-col justify-center gap-5">
      <h2 className="text-step font-bold">
        {view.phase === 'finished' ? 'The session is finished' : 'The session was ended early'}
      </h2>
      <p className="max-w-[40rem] text-xl text-soft">
        {count('locked')} trials locked, {count('void')} void, {view.record.sessionEntries} entries on the record. Leave
        the amplifier muted or off, and put the cables away as they are, sleeved.
      </p>
      <div>
        <LinkButton to={back.to}>{back.label}</LinkButton>
      </div>
    </section>
  );
}
