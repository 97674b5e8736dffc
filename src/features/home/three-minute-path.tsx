import type { ReactNode } from 'react';
import { LinkButton } from '../../ui/link-button.tsx';
import type { HomePlaces } from './home-places.ts';

/** The session that the path leads through. */
export type DemoSession = {
  readonly id: string;
  readonly studyId: string;
  readonly title: string;
  readonly number: number;
  readonly isOpen: boolean;
};

type ThreeMinutePathProps = {
  /** Null for whoever may not see sessions; the path then leads by the start page. */
  session: DemoSession | null;
  /** Who the path needs, and whether that person is signed in now. */
  proctor: DemoActor;
  manager: DemoActor;
  places: HomePlaces;
};

export type DemoActor = {
  readonly name: string;
  readonly isHere: boolean;
  /** Renders the button that signs this person in and goes on to an address. */
  readonly signInButton: (to: string) => ReactNode;
};

/** For a visitor alone with one computer: a whole session, from the console to the report. */
export function ThreeMinutePath({ session, proctor, manager, places }: ThreeMinutePathProps) {
  const consoleTo = session === null ? places.start : places.console(session.id);
  const studyTo = session === null ? places.start : places.study(session.studyId);
  const reportTo = session === null ? places.start : places.report(session.studyId);
  const hasEnded = session !== null && !session.isOpen;
  return (
    <section aria-labelledby="three-minutes" className="border-t-2 border-ink pt-5">
      <h2 id="three-minutes" className="text-xl">
        See it work in three minutes
      </h2>
      <p className="pt-1 text-soft">{ledeOf(session)}</p>
      <ol className="pt-3">
        <Step number={1} title="Open the console as the proctor" act={act(proctor, consoleTo, 'Open the console')}>
          {proctor.name} leads the session and sees blind codes only.
        </Step>
        <Step number={2} title="Open listeners here">
          In the console, press “Open a listener here” once for each listener; two make it lively. Every one is a window
          of its own: consent in each.
        </Step>
        <Step number={3} title="Run five short trials">
          Follow the console, one step at a time, and answer in the listeners’ windows. Guessing is fine; there is no
          cable to hear.
        </Step>
        <Step number={4} title="Close the study as the manager" act={act(manager, studyTo, 'Open the study')}>
          {manager.name} closes it. Only then are the secrets opened and the answers counted, once.
        </Step>
        <Step number={5} title="Read the report" act={hasEnded ? act(manager, reportTo, 'Read the report') : undefined}>
          It says what was found, what may be said of it, and how anybody can check.
        </Step>
      </ol>
    </section>
  );
}

function ledeOf(session: DemoSession | null): string {
  if (session === null) return 'You are proctor, listener and manager in turn, on this one computer.';
  const name = `Session ${session.number} of “${session.title}”`;
  return session.isOpen
    ? `${name} is ready. You are proctor, listener and manager in turn, on this one computer.`
    : `${name} has ended; go on from step 4.`;
}

function act(actor: DemoActor, to: string, word: string): ReactNode {
  return actor.isHere ? <LinkButton to={to}>{word}</LinkButton> : actor.signInButton(to);
}

type StepProps = { number: number; title: string; act?: ReactNode; children: ReactNode };

function Step({ number, title, act, children }: StepProps) {
  return (
    <li className="grid grid-cols-[2rem_minmax(0,1fr)] gap-x-3 border-b border-rule py-4 last:border-b-0">
      <span aria-hidden="true" className="font-mono text-lg font-semibold">
        {number}
      </span>
      <div className="flex flex-col items-start gap-3">
        <div>
          <h3 className="text-lg">{title}</h3>
          <p className="text-soft">{children}</p>
        </div>
        {act}
      </div>
    </li>
  );
}
