import { useState } from 'react';
import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { answerTo, shortOf } from './answers.ts';
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
  const isAnswering = trial?.stage === 'answering' && trial.takesPart;
  if (view.break !== null) return <BreakPage seat={seat} pause={view.break} snapshot={snapshot} />;
  if (isAnswering) return <Answering key={trial.number} view={view} snapshot={snapshot} seat={seat} />;
  return (
    <div className="flex flex-1 flex-col" role="status">
      {saidBy(view, snapshot, paused)}
    </div>
  );
}

function saidBy(view: ListenerView, snapshot: SeatSnapshot, paused: ListenerView['paused']) {
  const { trial } = view;
  if (paused !== null) return <Words {...pauseWords[paused]} />;
  if (trial === null) return <Words {...waitingWords(view, snapshot)} />;
  if (!trial.takesPart)
    return <Words title="One moment" detail="This trial began without you. You take part from the next one on." />;
  if (trial.stage === 'listening') return <Hearing trial={trial} announcement={view.question.announcement} />;
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
  return (
    <Question
      question={view.question}
      own={own}
      onSend={(choice, confidence) => {
        setChanging(false);
        seat.answer(choice, confidence);
      }}
    />
  );
}
