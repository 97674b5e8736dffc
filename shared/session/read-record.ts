import type { Entry } from '../ledger/chain.ts';
import type { Method } from '../methods/method.ts';
import { readSessionEvent, type SessionEvent } from './events.ts';
import { replay } from './evolve.ts';
import type { SessionState } from './state.ts';

/** The sessions of a study, by number, each replayed from the record. */
export function sessionsInRecord(entries: readonly Entry[], method: Method): SessionState[] {
  const bySession = new Map<number, SessionEvent[]>();
  for (const entry of entries) {
    const event = readSessionEvent(entry.kind, entry.at, entry.payload);
    const session = event?.payload.session;
    if (event === null || session === null || session === undefined) continue;
    const own = bySession.get(session);
    if (own === undefined) bySession.set(session, [event]);
    else own.push(event);
  }
  return [...bySession.keys()]
    .sort((a, b) => a - b)
    .flatMap((session) => replay(bySession.get(session) ?? [], method) ?? []);
}
