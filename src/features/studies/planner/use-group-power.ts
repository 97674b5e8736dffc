import { useEffect, useMemo, useState } from 'react';
import type { GroupPowerAsked, GroupPowerSoFar } from './group-power-worker.ts';

/** While somebody types, nothing is simulated yet. */
const restMs = 400;

/** The simulated power of a group, as far as it has come; null before its first figures. */
export function useGroupPower(asked: GroupPowerAsked): GroupPowerSoFar | null {
  const key = JSON.stringify(asked);
  const [soFar, setSoFar] = useState<{ key: string; value: GroupPowerSoFar } | null>(null);
  useEffect(() => {
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
  return useMemo(() => (soFar?.key === key ? soFar.value : null), [soFar, key]);
}
