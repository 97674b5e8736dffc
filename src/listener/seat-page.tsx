import { useEffect, useState, useSyncExternalStore } from 'react';
import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { CourseLine } from '../ui/course-line.tsx';
import { EndPage } from './end-page.tsx';
import { LoudAndLeave } from './loud-and-leave.tsx';
import { PhonePage } from './phone-page.tsx';
import { Question } from './question.tsx';
import type { Seat, SeatSnapshot } from './seat.ts';
import { Words } from './words.tsx';

/** Keeps the screen on while the seat is shown, where the browser can. */
function useWakeLock(): void {
  useEffect(() => {
    if (!('wakeLock' in navigator)) return;
    let lock: WakeLockSentinel | null = null;
    const ask = () => {
      if (document.visibilityState !== 'visible') return;
      navigator.wakeLock.request('screen').then(
        (given) => {
          lock = given;
        },
        // Refused, for example on a low battery: the phone may then darken, and comes back where it was.
        () => {
          lock = null;
        },
      );
    };
    ask();
    document.addEventListener('visibilitychange', ask);
    return () => {
      document.removeEventListener('visibilitychange', ask);
      void lock?.release();
    };
  }, []);
}

function headOf({ trial, phase, session }: ListenerView): string {
  if (trial === null) return phase === 'running' ? `Session ${session}` : 'Before the first trial';
  return trial.familiarisation ? 'Familiarisation, not counted' : `Trial ${trial.number} of ${trial.of}`;
}

export function SeatPage({ seat }: { seat: Seat }) {
  const snapshot = useSyncExternalStore(seat.subscribe, seat.getSnapshot);
  useWakeLock();
  const { view, refused } = snapshot;
  if (refused !== null) return <Refused detail={refused.message} />;
  if (view === null)
    return (
      <PhonePage>
        <Words title="Finding your seat" detail="This takes a moment." />
      </PhonePage>
    );
  if (view.left || view.phase === 'finished' || view.phase === 'abandoned')
    return <EndPage view={view} receipts={snapshot.receipts} />;
  return (
    <PhonePage
      header={<Head view={view} isLost={snapshot.connection === 'lost'} />}
      footer={<LoudAndLeave seat={seat} />}
    >
      {snapshot.alarm === null ? null : (
        <p role="alert" className="mt-4 border-l-[5px] border-amber py-1 pl-4">
          {snapshot.alarm}
        </p>
      )}
      <Now key={view.trial?.number ?? 'none'} view={view} snapshot={snapshot} seat={seat} />
    </PhonePage>
  );
}

function Refused({ detail }: { detail: string }) {
  return (
    <PhonePage>
      <Words title="This seat cannot be opened" detail={detail} />
      <a href="/listen" className="mb-10 self-center">
        Take a seat with a session code
      </a>
    </PhonePage>
  );
}

function Head({ view, isLost }: { view: ListenerView; isLost: boolean }) {
  return (
    <header className="pt-4">
      <div className="flex justify-between gap-4 px-5">
        <strong>{headOf(view)}</strong>
        <span className="text-soft">
          Seat <span className="font-mono">{view.seat}</span>
        </span>
      </div>
      <CourseLine trials={view.course} isCompact={true} className="mt-3" />
      <p role="status" className="min-h-7 px-5 text-amber">
        {isLost ? 'No connection. This page goes on by itself when it is back.' : ''}
      </p>
    </header>
  );
}

function waitingWords(view: ListenerView): { title: string; detail: string } {
  if (view.phase === 'seating')
    return {
      title: `You are seated as ${view.seat}`,
      detail: view.contributes
        ? 'The session starts soon. Your phone’s random number will count in the draw, so that nobody could have chosen it alone.'
        : 'The session starts soon.',
    };
  if (view.phase === 'revealing')
    return {
      title: 'The draw is being fixed',
      detail: 'All phones give their random numbers. There is nothing to do.',
    };
  if (view.lastOutcome?.outcome === 'void')
    return {
      title: `Trial ${view.lastOutcome.trial} was set aside`,
      detail: 'A spare takes its place. Rest your ears.',
    };
  if (view.lastOutcome?.counted === true)
    return {
      title: `Trial ${view.lastOutcome.trial} is locked`,
      detail: 'Your answer is in the record. Rest your ears; the next trial follows.',
    };
  if (view.lastOutcome !== null)
    return {
      title: `Trial ${view.lastOutcome.trial} is locked`,
      detail: 'No answer of yours is in it. Rest your ears; the next trial follows.',
    };
  const late = view.contributes ? '' : ' You joined too late for your phone’s random number to count in the draw.';
  return { title: 'Ready', detail: `The next step follows.${late}` };
}

const pauses = {
  break: { title: 'Break', detail: 'Rest your ears. The session goes on from here.' },
  'too-loud': { title: 'Paused: too loud', detail: 'The proctor turns it down before anything goes on.' },
  trouble: { title: 'Paused', detail: 'Something is being put right. The session goes on from here.' },
} as const;

function Now({ view, snapshot, seat }: { view: ListenerView; snapshot: SeatSnapshot; seat: Seat }) {
  const { trial } = view;
  const [isChanging, setChanging] = useState(false);
  if (view.paused !== null && trial?.stage !== 'answering') return <Words {...pauses[view.paused]} />;
  if (trial === null) {
    const late = snapshot.answer?.state === 'late' ? snapshot.answer : null;
    if (late !== null && late.trial === view.lastOutcome?.trial)
      return <Words title="Too late" detail={late.why ?? 'This answer is not counted.'} />;
    return <Words {...waitingWords(view)} />;
  }
  if (!trial.takesPart) return <Words title="One moment" detail="You take part from the next trial on." />;
  if (trial.stage === 'change')
    return (
      <Words title="Rest your ears" detail={`The next cable is being fitted. Then you hear ${trial.presentation}.`} />
    );
  if (trial.stage === 'listening') return <Hearing trial={trial} />;
  const own = snapshot.answer?.trial === trial.number ? snapshot.answer : null;
  return (
    <Question
      question={view.question}
      own={own}
      isChanging={isChanging || own === null}
      onChange={() => setChanging(true)}
      onSend={(choice, confidence) => {
        setChanging(false);
        seat.answer(choice, confidence);
      }}
    />
  );
}

function Hearing({ trial }: { trial: NonNullable<ListenerView['trial']> }) {
  const isLast = trial.presentationNumber === trial.presentations;
  const next = trial.familiarisation
    ? 'Nothing is asked in this one.'
    : isLast
      ? 'Next you say which one it matches.'
      : '';
  return (
    <div className="flex flex-1 flex-col items-center justify-center gap-6 text-center" role="status">
      <span aria-hidden="true" className="text-[12rem] leading-none font-bold">
        {trial.presentation}
      </span>
      <p className="text-xl text-soft">
        You are hearing {trial.presentation}.
        <br />
        {next}
      </p>
    </div>
  );
}
