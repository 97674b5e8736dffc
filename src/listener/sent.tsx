import { useEffect, useState } from 'react';
import { Button } from '../ui/button.tsx';
import { capitalised, type OwnAnswer } from './answers.ts';
import { Words } from './words.tsx';

const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', second: '2-digit' });

/** A second tap of the finger that sent the answer is not a wish to change it. */
const settleMs = 600;

function wordsOf({ state, heldAt, why }: OwnAnswer, short: string): { title: string; detail: string } {
  switch (state) {
    case 'held':
      return {
        title: `${capitalised(short)}, held by the server`,
        detail: `${heldAt === null ? '' : `${clock.format(heldAt)} · `}you can still change it`,
      };
    case 'here':
      return {
        title: `${capitalised(short)}, still on this phone`,
        detail: 'It is sent by itself when the network is back.',
      };
    case 'late':
      return { title: 'Too late', detail: why ?? 'This answer is not counted.' };
    case 'refused':
      return { title: 'Not taken', detail: why ?? 'The server did not take this answer. Please answer again.' };
  }
}

type SentProps = { own: OwnAnswer; short: string; onChange: () => void };

/** What became of the answer, in plain words. */
export function Sent({ own, short, onChange }: SentProps) {
  const [isSettled, setSettled] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(true), settleMs);
    return () => clearTimeout(timer);
  }, []);
  return (
    <div className="flex flex-1 flex-col">
      <Words {...wordsOf(own, short)}>{own.state === 'held' ? <p className="text-xl">Rest your ears.</p> : null}</Words>
      {own.state === 'late' ? null : (
        <Button size="touch" className="mb-4" disabled={!isSettled} onClick={onChange}>
          Change the answer
        </Button>
      )}
    </div>
  );
}
