import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { CableRun } from '../../ui/cable-run.tsx';
import { Countdown } from '../../ui/countdown.tsx';
import { Sleeve } from '../../ui/sleeve.tsx';
import { startsListening, stepWords, wordsAfter } from './console-words.ts';
import { PlayLine } from './play-line.tsx';
import { isScanning } from './use-labels.ts';

type Trial = NonNullable<ProctorView['trial']>;
type Words = { title: string; detail: string };

function wordsOf(trial: Trial, view: ProctorView): Words {
  const code = trial.code ?? '';
  if (view.paused !== null)
    return { title: 'Wait', detail: `resume when all is well · next: ${wordsAfterPause(trial)}` };
  if (trial.step !== null) {
    const { act, how } = stepWords(view, trial.step, code);
    if (isScanning(view) && trial.scannedEnds === 1)
      return { title: act, detail: 'one end is in · now the label at the other end' };
    return { title: act, detail: `${how} · next: ${wordsAfter(view, trial.step, code)}` };
  }
  if (trial.stage === 'listening')
    return { title: 'They are listening', detail: `“${trial.excerpt}” · stop the music when the time is out` };
  if (trial.stage === 'asking' && trial.answered < trial.expected)
    return {
      title: 'The listener’s turn',
      detail: 'to ask for another presentation, or to answer · say nothing, show nothing',
    };
  const out = trial.expected - trial.answered;
  return {
    title: `${trial.answered} of ${trial.expected} answered`,
    detail:
      out === 0
        ? `all are in · next: ${trial.practice === null ? 'lock the trial' : 'end this practice'}`
        : `${out} still to come · say nothing, show nothing`,
  };
}

/** A presentation is given again whole; answering goes on with the time that was left. */
function wordsAfterPause(trial: Trial): string {
  if (trial.stage === 'answering') return 'the answers go on';
  if (trial.stage === 'asking') return 'the listener’s turn goes on';
  return `presentation ${trial.presentationNumber}, from its change`;
}

function placeOf(trial: Trial, { steps }: Pick<ProctorView, 'steps'>): string {
  const of = trial.onRequest ? 'of at most' : 'of';
  if (trial.stage === 'answering') return 'answers';
  if (trial.stage === 'asking') return `${trial.presentationNumber} ${of} ${trial.presentations} presentations given`;
  const presentation = `presentation ${trial.presentationNumber} ${of} ${trial.presentations}`;
  if (trial.stage === 'listening') return `${presentation} · listening`;
  const step = Math.min(trial.stepsDone.length + 1, steps.length);
  return `${presentation} · step ${step} of ${steps.length}`;
}

function nameOf({ number, familiarisation, practice }: Trial): string {
  if (practice !== null) return `Practice ${practice.number}`;
  return familiarisation ? 'Familiarisation' : `Trial ${number}`;
}

/** The open trial: the code to be fitted on its sleeve, and the step now. */
export function TrialPanel({ trial, view }: { trial: Trial; view: ProctorView }) {
  const { title, detail } = wordsOf(trial, view);
  return (
    <section
      // Where the session stands, in one word for whoever follows the page by program.
      data-stand={`${trial.number} ${trial.presentationNumber} ${trial.stage}`}
      className="flex flex-1 flex-col gap-6"
    >
      <p className="text-soft">
        <strong className="text-ink">{nameOf(trial)}</strong>
        {trial.number > 0 ? ` of ${trial.of}` : ', not counted'} · {placeOf(trial, view)}
      </p>
      <PlayLine trial={trial} />
      <CableRun className="-mx-5 flex min-h-32 flex-1 items-center lg:-mx-11">
        {trial.code === null || view.paused !== null ? null : (
          <div data-code={trial.code} className="w-full px-5">
            <Sleeve code={trial.code} size="huge" />
          </div>
        )}
      </CableRun>
      <div className="flex flex-wrap items-baseline gap-x-7 gap-y-2" aria-live="polite" aria-atomic="true">
        <h2 className="text-step font-bold">{title}</h2>
        <p className="text-xl text-soft">{detail}</p>
      </div>
    </section>
  );
}

/** How long the change still has, beside its steps; the last step carries the time itself. */
export function ChangeClock({ view, clockOffsetMs }: { view: ProctorView; clockOffsetMs: number }) {
  const { trial } = view;
  if (trial === null || trial.stage !== 'change' || trial.endsAt === null) return null;
  const isLast = startsListening(view, trial.step);
  if (isLast && !trial.longChange) return null;
  return (
    <div className="flex min-h-19 min-w-60 flex-col justify-center rounded bg-sheet px-5 py-2 max-sm:w-full">
      {trial.longChange ? <span className="text-amber">Longer than registered; it is noted</span> : null}
      {isLast ? null : (
        <>
          <span className="text-soft">Listening starts in</span>
          <Countdown
            deadlineMs={trial.endsAt}
            clockOffsetMs={clockOffsetMs}
            className="text-2xl leading-tight font-bold"
          />
        </>
      )}
    </div>
  );
}
