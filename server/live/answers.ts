import type { ListenerCommand } from '#shared/contracts/listener-live.ts';
import { Problem } from '#shared/problem.ts';
import { answerLeaf } from '#shared/session/answer-leaf.ts';
import { optionsOf } from '#shared/session/progress.ts';
import type { SessionState } from '#shared/session/state.ts';
import type { Answer } from '../features/sessions/answer.entity.ts';
import type { SessionMemory } from './session-memory.ts';

export type AnswerCommand = Extract<ListenerCommand, { kind: 'answer' }>;

/**
 * Whether this seat may give such an answer at all.
 * @throws Problem `wrong-phase` for a seat that has left or came during the trial, `invalid-input` for what was not asked
 */
export function requireAnswerable({ state, method }: SessionMemory, seat: string, command: AnswerCommand): void {
  const own = state.seats.find((candidate) => candidate.seat === seat);
  if (own === undefined || own.left) throw new Problem('wrong-phase', 'This seat has left the session.');
  if (!optionsOf(state, method).some((option) => option.value === command.choice))
    throw new Problem('invalid-input', 'That is not one of the answers.');
  if ((command.confidence !== null) !== state.plan.confidence)
    throw new Problem(
      'invalid-input',
      state.plan.confidence ? 'Say how sure you are.' : 'Confidence is not asked here.',
    );
  if (state.trial !== null && !state.trial.seats.includes(seat))
    throw new Problem('wrong-phase', 'You take part from the next trial on.');
}

/** The row of an answer as it is stored. */
export function answerRow(
  { session }: SessionMemory,
  seat: string,
  command: AnswerCommand,
  how: { late: boolean; at: number },
): Answer {
  const { trial, choice, confidence, revision, salt } = command;
  const leaf = answerLeaf({ salt, session: session.id, seat, trial, choice, confidence });
  return {
    sessionId: session.id,
    trial,
    seat,
    late: how.late,
    revision,
    choice,
    confidence,
    salt,
    leaf,
    heldAt: new Date(how.at),
  };
}

/**
 * Passes only an answer to a locked trial that counted this seat as missing: such an answer is recorded as late.
 * @throws Problem `too-early` before the trial, `too-late` for every other trial that is over
 */
export function requireLate(state: SessionState, seat: string, trial: number): void {
  if (trial < 0) throw new Problem('too-late', 'That practice is over. Nothing in it counts.');
  const ended = state.ended.find((candidate) => candidate.trial === trial);
  if (ended === undefined && state.phase === 'running') throw new Problem('too-early', 'That trial is not open.');
  if (ended === undefined)
    throw new Problem('too-late', 'The session ended before this answer arrived. It is not counted.');
  if (ended.outcome === 'void') throw new Problem('too-late', `Trial ${trial} was set aside. A spare takes its place.`);
  if (!ended.missing.includes(seat))
    throw new Problem('too-late', `Trial ${trial} is locked; your earlier answer stands.`);
}
