import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { type Fatigue, fatigues } from '#shared/contracts/remarks.ts';
import { Button } from '../ui/button.tsx';
import { Countdown } from '../ui/countdown.tsx';
import { capitalised } from './answers.ts';
import { remarkAbout } from './remarks.ts';
import type { Seat, SeatSnapshot } from './seat.ts';

type BreakPageProps = { seat: Seat; pause: NonNullable<ListenerView['break']>; snapshot: SeatSnapshot };

/** The break after a block: how long it lasts, and how the listener feels. */
export function BreakPage({ seat, pause, snapshot }: BreakPageProps) {
  const own = remarkAbout(snapshot.remarks, `break/${pause.number}`);
  const isSaid = own !== null || pause.held !== null;
  const felt = own?.command.kind === 'fatigue' ? own.command.fatigue : null;
  return (
    <div className="flex flex-1 flex-col justify-center gap-6 py-4">
      <div className="flex flex-col items-center gap-3 text-center">
        <h1 className="text-2xl">Break</h1>
        <p className="text-xl text-soft">
          Rest your ears. It goes on in{' '}
          <Countdown deadlineMs={pause.leastEndsAt} clockOffsetMs={snapshot.clockOffsetMs} /> at the earliest.
        </p>
      </div>
      {isSaid ? (
        <p role="status" className="text-center text-xl">
          {own?.state === 'here'
            ? 'Still on this phone. It is sent by itself.'
            : `${felt === null ? 'Your answer is' : `${capitalised(felt)},`} held by the server.`}
        </p>
      ) : (
        <fieldset className="flex flex-col gap-3">
          <legend className="mb-3 w-full text-center text-xl">How do you feel?</legend>
          {fatigues.map((fatigue: Fatigue) => (
            <Button key={fatigue} size="touch" onClick={() => seat.sayFatigue(pause.number, fatigue)}>
              {capitalised(fatigue)}
            </Button>
          ))}
        </fieldset>
      )}
    </div>
  );
}
