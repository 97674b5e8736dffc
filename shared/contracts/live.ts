import type { ProblemBody } from '../problem.ts';
import type { HeldAnswer, ListenerView } from './listener-live.ts';
import type { ObserverView } from './observer-live.ts';
import type { ProctorView } from './proctor-live.ts';

/** What a socket says of itself when it connects. A proctor is known by the signed-in cookie. */
export type LiveAuth =
  | { audience: 'listener'; token: string }
  | { audience: 'proctor'; sessionId: string }
  | { audience: 'observer'; token: string };

export type Acknowledgement = { ok: true; held?: HeldAnswer } | { ok: false; problem: ProblemBody };

/** `command` is parsed by the audience's schema (listenerCommand or proctorCommand) before anything else happens. */
export type ClientToServer = { command: (command: unknown, acknowledge: (answer: Acknowledgement) => void) => void };
export type ServerToClient = {
  view: (view: ListenerView | ProctorView | ObserverView) => void;
  closed: (problem: ProblemBody) => void;
};
