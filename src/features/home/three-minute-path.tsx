import type { ReactNode } from 'react';
import { LinkButton } from '../../ui/link-button.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { HomePlaces } from './home-places.ts';

/** The session that the path leads through, and how far it and its study have come. */
export type DemoSession = {
  readonly id: string;
  readonly studyId: string;
  readonly title: string;
  readonly number: number;
  readonly stage: 'open' | 'ended' | 'study-closed';
};

export type DemoActor = {
  readonly name: string;
  /** Whether this person is the one signed in now. */
  readonly isHere: boolean;
  /** Renders the button that signs this person in and goes on to an address. */
  readonly signInButton: (goTo: string) => ReactNode;
};

type ThreeMinutePathProps = {
  /** Null for whoever may not see sessions; the path then leads by the start page. */
  session: DemoSession | null;
  proctor: DemoActor;
  manager: DemoActor;
  places: HomePlaces;
};

/** For a visitor alone with one computer: a whole session, from the console to the report. */
export function ThreeMinutePath({ session, proctor, manager, places }: ThreeMinutePathProps) {
  const isRun = session !== null && session.stage !== 'open';
  const isClosed = session?.stage === 'study-closed';
  const consoleTo = session === null ? places.start : places.console(session.id);
  const studyTo = session === null ? places.start : places.study(session.studyId);
  return (
    <section aria-labelledby="three-minutes" className="border-t-2 border-ink pt-5">
      <h2 id="three-minutes" className="text-xl">
        See it work in three minutes
      </h2>
      <p className="pt-1 text-soft">{ledeOf(session)}</p>
      <ol className="pt-3">
        <Step
          number={1}
          title="Open the console as the proctor"
          isDone={isRun}
          act={actOf(proctor, consoleTo, 'Open the console')}
        >
          {proctor.name} leads the session and sees blind codes only.
        </Step>
        <Step number={2} title="Open listeners here" isDone={isRun}>
          In the console, press “Open a listener here” once for each listener; two make it lively. Every one is a window
          of its own: consent in each.
        </Step>
        <Step number={3} title="Run five short trials" isDone={isRun}>
          Follow the console, one step at a time, and answer in the listeners’ windows. Guessing is fine; there is no
          cable to hear.
        </Step>
        <Step
          number={4}
          title="Close the study as the manager"
          isDone={isClosed}
          act={actOf(manager, studyTo, 'Open the study')}
        >
          {manager.name} closes it. Only then are the secrets opened and the answers counted, once.
        </Step>
        <Step
          number={5}
          title="Read the report"
          act={isClosed ? actOf(manager, places.report(session.studyId), 'Read the report') : null}
        >
          It says what was found, what may be said of it, and how anybody can check.
        </Step>
      </ol>
    </section>
  );
}

function ledeOf(session: DemoSession | null): string {
  const roles = 'You are proctor, listener and manager in turn, on this one computer.';
  if (session === null) return roles;
  const name = `Session ${session.number} of “${session.title}”`;
  switch (session.stage) {
    case 'open':
      return `${name} is ready. ${roles}`;
    case 'ended':
      return `${name} has ended; go on with step 4.`;
    case 'study-closed':
      return `${name} has been run and its study is closed; the report is there to read.`;
  }
}

function actOf(actor: DemoActor, to: string, word: string): ReactNode {
  return actor.isHere ? <LinkButton to={to}>{word}</LinkButton> : actor.signInButton(to);
}

type StepProps = { number: number; title: string; isDone?: boolean; act?: ReactNode; children: ReactNode };

/** What is done keeps its place and says so, and offers no act any more. */
function Step({ number, title, isDone = false, act, children }: StepProps) {
  return (
    <li className="grid grid-cols-[2rem_minmax(0,1fr)] gap-x-3 border-b border-rule py-4 last:border-b-0">
      <span aria-hidden="true" className="font-mono text-lg font-semibold">
        {number}
      </span>
      <div className="flex flex-col items-start gap-3">
        <div className="w-full">
          <h3 className="flex flex-wrap items-baseline justify-between gap-x-4 text-lg">
            {title}
            {isDone ? <StatusWord tone="held">Done</StatusWord> : null}
          </h3>
          <p className="text-soft">{children}</p>
        </div>
        {isDone ? null : act}
      </div>
    </li>
  );
}
