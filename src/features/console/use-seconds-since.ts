import { useEffect, useState } from 'react';

const beatMs = 500;

const secondsSince = (sinceMs: number, clockOffsetMs: number) =>
  Math.max(0, Math.floor((Date.now() + clockOffsetMs - sinceMs) / 1000));

/** Whole seconds since a moment of the server's clock; re-renders only when the figure changes. */
export function useSecondsSince(sinceMs: number, clockOffsetMs: number): number {
  const [seconds, setSeconds] = useState(() => secondsSince(sinceMs, clockOffsetMs));
  useEffect(() => {
    const look = () => setSeconds(secondsSince(sinceMs, clockOffsetMs));
    look();
    const timer = setInterval(look, beatMs);
    return () => clearInterval(timer);
  }, [sinceMs, clockOffsetMs]);
  return seconds;
}
