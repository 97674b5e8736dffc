import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Cautions } from './cautions.tsx';
import { Ended } from './ended.tsx';
import { Inventory } from './inventory.tsx';
import { LevelsPanel } from './levels-panel.tsx';
import type { NextAct } from './next-act.ts';
import { NextActButton } from './next-act-button.tsx';
import { PauseBanner } from './pause-banner.tsx';
import { ScanBox } from './scan-box.tsx';
import { BetweenTrials, ReadyForListeners, Revealing } from './scenes.tsx';
import { Seating } from './seating.tsx';
import { SoundPanel } from './sound-panel.tsx';
import { ChangeClock, TrialPanel } from './trial-panel.tsx';
import type { ConsoleActions } from './use-console.ts';
import type { Labels } from './use-labels.ts';
import { Waiting } from './waiting.tsx';

type ConsoleBodyProps = {
  view: ProctorView;
  clockOffsetMs: number;
  isLost: boolean;
  actions: ConsoleActions;
  next: NextAct | null;
  onNext: () => void;
  back: { to: string; label: string };
  /** Where levels are entered; null in a rehearsal. */
  levelsTo: string | null;
  labels: Labels;
  areKeysOn: boolean;
};

const isOver = ({ phase }: ProctorView) => phase === 'finished' || phase === 'abandoned';

/** What the proctor does now: what is the matter, the one thing at hand, and the act that ends it. */
export function ConsoleBody({
  view,
  clockOffsetMs,
  isLost,
  actions,
  next,
  onNext,
  back,
  levelsTo,
  labels,
  areKeysOn,
}: ConsoleBodyProps) {
  return (
    <div className="flex min-w-0 flex-1 flex-col gap-6 px-5 py-7 lg:px-11">
      {isLost ? <LostBanner /> : null}
      {view.paused === null ? null : <PauseBanner pause={view.paused} view={view} clockOffsetMs={clockOffsetMs} />}
      {view.levels === null || levelsTo === null ? null : (
        <LevelsPanel levels={view.levels} phase={view.phase} levelsTo={levelsTo} actions={actions} />
      )}
      {view.trial !== null || isOver(view) ? null : <SoundPanel sound={view.sound} actions={actions} />}
      <Scenery view={view} actions={actions} back={back} />
      <p role="alert" className="border-l-4 border-amber pl-3 text-2xl font-semibold text-amber empty:hidden">
        {actions.problem}
      </p>
      <div className="flex flex-wrap items-stretch gap-3.5">
        <div className="min-w-0 flex-1 basis-80">
          {labels.isWanted && view.paused === null ? (
            <ScanBox labels={labels} isLost={isLost} keyHint={areKeysOn ? 'Alt+C' : null} />
          ) : next === null ? (
            <Waiting view={view} clockOffsetMs={clockOffsetMs} />
          ) : (
            <NextActButton next={next} clockOffsetMs={clockOffsetMs} isLost={isLost} onPress={onNext} />
          )}
        </div>
        <ChangeClock view={view} clockOffsetMs={clockOffsetMs} />
      </div>
    </div>
  );
}

type SceneryProps = Pick<ConsoleBodyProps, 'view' | 'actions' | 'back'>;

function Scenery({ view, actions, back }: SceneryProps) {
  switch (view.phase) {
    case 'planned':
      if (view.cautionsConfirmed) return <ReadyForListeners />;
      return <Cautions view={view} act={actions.act} isBusy={actions.isBusy} />;
    case 'seating':
      return view.join === null ? null : (
        <Seating join={view.join} seats={view.seats} canListenHere={view.demo || view.rehearsal} />
      );
    case 'revealing':
      return <Revealing view={view} />;
    case 'running':
      if (view.trial !== null) return <TrialPanel trial={view.trial} view={view} />;
      return view.inventory === null || view.inventory.isEnded ? (
        <BetweenTrials view={view} actions={actions} />
      ) : (
        <Inventory inventory={view.inventory} />
      );
    case 'finished':
    case 'abandoned':
      return <Ended view={view} back={back} />;
  }
}

function LostBanner() {
  return (
    <div role="alert" className="rounded border-2 border-amber px-5 py-4">
      <strong className="block text-2xl text-amber">The connection is lost</strong>
      Leave the cables as they are. The server holds the session and every answer; this page follows by itself as soon
      as it is back.
    </div>
  );
}
