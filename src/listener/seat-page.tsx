import { useEffect, useState, useSyncExternalStore } from 'react';
import type { Problem } from '#shared/problem.ts';
import { Button } from '../ui/button.tsx';
import { buttonLook } from '../ui/button-look.ts';
import { EndPage } from './end-page.tsx';
import { LoudAndLeave } from './loud-and-leave.tsx';
import { PhonePage } from './phone-page.tsx';
import type { Seat } from './seat.ts';
import { SeatHead } from './seat-head.tsx';
import { SeatNow } from './seat-now.tsx';
import { useWakeLock } from './wake-lock.ts';
import { Words } from './words.tsx';

/** A seat, from joining to the end. */
export function SeatPage({ seat }: { seat: Seat }) {
  const snapshot = useSyncExternalStore(seat.subscribe, seat.getSnapshot);
  useWakeLock();
  const { view, refused, alarm } = snapshot;
  if (refused !== null) return <Refused problem={refused} />;
  if (view === null) return <Finding />;
  const alarmed = alarm === null ? null : <Alarm text={alarm} onTold={() => seat.dismissAlarm()} />;
  if (view.left || view.phase === 'finished' || view.phase === 'abandoned')
    return <EndPage seat={seat} view={view} snapshot={snapshot} alarm={alarmed} />;
  const head = <SeatHead view={view} isLost={snapshot.connection === 'lost'} clockOffsetMs={snapshot.clockOffsetMs} />;
  return (
    <PhonePage header={head} footer={<LoudAndLeave seat={seat} />}>
      {alarmed ?? <SeatNow view={view} snapshot={snapshot} seat={seat} />}
    </PhonePage>
  );
}

/** Takes the whole page: what it says is the one thing that a listener must not overlook. */
function Alarm({ text, onTold }: { text: string; onTold: () => void }) {
  return (
    <div role="alert" className="my-2 flex flex-1 flex-col justify-center gap-5 border-l-[5px] border-amber pl-4">
      <h1 className="text-2xl text-amber">Tell the proctor now</h1>
      <p className="text-xl">{text}</p>
      <p className="text-soft">This phone keeps what it sent and lists it with the receipts.</p>
      <Button size="touch" onClick={onTold}>
        I have told the proctor
      </Button>
    </div>
  );
}

const patienceMs = 5_000;

function Finding() {
  const [isSlow, setSlow] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setSlow(true), patienceMs);
    return () => clearTimeout(timer);
  }, []);
  return (
    <PhonePage>
      <div role="status" className="flex flex-1 flex-col">
        {isSlow ? (
          <Words
            title="The server cannot be reached"
            detail="Your seat and your answers are kept. Check that this phone is on the room’s network; this page keeps trying by itself."
          />
        ) : (
          <Words title="Finding your seat" detail="This takes a moment." />
        )}
      </div>
    </PhonePage>
  );
}

function Refused({ problem }: { problem: Problem }) {
  const title = problem.code === 'not-found' ? 'This link leads to no seat' : 'This seat cannot be opened';
  return (
    <PhonePage>
      <Words title={title} detail={problem.message} />
      <a href="/listen" className={buttonLook('primary', 'touch', 'mb-6')}>
        Enter a session code
      </a>
    </PhonePage>
  );
}
