import type { SessionState } from './state.ts';

export type ListenersToldApart = {
  /** Labels, each counted once over all sessions. */
  readonly listeners: number;
  /** Of these, joined by code alone: nothing shows that each is another person. */
  readonly unlinked: number;
};

/**
 * How many listeners a study had, and how many of them nothing tells apart. A label is one listener over all sessions; who
 * joined by a personal link keeps theirs, who joined by a session's code gets a new one every time.
 */
export function listenersToldApart(sessions: readonly SessionState[]): ListenersToldApart {
  const linked = new Map<string, boolean>();
  for (const { seats } of sessions) for (const { seat, isLinked } of seats) linked.set(seat, isLinked);
  return { listeners: linked.size, unlinked: [...linked.values()].filter((isLinked) => !isLinked).length };
}

/**
 * What the record shows about listeners being different persons, in a sentence.
 *
 * @example toldApartWords({ listeners: 3, unlinked: 1 })
 *   // "1 of 3 listeners joined by code alone, so it is not certain that each is a different person."
 */
export function toldApartWords({ listeners, unlinked }: ListenersToldApart): string {
  if (listeners === 0) return 'Nobody took a seat.';
  if (unlinked === 0) return 'Every listener joined by a personal link, one to an address.';
  if (listeners === 1) return 'The one listener joined by code alone.';
  return `${unlinked} of ${listeners} listeners joined by code alone, so it is not certain that each is a different person.`;
}

/** Where labels stand for more or fewer than one listener each: a label twice in a session, or one that came back by code. */
export function labelFaults(sessions: readonly SessionState[]): string[] {
  const seen = new Map<string, { session: number; isLinked: boolean }>();
  const faults: string[] = [];
  for (const { session, seats } of sessions) {
    for (const { seat, isLinked } of seats) {
      const before = seen.get(seat);
      if (before?.session === session) faults.push(`Session ${session}: ${seat} took two seats.`);
      else if (before !== undefined && !(before.isLinked && isLinked))
        faults.push(
          `${seat} is in sessions ${before.session} and ${session}, and did not join both by a personal link.`,
        );
      seen.set(seat, { session, isLinked });
    }
  }
  return faults;
}
