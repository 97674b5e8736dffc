import { useEffect, useRef, useState } from 'react';
import type { SearchAsked, SearchFound } from './plan-search.ts';

export type PlanSearch = {
  found: SearchFound | null;
  /** Whether it answers what is asked now. */
  isCurrent: boolean;
  /** The last question could not be answered, or not be asked at all. */
  hasFailed: boolean;
};

/**
 * The newest answer of the search, and whether it is the one to what is asked now. One worker answers one question at a
 * time; while it does, only the newest of the others waits.
 */
export function usePlanSearch(asked: SearchAsked | null): PlanSearch {
  const [found, setFound] = useState<SearchFound | null>(null);
  const [hasFailed, setFailed] = useState(false);
  const worker = useRef<Worker | null>(null);
  const state = useRef<{ isBusy: boolean; waiting: SearchAsked | null }>({ isBusy: false, waiting: null });

  useEffect(() => {
    const own = new Worker(new URL('./plan-search-worker.ts', import.meta.url), { type: 'module' });
    worker.current = own;
    state.current = { isBusy: false, waiting: null };
    const goOn = () => {
      const { waiting } = state.current;
      state.current = { isBusy: waiting !== null, waiting: null };
      if (waiting !== null) own.postMessage(waiting);
    };
    own.addEventListener('message', ({ data }: MessageEvent<SearchFound>) => {
      setFailed(false);
      setFound(data);
      goOn();
    });
    own.addEventListener('error', () => {
      setFailed(true);
      goOn();
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
  return {
    found: isSameMethod ? found : null,
    isCurrent: found !== null && JSON.stringify(found.asked) === key,
    hasFailed,
  };
}
