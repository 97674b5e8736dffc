import { useEffect, useState } from 'react';

const beatMs = 250;

/**
 * Whole seconds until a moment of the server's clock, never below 0. It looks four times a second and
 * re-renders only when the figure changes.
 *
 * @param deadlineMs the moment, in ms since 1970 by the server's clock
 * @param clockOffsetMs server's clock minus this device's clock
 */
export function useSecondsLeft(deadlineMs: number, clockOffsetMs = 0): number {
  const [seconds, setSeconds] = useState(() => secondsUntil(deadlineMs, clockOffsetMs));
  useEffect(() => {
    const look = () => setSeconds(secondsUntil(deadlineMs, clockOffsetMs));
    look();
    const timer = setInterval(look, beatMs);
    return () => clearInterval(timer);
  }, [deadlineMs, clockOffsetMs]);
  return seconds;
}

/** Rounded up, so that 0:00 means that the time is there. */
function secondsUntil(deadlineMs: number, clockOffsetMs: number): number {
  return Math.max(0, Math.ceil((deadlineMs - clockOffsetMs - Date.now()) / 1000));
}
