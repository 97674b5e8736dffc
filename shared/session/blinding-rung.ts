import type { Entry } from '../ledger/chain.ts';
import type { Method } from '../methods/method.ts';
import type { SessionState } from './state.ts';
import { studyEvents } from './study-events.ts';

export type BlindingRung = { readonly name: 'listener-blind' | 'double-blind to the cable'; readonly why: string };

/**
 * How blind a closed study was, derived from its record and never ticked in a box.
 *
 * A cable that is fitted under one code all through a session reaches *double-blind to the cable* at most: whoever fits it
 * learns something from the codes, and the method says what. A doubled duty, or a proctor who could see the cables' pages, caps it at *listener-blind*.
 *
 * @throws RangeError when the record has no closing
 */
export function blindingRung(
  entries: readonly Entry[],
  sessions: readonly SessionState[],
  method: Pick<Method, 'fitterCouldSee'>,
): BlindingRung {
  const closing = entries.find((entry) => entry.kind === 'study-closed');
  if (closing === undefined) throw new RangeError('the blinding rung is derived once the study is closed');
  const { manager, owners, managers, codeHolder } = studyEvents['study-closed'].parse(closing.payload);
  const proctors = new Set(sessions.filter((session) => session.seats.length > 0).map((session) => session.proctor));
  const sawCables = [...owners, ...managers, manager].some((person) => proctors.has(person));
  if (proctors.has(codeHolder)) return { name: 'listener-blind', why: 'The code holder also ran a session.' };
  if (sawCables) return { name: 'listener-blind', why: 'A proctor could see the cables’ pages.' };
  if (codeHolder === manager || owners.includes(codeHolder))
    return { name: 'listener-blind', why: 'The code holder also managed the study or owns the organisation.' };
  return {
    name: 'double-blind to the cable',
    why: `The proctor never saw code key or cable pages. ${method.fitterCouldSee}`,
  };
}
