import { useCallback, useEffect, useState, useSyncExternalStore } from 'react';
import { type ProctorCommand, type ProctorView, proctorView } from '#shared/contracts/proctor-live.ts';
import { Problem } from '#shared/problem.ts';
import { type Live, type LiveSnapshot, openLive } from '../../lib/live.ts';

type WithoutVersion<C> = C extends unknown ? Omit<C, 'expectVersion'> : never;
export type ConsoleCommand = WithoutVersion<ProctorCommand>;

export type ConsoleActions = {
  /** Sends a command on the view as it is shown. Resolves to whether it was done. */
  readonly act: (command: ConsoleCommand) => Promise<boolean>;
  readonly isBusy: boolean;
  /** Why the last command was refused, in words; null when it was not. */
  readonly problem: string | null;
  /** Takes those words back, so that an old refusal does not greet a new question. */
  readonly forgetProblem: () => void;
};

const nothing: LiveSnapshot<ProctorView> = { view: null, connection: 'connecting', refused: null, clockOffsetMs: 0 };

/** The live view of a session for its proctor. */
export function useConsole(sessionId: string): LiveSnapshot<ProctorView> & ConsoleActions {
  const [live, setLive] = useState<Live<ProctorView> | null>(null);
  useEffect(() => {
    const opened = openLive({ audience: 'proctor', sessionId }, (value) => proctorView.parse(value));
    setLive(opened);
    return () => opened.close();
  }, [sessionId]);

  const subscribe = useCallback((listener: () => void) => live?.subscribe(listener) ?? (() => {}), [live]);
  const snapshot = useSyncExternalStore(subscribe, () => live?.getSnapshot() ?? nothing);
  // The view that a command went out on. Once a newer one is shown, its acts are free, acknowledged or not.
  const [sentOn, setSentOn] = useState<number | null>(null);
  const isBusy = sentOn !== null && sentOn === snapshot.view?.version;
  const [problem, setProblem] = useState<string | null>(null);

  const act = async (command: ConsoleCommand): Promise<boolean> => {
    if (live === null || snapshot.view === null) return false;
    setSentOn(snapshot.view.version);
    setProblem(null);
    try {
      await live.send({ ...command, expectVersion: snapshot.view.version });
      return true;
    } catch (error) {
      if (!(error instanceof Problem)) throw error;
      // The newer view is already on the screen; what was pressed was meant for the older one.
      if (error.code !== 'stale-view') setProblem(error.message);
      return false;
    } finally {
      setSentOn((latest) => (latest === snapshot.view?.version ? null : latest));
    }
  };
  const forgetProblem = useCallback(() => setProblem(null), []);
  return { ...snapshot, act, isBusy, problem, forgetProblem };
}
