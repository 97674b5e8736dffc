import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Button } from '../../ui/button.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import { useSecondsSince } from './use-seconds-since.ts';

type SeatRowProps = {
  seat: ProctorView['seats'][number];
  clockOffsetMs: number;
  /** Null where nobody can be excused. */
  onExcuse: (() => void) | null;
};

const words = { ready: 'ready', answered: 'answered', left: 'has left' } as const;
const tones = { ready: 'held', answered: 'held', left: 'neutral' } as const;

/** One listener: the label, where they sit, and how they stand. */
export function SeatRow({ seat, clockOffsetMs, onExcuse }: SeatRowProps) {
  return (
    <li className="flex min-h-14 items-center gap-x-3 border-b border-rule py-1">
      <span className="font-mono text-soft">{seat.seat}</span>
      <span className="min-w-0 flex-1">
        {seat.place}
        {seat.late ? <span className="block text-amber">one answer late</span> : null}
      </span>
      {seat.state === 'away' ? (
        <Away sinceMs={seat.awaySince} clockOffsetMs={clockOffsetMs} />
      ) : (
        <StatusWord tone={tones[seat.state]}>{words[seat.state]}</StatusWord>
      )}
      {onExcuse === null ? null : (
        <Button
          variant="quiet"
          aria-label={`Excuse ${seat.seat}`}
          className="-mr-1 px-1! text-soft hover:text-ink"
          onClick={onExcuse}
        >
          Excuse
        </Button>
      )}
    </li>
  );
}

function Away({ sinceMs, clockOffsetMs }: { sinceMs: number | null; clockOffsetMs: number }) {
  const seconds = useSecondsSince(sinceMs ?? 0, clockOffsetMs);
  if (sinceMs === null) return <StatusWord tone="amber">away</StatusWord>;
  const since = seconds < 90 ? `${seconds} s` : `${Math.floor(seconds / 60)} min`;
  return <StatusWord tone="amber">{`away ${since}`}</StatusWord>;
}
