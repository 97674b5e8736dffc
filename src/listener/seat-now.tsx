import { useState } from 'react';
import type { Confidence, ListenerView } from '#shared/contracts/listener-live.ts';
import { answerTo, shortOf } from './answers.ts';
import { Asking } from './asking.tsx';
import { BreakPage } from './break-page.tsx';
import { Hearing } from './hearing.tsx';
import { Question } from './question.tsx';
import type { Seat, SeatSnapshot } from './seat.ts';
import { Sent } from './sent.tsx';
import { pauseWords, waitingWords } from './waiting-words.ts';
import { Words } from './words.tsx';

type SeatNowProps = { view: ListenerView; snapshot: SeatSnapshot; seat: Seat };

/** What the phone shows at this point of the session. Answers stay open during a pause. */
export function SeatNow({ view, snapshot, seat }: SeatNowProps) {
  const { trial, paused } = view;
  if (view.break !== null) return <BreakPage seat={seat} pause={view.break} snapshot={snapshot} />;
  if (trial !== null && hasTurn(view))
    return <Answering key={trial.number} view={view} snapshot={snapshot} seat={seat} />;
  return (
    <div className="flex flex-1 flex-col" role="status">
      {saidBy(view, snapshot, paused)}
    </div>
  );
}

/** Whether the phone has something for its listener to do. Answers stay open during a pause, asking does not. */
function hasTurn({ trial, paused }: ListenerView): boolean {
  if (trial === null || !trial.takesPart) return false;
  return (
    trial.stage === 'answering' ||
    (trial.stage === 'asking' && (paused === null || trial.requests?.takesAnswers === true))
  );
}

function saidBy(view: ListenerView, snapshot: SeatSnapshot, paused: ListenerView['paused']) {
  const { trial } = view;
  if (paused !== null) return <Words {...pauseWords[paused]} />;
  if (trial === null) return <Words {...waitingWords(view, snapshot)} />;
  if (!trial.takesPart)
    return <Words title="One moment" detail="This trial began without you. You take part from the next one on." />;
  if (trial.stage === 'listening') return <Hearing trial={trial} announcement={view.question.announcement} />;
  if (trial.requests !== null)
    return (
      <Words
        title={`You asked for ${trial.spoken}`}
        detail="It is being fitted, which takes as long every time. Rest your ears."
      />
    );
  return (
    <Words
      title="Rest your ears"
      detail={`The next cable is being fitted. Then you hear ${trial.spoken}${trial.familiarisation ? ', to get to know it' : ''}.`}
    />
  );
}

function Answering({ view, snapshot, seat }: SeatNowProps) {
  const own = answerTo(snapshot.answers, view.trial?.number);
  const [isChanging, setChanging] = useState(own === null);
  if (own !== null && !isChanging)
    return (
      <div className="flex flex-1 flex-col" role="status">
        <Sent
          key={own.revision}
          own={own}
          short={shortOf(view.question, own.choice)}
          onChange={() => setChanging(true)}
        />
      </div>
    );
  const send = (choice: string, confidence: Confidence | null) => {
    setChanging(false);
    seat.answer(choice, confidence);
  };
  const requests = view.trial?.requests ?? null;
  if (own === null && requests !== null) return <Asking view={view} requests={requests} seat={seat} onAnswer={send} />;
  return <Question question={view.question} own={own} onSend={send} />;
}
