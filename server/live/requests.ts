import type { ListenerCommand } from '#shared/contracts/listener-live.ts';
import type { SessionCommand } from '#shared/session/decide.ts';
import { holdRequest } from '#shared/session/on-request.ts';
import { requestLeaf } from '#shared/session/request-leaf.ts';
import type { PresentationRequest } from '../features/sessions/request.entity.ts';
import type { SessionMemory } from './session-memory.ts';

export type RequestCommand = Extract<ListenerCommand, { kind: 'request-presentation' }>;

/** The row of a request as it is stored. */
export function requestRow(
  { session }: SessionMemory,
  seat: string,
  { trial, presentation, label, salt }: RequestCommand,
): PresentationRequest {
  const leaf = requestLeaf({ salt, session: session.id, seat, trial, presentation, label });
  return { sessionId: session.id, trial, presentation, seat, label, salt, leaf };
}

/** Whether this very request is held already: a repeat changes nothing. */
export function isHeldRequest({ state }: SessionMemory, { trial, presentation, leaf }: PresentationRequest): boolean {
  return state.trial?.trial === trial && state.trial.requests[presentation]?.leaf === leaf;
}

/** What the session decides on: the leaf stands for the label on the record. */
export function requestDecided({
  seat,
  trial,
  presentation,
  label,
  leaf,
}: PresentationRequest): Extract<SessionCommand, { kind: 'request-presentation' }> {
  return { kind: 'request-presentation', seat, trial, presentation, label, leaf };
}

/** The memory with the label of a request that is kept. */
export function afterRequest(memory: SessionMemory, { presentation, label }: PresentationRequest): SessionMemory {
  return { ...memory, state: holdRequest(memory.state, presentation, label) };
}
