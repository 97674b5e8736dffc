import { useState } from 'react';
import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { Problem } from '#shared/problem.ts';
import { Button } from '../ui/button.tsx';
import { Question } from './question.tsx';
import type { Seat } from './seat.ts';

type Trial = NonNullable<ListenerView['trial']>;
type Requests = NonNullable<Trial['requests']>;

const timesWords = (times: number) =>
  times === 0 ? 'not heard yet' : `heard ${times === 1 ? 'once' : times === 2 ? 'twice' : `${times} times`}`;

function titleOf({ labels, takesAnswers }: Requests): string {
  if (takesAnswers) return 'Hear again, or answer?';
  return labels.every(({ times }) => times === 0) ? 'What do you want to hear?' : 'What do you want to hear next?';
}

function leftWords({ left, takesAnswers, labels }: Requests): string {
  const more = left === 1 ? 'You can hear one more.' : `You can hear ${left} more.`;
  const unheard = labels.filter(({ times }) => times === 0).map(({ label }) => label);
  return takesAnswers
    ? more
    : `${more} Answers open once ${unheard.join(' and ')} ${unheard.length === 1 ? 'was' : 'were'} heard.`;
}

type AskingProps = {
  view: ListenerView;
  requests: Requests;
  seat: Seat;
  onAnswer: Parameters<typeof Question>[0]['onSend'];
};

/** This listener's turn: to ask for what is heard next, or to answer. */
export function Asking({ view, requests, seat, onAnswer }: AskingProps) {
  const [isAnswering, setAnswering] = useState(false);
  if (requests.takesAnswers && (isAnswering || requests.left === 0))
    return (
      <>
        <Question question={view.question} own={null} onSend={onAnswer} />
        {requests.left === 0 ? null : (
          <Button variant="quiet" size="touch" className="mb-2" onClick={() => setAnswering(false)}>
            Hear something again
          </Button>
        )}
      </>
    );
  return <Ask requests={requests} seat={seat} isPaused={view.paused !== null} onDone={() => setAnswering(true)} />;
}

type AskProps = { requests: Requests; seat: Seat; isPaused: boolean; onDone: () => void };

function Ask({ requests, seat, isPaused, onDone }: AskProps) {
  const [asked, setAsked] = useState<string | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const ask = (label: string) => {
    setAsked(label);
    setProblem(null);
    seat
      .request(label)
      .catch((error: unknown) => {
        if (!(error instanceof Problem)) throw error;
        setProblem(error.message);
      })
      .finally(() => setAsked(null));
  };
  return (
    <div className="flex flex-1 flex-col gap-4 py-4 [@media(max-height:699px)]:gap-2 [@media(max-height:699px)]:py-2">
      <h1 className="text-2xl [@media(max-height:699px)]:text-xl">{titleOf(requests)}</h1>
      <ul className="-mx-5 border-t-2 border-edge">
        {requests.labels.map(({ label, times, canRequest }) => (
          <li key={label} className="border-b-2 border-edge">
            <button
              type="button"
              disabled={!canRequest || isPaused || asked !== null}
              onClick={() => ask(label)}
              className="flex min-h-22 w-full cursor-pointer flex-wrap items-center gap-x-5 px-5 py-2 text-left focus-visible:outline-3 focus-visible:-outline-offset-4 focus-visible:outline-ink disabled:cursor-default disabled:text-soft"
            >
              <span aria-hidden="true" className="min-w-[2.75rem] text-[3.5rem] leading-none font-bold">
                {label}
              </span>
              <span className="min-w-0">
                <span className="block text-xl">{asked === label ? `Asking for ${label}` : `Hear ${label}`}</span>{' '}
                <span className="block text-soft">{timesWords(times)}</span>
              </span>
            </button>
          </li>
        ))}
      </ul>
      <p className="text-soft">{leftWords(requests)}</p>
      <p role="alert" className="font-bold text-amber empty:hidden">
        {problem}
      </p>
      {requests.takesAnswers ? (
        <Button variant="primary" size="touch" className="mt-auto mb-2" onClick={onDone}>
          Answer
        </Button>
      ) : null}
    </div>
  );
}
