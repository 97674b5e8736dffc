import { useEffect, useMemo, useState } from 'react';
import type { GroupPowerAsked, GroupPowerSoFar } from './group-power-worker.ts';

/** While somebody types, nothing is simulated yet. */
const restMs = 400;

/** What a group's simulated studies find, as far as they have come; null before the first of them, and where none are asked. */
export function useGroupSimulation(asked: GroupPowerAsked | null): GroupPowerSoFar | null {
  const key = asked === null ? null : JSON.stringify(asked);
  const [soFar, setSoFar] = useState<{ key: string; value: GroupPowerSoFar } | null>(null);
  useEffect(() => {
    if (key === null) return;
    let worker: Worker | null = null;
    const timer = setTimeout(() => {
      worker = new Worker(new URL('./group-power-worker.ts', import.meta.url), { type: 'module' });
      worker.addEventListener('message', ({ data }: MessageEvent<GroupPowerSoFar>) => setSoFar({ key, value: data }));
      worker.postMessage(JSON.parse(key));
    }, restMs);
    return () => {
      clearTimeout(timer);
      worker?.terminate();
    };
  }, [key]);
  return useMemo(() => (soFar !== null && soFar.key === key ? soFar.value : null), [soFar, key]);
}

/** Half a study either way: a simulation promises neither all nor nothing. */
export const simulatedShare = (count: number, studies: number) => (count + 0.5) / (studies + 1);
