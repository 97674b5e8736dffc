import { Button } from '../../ui/button.tsx';
import { clockFace } from '../../ui/clock-face.ts';
import { useSecondsLeft } from '../../ui/seconds-left.ts';
import type { NextAct } from './next-act.ts';

type NextActButtonProps = { next: NextAct; clockOffsetMs: number; onPress: () => void };

/** The next act: the largest button, and on the space bar. The last of a change waits for its time. */
export function NextActButton({ next, clockOffsetMs, onPress }: NextActButtonProps) {
  const seconds = useSecondsLeft(next.opensAt ?? 0, clockOffsetMs);
  const isWaiting = next.opensAt !== null && seconds > 0;
  return (
    <Button
      variant="primary"
      size="large"
      disabled={isWaiting}
      keyHint="Space"
      data-step={next.step ?? undefined}
      onClick={onPress}
      className="text-2xl"
    >
      {isWaiting ? `Listening starts in ${clockFace(seconds)}` : next.label}
    </Button>
  );
}
