import { useEffect, useRef, useState } from 'react';
import type { PersonalInvitation } from '#shared/contracts/personal-link.ts';
import { formatDateTimeIn } from '../lib/format.ts';
import { Button } from '../ui/button.tsx';
import { CalendarButton } from './calendar-button.tsx';

type InvitationProps = {
  invitation: PersonalInvitation;
  token: string;
  busy: boolean;
  problem: string | null;
  onAnswer: (coming: boolean) => void;
  onErase: () => void;
  /** Back to the seat that this link has taken. */
  onSeat: (token: string) => void;
};

/** When and where, what was answered, and what can be answered still. */
export function Invitation({ invitation, token, busy, problem, onAnswer, onErase, onSeat }: InvitationProps) {
  const { title, room, plannedAt, timeZone, minutes, trials, phase, seat } = invitation;
  const holdsSeat = invitation.state === 'invited' || invitation.state === 'accepted';
  const isPlanned = phase === 'planned';
  return (
    <div className="flex flex-1 flex-col gap-6 py-8">
      <div className="flex flex-col gap-2">
        <p className="text-soft">Listening session</p>
        <h1 className="text-3xl">{title}</h1>
      </div>
      <dl className="flex flex-col gap-3 border-t border-rule pt-4">
        <Fact label="When" value={formatDateTimeIn(plannedAt, timeZone)} />
        <Fact label="Where" value={room} />
        <Fact label="How long" value={`about ${minutes} minutes, ${trials} trials`} />
      </dl>
      <div role="status" className="flex flex-col gap-2 border-l-[5px] border-jacket pl-4">
        <h2 className="text-2xl">{headingOf(invitation)}</h2>
        <p className="text-lg text-soft">{detailOf(invitation)}</p>
      </div>
      <p role="alert" className="font-bold text-amber empty:hidden">
        {problem}
      </p>
      {seat !== null && phase === 'open' ? (
        <Button variant="primary" size="touch" onClick={() => onSeat(seat)}>
          Back to your seat
        </Button>
      ) : null}
      {isPlanned ? <Answers state={invitation.state} busy={busy} onAnswer={onAnswer} /> : null}
      {isPlanned && holdsSeat ? <CalendarButton token={token} /> : null}
      <EraseAddress busy={busy} onErase={onErase} />
    </div>
  );
}

function Fact({ label, value }: { label: string; value: string }) {
  return (
    <div className="flex flex-col">
      <dt className="text-soft">{label}</dt>
      <dd className="text-lg">{value}</dd>
    </div>
  );
}

function headingOf({ phase, state, waitingPlace, seat }: PersonalInvitation): string {
  if (phase === 'cancelled') return 'The session is cancelled';
  if (phase === 'over') return 'The session is over';
  if (phase === 'open' && seat !== null) return 'You have taken your seat';
  if (state === 'accepted') return 'You come';
  if (state === 'declined') return 'You do not come';
  if (state === 'waiting') return `You wait for a seat, at place ${waitingPlace}`;
  return 'A seat is kept for you';
}

function detailOf({ phase, state, seat }: PersonalInvitation): string {
  if (phase === 'cancelled') return 'It does not take place. There is nothing to do.';
  if (phase === 'over') return 'Thank you.';
  if (phase === 'open' && seat !== null) return 'The session is open. The link leads back to the seat at any time.';
  if (state === 'accepted')
    return 'Open this link again in the room: it is your seat. You can change your mind until the session begins.';
  if (state === 'declined')
    return 'Your seat is free for somebody else. You can change your mind until the session begins.';
  if (state === 'waiting') return 'Every seat is taken for now. You get a mail as soon as one is yours.';
  return 'Please say whether you come, so that the seat can go to somebody else if you do not.';
}

type AnswersProps = { state: PersonalInvitation['state']; busy: boolean; onAnswer: (coming: boolean) => void };

function Answers({ state, busy, onAnswer }: AnswersProps) {
  const canSayYes = state === 'invited' || state === 'declined';
  const canSayNo = state !== 'declined';
  return (
    <div className="flex flex-col gap-3">
      {canSayYes ? (
        <Button variant="primary" size="touch" busy={busy} onClick={() => onAnswer(true)}>
          {state === 'declined' ? 'I come after all' : 'I come'}
        </Button>
      ) : null}
      {canSayNo ? (
        <Button size="touch" busy={busy} onClick={() => onAnswer(false)}>
          {state === 'waiting' ? 'I do not wait any longer' : 'I do not come'}
        </Button>
      ) : null}
    </div>
  );
}

/** Asked once, in place: there is no way back. */
function EraseAddress({ busy, onErase }: { busy: boolean; onErase: () => void }) {
  const [isAsked, setAsked] = useState(false);
  const question = useRef<HTMLParagraphElement>(null);
  useEffect(() => {
    if (isAsked) question.current?.focus();
  }, [isAsked]);
  if (!isAsked)
    return (
      <Button variant="quiet" size="touch" className="mt-auto" onClick={() => setAsked(true)}>
        Have my address erased
      </Button>
    );
  return (
    <div className="mt-auto flex flex-col gap-3 border-t border-rule pt-5">
      <p ref={question} tabIndex={-1} className="outline-none">
        Your address is erased from this study and its mail. This link ends, a seat that is kept for you goes to
        somebody else, and you cannot be told of changes. What you have answered stays under a label.
      </p>
      <Button variant="stop" size="touch" busy={busy} onClick={onErase}>
        Erase my address
      </Button>
      <Button size="touch" onClick={() => setAsked(false)}>
        Keep it
      </Button>
    </div>
  );
}
