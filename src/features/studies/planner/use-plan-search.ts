import { useEffect, useRef, useState } from 'react';
import type { SearchAsked, SearchFound } from './plan-search.ts';

/**
 * The newest answer of the search, and whether it is the one to what is asked now. One worker answers one question at a
 * time; while it does, only the newest of the others waits.
 */
export function usePlanSearch(asked: SearchAsked | null): { found: SearchFound | null; isCurrent: boolean } {
  const [found, setFound] = useState<SearchFound | null>(null);
  const worker = useRef<Worker | null>(null);
  const state = useRef<{ isBusy: boolean; waiting: SearchAsked | null }>({ isBusy: false, waiting: null });

  useEffect(() => {
    const own = new Worker(new URL('./plan-search-worker.ts', import.meta.url), { type: 'module' });
    worker.current = own;
    state.current = { isBusy: false, waiting: null };
    own.addEventListener('message', ({ data }: MessageEvent<SearchFound>) => {
      setFound(data);
      const { waiting } = state.current;
      state.current = { isBusy: waiting !== null, waiting: null };
      if (waiting !== null) own.postMessage(waiting);
    });
    return () => own.terminate();
  }, []);

  const key = asked === null ? null : JSON.stringify(asked);
  useEffect(() => {
    if (key === null) return;
    const next: SearchAsked = JSON.parse(key);
    if (state.current.isBusy) state.current.waiting = next;
    else {
      state.current.isBusy = true;
      worker.current?.postMessage(next);
    }
  }, [key]);

  const isSameMethod = found !== null && asked !== null && found.asked.method === asked.method;
  return { found: isSameMethod ? found : null, isCurrent: found !== null && JSON.stringify(found.asked) === key };
}
