import { type FormEvent, useEffect, useRef, useState } from 'react';
import type { OpenSession } from '#shared/contracts/seats.ts';
import { Button } from '../ui/button.tsx';
import { CheckboxField } from '../ui/checkbox-field.tsx';
import { TextField } from '../ui/text-field.tsx';

type ConsentFormProps = {
  session: Pick<OpenSession, 'title' | 'room' | 'minutes' | 'trials' | 'running' | 'rehearsal'>;
  /** By a personal link: the label is kept, and the address known. */
  isLinked?: boolean;
  busy: boolean;
  problem: string | null;
  onTake: (place: string) => void;
  /** To another code; whoever came by a personal link has none. */
  onBack?: () => void;
};

const linkedWords =
  'Your answers are recorded under a label that you keep in this study. Nobody is shown your e-mail address together with it, and you can have the address erased by your link.';

/** What the session is and what taking part means; a seat is taken by agreeing. */
export function ConsentForm({ session, isLinked = false, busy, problem, onTake, onBack }: ConsentFormProps) {
  const [isAdult, setAdult] = useState(false);
  const [hasAgreed, setAgreed] = useState(false);
  const [place, setPlace] = useState('');
  const [wasTried, setTried] = useState(false);
  const heading = useRef<HTMLHeadingElement>(null);
  const form = useRef<HTMLFormElement>(null);
  useEffect(() => heading.current?.focus(), []);

  const submit = (event: FormEvent) => {
    event.preventDefault();
    setTried(true);
    if (!isAdult || !hasAgreed) form.current?.querySelector<HTMLElement>('input[type=checkbox]:not(:checked)')?.focus();
    else if (!busy) onTake(place);
  };
  const missing = (isTicked: boolean, words: string) => (wasTried && !isTicked ? { error: words } : {});

  return (
    <form ref={form} onSubmit={submit} noValidate className="flex flex-1 flex-col gap-5 py-8">
      <div>
        <h1 ref={heading} tabIndex={-1} className="text-3xl outline-none">
          {session.title}
        </h1>
        <p className="mt-2 text-soft">
          {session.room} · {session.trials} trials · about {session.minutes} minutes
        </p>
      </div>
      <p>You hear cables, one after the other, without seeing them, and say what you hear.</p>
      {session.running ? (
        <p className="border-l-[5px] border-amber pl-4">
          The session has begun. You take part from the next trial on, and your phone’s random number does not count in
          the draw.
        </p>
      ) : null}
      <ul className="flex list-disc flex-col gap-2 pl-5 text-soft">
        {session.rehearsal ? (
          <li>This is a rehearsal: nothing that you answer is kept, and no cable is under test.</li>
        ) : (
          <>
            <li>{isLinked ? linkedWords : 'Your answers are recorded under a seat label, without your name.'}</li>
            <li>You can stop at any time. An answer cannot be withdrawn once its trial has locked.</li>
          </>
        )}
        <li>If it is too loud, press “Too loud”: the session pauses at once. Stop if your ears ring or hurt.</li>
      </ul>
      <TextField
        label="Where do you sit?"
        optional={true}
        hint="For the proctor, such as front left. It is not published."
        value={place}
        onChange={(event) => setPlace(event.target.value)}
        maxLength={24}
        autoComplete="off"
        className="[&_input]:min-h-14"
      />
      <div className="flex flex-col gap-1">
        <CheckboxField
          label="I am an adult"
          checked={isAdult}
          onChange={(event) => setAdult(event.target.checked)}
          className="[&>label]:min-h-14 [&>label]:items-center [&>label]:py-0"
          {...missing(isAdult, 'Only adults can take part.')}
        />
        <CheckboxField
          label="I agree to take part"
          checked={hasAgreed}
          onChange={(event) => setAgreed(event.target.checked)}
          className="[&>label]:min-h-14 [&>label]:items-center [&>label]:py-0"
          {...missing(hasAgreed, 'Please agree, or leave this page.')}
        />
      </div>
      <p role="alert" className="font-bold text-amber empty:hidden">
        {problem}
      </p>
      <Button type="submit" variant="primary" size="touch" busy={busy}>
        Take the seat
      </Button>
      {onBack === undefined ? null : (
        <Button variant="quiet" size="touch" onClick={onBack}>
          Use another code
        </Button>
      )}
    </form>
  );
}
