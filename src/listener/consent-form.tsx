import { type FormEvent, type ReactNode, useState } from 'react';
import type { OpenSession } from '#shared/contracts/seats.ts';
import { Button } from '../ui/button.tsx';

type ConsentFormProps = {
  session: OpenSession;
  busy: boolean;
  problem: string | null;
  onTake: (place: string) => void;
  onBack: () => void;
};

function Tick({
  isTicked,
  onChange,
  children,
}: {
  isTicked: boolean;
  onChange: (ticked: boolean) => void;
  children: ReactNode;
}) {
  return (
    <label className="flex min-h-14 cursor-pointer items-center gap-4">
      <input
        type="checkbox"
        checked={isTicked}
        onChange={(event) => onChange(event.target.checked)}
        className="size-7 shrink-0 accent-copper"
      />
      <span>{children}</span>
    </label>
  );
}

/** What the session is and what taking part means; a seat is taken by agreeing. */
export function ConsentForm({ session, busy, problem, onTake, onBack }: ConsentFormProps) {
  const [isAdult, setAdult] = useState(false);
  const [hasAgreed, setAgreed] = useState(false);
  const [place, setPlace] = useState('');
  const [wasTried, setTried] = useState(false);
  const isReady = isAdult && hasAgreed;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    setTried(true);
    if (isReady) onTake(place);
  };
  const note = problem ?? (wasTried && !isReady ? 'Tick both boxes to take the seat.' : null);
  return (
    <form onSubmit={submit} noValidate className="flex flex-1 flex-col gap-5 py-8">
      <div>
        <p className="text-soft">{session.room}</p>
        <h1 className="text-3xl">{session.title}</h1>
      </div>
      <p>
        You hear cables, one after the other, without seeing them, and say what you hear. {session.trials} trials, about{' '}
        {session.minutes} minutes.
      </p>
      {session.running ? (
        <p className="text-amber">The session has begun; you take part from the next trial on.</p>
      ) : null}
      <ul className="flex list-disc flex-col gap-2 pl-5 text-soft">
        <li>Your answers are recorded under a seat label, without your name.</li>
        <li>You may stop whenever you like. An answer cannot be taken back once its trial has locked.</li>
        <li>If it is too loud, press “Too loud”: the session pauses at once. Say so if your ears ring or hurt.</li>
      </ul>
      <label className="flex flex-col gap-2">
        <span className="font-bold">Where do you sit? (may be left empty)</span>
        <input
          value={place}
          onChange={(event) => setPlace(event.target.value)}
          maxLength={24}
          placeholder="Front left"
          autoComplete="off"
          className="min-h-14 rounded border-2 border-edge bg-sheet px-4 placeholder:text-soft"
        />
      </label>
      <div>
        <Tick isTicked={isAdult} onChange={setAdult}>
          I am an adult
        </Tick>
        <Tick isTicked={hasAgreed} onChange={setAgreed}>
          I agree to take part
        </Tick>
      </div>
      <p role="status" className="text-amber empty:hidden">
        {note}
      </p>
      <Button type="submit" variant="primary" size="touch" busy={busy}>
        Take the seat
      </Button>
      <Button size="touch" onClick={onBack}>
        Another code
      </Button>
    </form>
  );
}
