import type { KeyboardEvent, MouseEvent } from 'react';
import { Button } from '../../ui/button.tsx';
import { clockFace } from '../../ui/clock-face.ts';
import { useSecondsLeft } from '../../ui/seconds-left.ts';
import type { NextAct } from './next-act.ts';

type NextActButtonProps = { next: NextAct; clockOffsetMs: number; isLost: boolean; onPress: () => void };

/**
 * The next act: the largest button, and on the space bar. The last of a change waits for its time. The second click of
 * a double click and a key held down do nothing: by then the button says something else.
 */
export function NextActButton({ next, clockOffsetMs, isLost, onPress }: NextActButtonProps) {
  const seconds = useSecondsLeft(next.opensAt ?? 0, clockOffsetMs);
  const isWaiting = next.opensAt !== null && seconds > 0;
  const click = (event: MouseEvent) => {
    if (event.detail < 2) onPress();
  };
  const ignoreRepeats = (event: KeyboardEvent) => {
    if (event.repeat) event.preventDefault();
  };
  return (
    <Button
      variant="primary"
      size="large"
      disabled={isWaiting || isLost}
      keyHint="Space"
      data-next-act={true}
      data-step={next.step ?? undefined}
      onClick={click}
      onKeyDown={ignoreRepeats}
      className="text-2xl max-sm:[&_kbd]:hidden"
    >
      {isWaiting ? `${next.waiting} ${clockFace(seconds)}` : next.label}
    </Button>
  );
}
