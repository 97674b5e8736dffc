import { useEffect, useEffectEvent } from 'react';
import { classNames } from './class-names.ts';
import { clockFace } from './clock-face.ts';
import { useSecondsLeft } from './seconds-left.ts';

type CountdownProps = {
  /** The moment, in ms since 1970 by the server's clock. */
  deadlineMs: number;
  /** Server's clock minus this device's clock, in ms. */
  clockOffsetMs?: number;
  /** Called once when the time is there. */
  onEnd?: () => void;
  className?: string;
};

/** Minutes and seconds left. Silent to screen readers; whoever shows it says in words what it waits for. */
export function Countdown({ deadlineMs, clockOffsetMs = 0, onEnd, className }: CountdownProps) {
  const seconds = useSecondsLeft(deadlineMs, clockOffsetMs);
  const end = useEffectEvent(() => onEnd?.());
  const isOver = seconds === 0;
  useEffect(() => {
    if (isOver) end();
  }, [isOver]);
  return (
    <span role="timer" aria-live="off" className={classNames('font-mono tabular-nums', className)}>
      {clockFace(seconds)}
    </span>
  );
}
