import { useState } from 'react';
import { Problem } from '#shared/problem.ts';
import { Button } from '../ui/button.tsx';
import type { Seat } from './seat.ts';

/** Always there: "Too loud", and apart from it the way out, which asks once. */
export function LoudAndLeave({ seat }: { seat: Seat }) {
  const [isAsking, setAsking] = useState(false);
  const [note, setNote] = useState('');
  const attempt = (work: Promise<void>, failed: string) => {
    work.catch((error: unknown) => {
      if (!(error instanceof Problem)) throw error;
      setNote(error.code === 'unreachable' ? failed : error.message);
    });
  };
  if (isAsking)
    return (
      <footer className="flex flex-col gap-3 px-5 pb-5">
        <p>Leave for good? Answers of locked trials stay in the record; later trials go on without you.</p>
        <Button size="touch" onClick={() => setAsking(false)}>
          Stay
        </Button>
        <Button
          variant="stop"
          size="touch"
          onClick={() => attempt(seat.leave(), 'The server cannot be reached. Tell the proctor that you leave.')}
        >
          Leave now
        </Button>
      </footer>
    );
  return (
    <footer className="flex flex-col gap-1 px-5 pb-5">
      <p role="alert" className="text-amber empty:hidden">
        {note}
      </p>
      <Button
        size="touch"
        onClick={() => attempt(seat.tooLoud(), 'This could not be sent. Raise your hand and say so.')}
      >
        Too loud
      </Button>
      <button type="button" onClick={() => setAsking(true)} className="mt-3 min-h-11 self-center text-soft underline">
        Leave the session
      </button>
    </footer>
  );
}
