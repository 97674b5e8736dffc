import { type Ref, useEffect, useRef, useState } from 'react';
import { Problem } from '#shared/problem.ts';
import { Button } from '../ui/button.tsx';
import type { Seat } from './seat.ts';

/** How long a note stays: by then it has been read, or the button is pressed again. */
const noteMs = 12_000;

/** Always there: "Too loud", and apart from it the way out, which asks once. */
export function LoudAndLeave({ seat }: { seat: Seat }) {
  const dialog = useRef<HTMLDialogElement>(null);
  const [note, setNote] = useState('');
  useEffect(() => {
    if (note === '') return;
    const timer = setTimeout(() => setNote(''), noteMs);
    return () => clearTimeout(timer);
  }, [note]);
  const attempt = (work: Promise<void>, whenUnreachable: string) => {
    setNote('');
    work.catch((error: unknown) => {
      if (!(error instanceof Problem)) throw error;
      setNote(error.code === 'unreachable' ? whenUnreachable : error.message);
    });
  };
  const leave = () => {
    dialog.current?.close();
    attempt(seat.leave(), 'Not sent. Tell the proctor that you leave.');
  };
  return (
    <footer className="flex flex-col px-5 pb-4 [@media(max-height:699px)]:pb-2">
      <p role="alert" className="min-h-7 text-amber">
        {note}
      </p>
      <Button size="touch" onClick={() => attempt(seat.tooLoud(), 'Not sent. Raise your hand and say so.')}>
        Too loud
      </Button>
      <button
        type="button"
        onClick={() => dialog.current?.showModal()}
        className="mt-4 min-h-11 cursor-pointer self-center px-4 text-soft underline underline-offset-4 [@media(max-height:699px)]:mt-1"
      >
        Leave the session
      </button>
      <LeaveDialog ref={dialog} onStay={() => dialog.current?.close()} onLeave={leave} />
    </footer>
  );
}

type LeaveDialogProps = { ref: Ref<HTMLDialogElement>; onStay: () => void; onLeave: () => void };

/** In the middle of the phone, away from the finger that opened it. */
function LeaveDialog({ ref, onStay, onLeave }: LeaveDialogProps) {
  return (
    <dialog
      ref={ref}
      aria-labelledby="leave-title"
      aria-describedby="leave-consequence"
      className="m-auto w-[calc(100vw-2rem)] max-w-[26rem] rounded border border-edge bg-page p-6 text-ink shadow-float backdrop:bg-veil"
    >
      <h2 id="leave-title" className="text-2xl">
        Leave for good?
      </h2>
      <p id="leave-consequence" className="mt-3">
        Answers of locked trials stay in the record. Later trials go on without you, and this seat cannot be taken
        again.
      </p>
      <div className="mt-6 flex flex-col gap-12">
        <Button size="touch" onClick={onStay}>
          Stay
        </Button>
        <Button variant="stop" size="touch" onClick={onLeave}>
          Leave now
        </Button>
      </div>
    </dialog>
  );
}
