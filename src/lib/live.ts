import { io, type Socket } from 'socket.io-client';
import type { Acknowledgement, ClientToServer, LiveAuth, ServerToClient } from '#shared/contracts/live.ts';
import { Problem, type ProblemBody } from '#shared/problem.ts';

/** Where a live page stands: the latest whole view, and whether the server can be heard now. */
export type LiveSnapshot<View> = {
  readonly view: View | null;
  readonly connection: 'connecting' | 'connected' | 'lost';
  /** Why the server will not serve this page any more. */
  readonly refused: Problem | null;
  /** Add to Date.now() to get the server's time, in milliseconds. */
  readonly clockOffsetMs: number;
};

export type Live<View> = {
  readonly subscribe: (listener: () => void) => () => void;
  readonly getSnapshot: () => LiveSnapshot<View>;
  /** Sends one command and waits for its acknowledgement. @throws Problem when refused or unreachable */
  readonly send: (command: object, timeoutMs?: number) => Promise<Extract<Acknowledgement, { ok: true }>>;
  readonly close: () => void;
};

/**
 * A live view of a session. Views come whole, so reconnecting is receiving one view; the browser's own signals
 * (page shown again, network back) hasten the next attempt.
 *
 * @param read parses what arrives; a view that cannot be read is refused rather than shown in part
 */
export function openLive<View extends { now: number }>(auth: LiveAuth, read: (value: unknown) => View): Live<View> {
  const socket: Socket<ServerToClient, ClientToServer> = io({
    auth,
    transports: ['websocket', 'polling'],
    reconnectionDelay: 500,
    reconnectionDelayMax: 3_000,
    randomizationFactor: 0.3,
    timeout: 5_000,
  });
  let snapshot: LiveSnapshot<View> = { view: null, connection: 'connecting', refused: null, clockOffsetMs: 0 };
  const listeners = new Set<() => void>();
  const update = (change: Partial<LiveSnapshot<View>>) => {
    snapshot = { ...snapshot, ...change };
    for (const listener of listeners) listener();
  };
  const refuse = (body: unknown) => {
    update({ refused: Problem.fromBody(body), connection: 'lost' });
    socket.close();
  };

  socket.on('view', (value: unknown) => {
    const view = read(value);
    update({ view, connection: 'connected', clockOffsetMs: view.now - Date.now() });
  });
  socket.on('closed', (body: ProblemBody) => refuse(body));
  socket.on('disconnect', () => update({ connection: 'lost' }));
  socket.on('connect_error', (error: Error & { data?: unknown }) => {
    if (error.data !== undefined) refuse(error.data);
    else update({ connection: snapshot.view === null ? 'connecting' : 'lost' });
  });

  const hasten = () => {
    if (document.visibilityState === 'visible' && !socket.connected && snapshot.refused === null) socket.connect();
  };
  const lose = () => socket.io.engine?.close();
  document.addEventListener('visibilitychange', hasten);
  window.addEventListener('online', hasten);
  window.addEventListener('offline', lose);

  return {
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    getSnapshot: () => snapshot,
    send: async (command, timeoutMs = 5_000) => {
      if (!socket.connected) throw new Problem('unreachable', 'The server cannot be reached just now.');
      const answer = await socket
        .timeout(timeoutMs)
        .emitWithAck('command', command)
        .catch(() => {
          throw new Problem(
            'unreachable',
            'The server did not answer. It may have the command; look before you repeat it.',
          );
        });
      if (!answer.ok) throw Problem.fromBody(answer.problem);
      return answer;
    },
    close: () => {
      document.removeEventListener('visibilitychange', hasten);
      window.removeEventListener('online', hasten);
      window.removeEventListener('offline', lose);
      socket.close();
    },
  };
}
