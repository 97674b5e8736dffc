import type { SessionRow } from '#shared/contracts/sessions.ts';
import { formatDateTime } from '../../../lib/format.ts';

/** The session that runs or comes next; `consoleTo` only for whoever leads it. */
export type UpcomingSession = Pick<SessionRow, 'number' | 'phase' | 'plannedAt' | 'room' | 'proctor'> & {
  readonly consoleTo: string | null;
};

/** The first session that has not ended, by its number. */
export function upcomingOf(sessions: readonly SessionRow[]): SessionRow | null {
  const toCome = sessions.filter(({ phase }) => phase !== 'finished' && phase !== 'abandoned');
  return toCome.toSorted((a, b) => a.number - b.number)[0] ?? null;
}

export function upcomingTitle({ number, phase }: UpcomingSession): string {
  return phase === 'planned' ? `Session ${number} is planned` : `Session ${number} is open`;
}

export function upcomingWords({ number, phase, plannedAt, room, proctor }: UpcomingSession): string {
  if (phase !== 'planned') return `Session ${number} is open in ${room}; ${proctor} leads it.`;
  return `Session ${number}: ${proctor} leads it in ${room}, planned for ${formatDateTime(plannedAt)}.`;
}
