import { useCallback, useEffect, useState, useSyncExternalStore } from 'react';
import { type ObserverCommand, type ObserverView, observerView } from '#shared/contracts/observer-live.ts';
import { type Live, type LiveSnapshot, openLive } from '../../lib/live.ts';

const nothing: LiveSnapshot<ObserverView> = { view: null, connection: 'connecting', refused: null, clockOffsetMs: 0 };

/** The live view of a session for a witness. */
export function useObserving(token: string) {
  const [live, setLive] = useState<Live<ObserverView> | null>(null);
  useEffect(() => {
    const opened = openLive({ audience: 'observer', token }, (value) => observerView.parse(value));
    setLive(opened);
    return () => opened.close();
  }, [token]);
  const subscribe = useCallback((listener: () => void) => live?.subscribe(listener) ?? (() => {}), [live]);
  const snapshot = useSyncExternalStore(subscribe, () => live?.getSnapshot() ?? nothing);
  const send = async (command: ObserverCommand): Promise<void> => {
    await live?.send(command);
  };
  return { ...snapshot, send };
}
