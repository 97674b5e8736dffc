import { useEffect } from 'react';

/** Keeps the screen on while the page is shown, where the browser can. Over plain http it cannot. */
export function useWakeLock(): void {
  useEffect(() => {
    if (!('wakeLock' in navigator)) return;
    let lock: WakeLockSentinel | null = null;
    let isOver = false;
    const ask = () => {
      if (document.visibilityState !== 'visible' || isOver) return;
      navigator.wakeLock.request('screen').then(
        (given) => {
          lock = given;
          if (isOver) void given.release();
        },
        // Refused, for example on a low battery: the phone may then darken, and comes back where it was.
        () => {
          lock = null;
        },
      );
    };
    ask();
    document.addEventListener('visibilitychange', ask);
    return () => {
      isOver = true;
      document.removeEventListener('visibilitychange', ask);
      void lock?.release();
    };
  }, []);
}
