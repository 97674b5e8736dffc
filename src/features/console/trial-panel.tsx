import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { CableRun } from '../../ui/cable-run.tsx';
import { Countdown } from '../../ui/countdown.tsx';
import { Sleeve } from '../../ui/sleeve.tsx';
import { stepWords } from './console-words.ts';

type Trial = NonNullable<ProctorView['trial']>;
type Words = { title: string; detail: string };

function wordsOf(trial: Trial, view: ProctorView): Words {
  if (view.paused !== null)
    return { title: 'Paused', detail: 'After it, this presentation starts again from its change.' };
  if (trial.step !== null) {
    const { act, how } = stepWords(trial.step, view.rig, trial.code ?? '');
    return { title: act, detail: how };
  }
  if (trial.stage === 'listening')
    return { title: 'They are listening', detail: `play “${trial.excerpt}”; stop when the time is out` };
  const out = trial.expected - trial.answered;
  return {
    title: `${trial.answered} of ${trial.expected} answered`,
    detail: out === 0 ? 'all are in; lock the trial, or void it if something went wrong' : `the trial waits for ${out}`,
  };
}

const stepCount = 5;

function placeOf(trial: Trial): string {
  const presentation = `presentation ${trial.presentationNumber} of ${trial.presentations}`;
  if (trial.stage === 'answering') return 'answers';
  if (trial.stage === 'listening') return `${presentation} · listening`;
  return `${presentation} · step ${Math.min(trial.stepsDone.length + 1, stepCount)} of ${stepCount}`;
}

/** The open trial: the code to be fitted, the step now, and the clock. */
export function TrialPanel({ trial, view, clockOffsetMs }: { trial: Trial; view: ProctorView; clockOffsetMs: number }) {
  const { title, detail } = wordsOf(trial, view);
  return (
    <section className="flex flex-1 flex-col justify-between gap-6">
      <p className="text-soft">
        <strong className="text-ink">{trial.familiarisation ? 'Familiarisation' : `Trial ${trial.number}`}</strong>
        {trial.familiarisation ? ', not counted' : ` of ${trial.of}`} · {placeOf(trial)}
      </p>
      {trial.code === null ? null : (
        <CableRun className="-mx-5 lg:-mx-11">
          <div data-code={trial.code} className="px-5">
            <Sleeve code={trial.code} size="huge" />
          </div>
        </CableRun>
      )}
      <div className="flex flex-wrap items-baseline gap-x-7 gap-y-2" aria-live="polite">
        <h2 className="text-step font-bold">{title}</h2>
        <p className="text-xl text-soft">{detail}</p>
      </div>
      <Clock trial={trial} clockOffsetMs={clockOffsetMs} />
    </section>
  );
}

function Clock({ trial, clockOffsetMs }: { trial: Trial; clockOffsetMs: number }) {
  if (trial.endsAt === null) return null;
  const label = { change: 'Listening starts in', listening: 'The excerpt ends in', answering: 'The trial waits until' }[
    trial.stage
  ];
  return (
    <p className="flex flex-wrap items-baseline gap-x-4 text-soft">
      {label}
      <Countdown deadlineMs={trial.endsAt} clockOffsetMs={clockOffsetMs} className="text-2xl font-bold text-ink" />
      {trial.longChange ? <span className="text-amber">a longer change than registered; it is noted</span> : null}
    </p>
  );
}
