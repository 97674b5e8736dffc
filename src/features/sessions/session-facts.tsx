import type { ReactNode } from 'react';
import type { SessionRow } from '#shared/contracts/sessions.ts';
import { formatCount, formatDateTime, formatDateTimeIn, timeZone } from '../../lib/format.ts';
import { type Fact, Facts } from '../../ui/facts.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import { phaseWords } from './session-words.ts';

/** When, where, by whom, and how far it has come. */
export function SessionFacts({ session, seats }: { session: SessionRow; seats: ReactNode }) {
  const { phase, plannedAt, timeZone: zone, room, proctor, trials, trialsLocked, listeners } = session;
  const own: Fact[] =
    zone === timeZone() ? [] : [{ label: 'In your own time zone', value: formatDateTime(plannedAt), isWords: true }];
  const isPlanned = phase === 'planned';
  const progress: Fact[] = isPlanned
    ? []
    : [
        { label: 'Listeners seated', value: listeners },
        { label: 'Trials locked', value: `${trialsLocked} of ${trials}` },
      ];
  return (
    <Facts
      facts={[
        {
          label: 'Phase',
          value: <StatusWord tone={phaseWords[phase].tone}>{phaseWords[phase].word}</StatusWord>,
          isWords: true,
        },
        { label: 'When', value: formatDateTimeIn(plannedAt, zone), isWords: true },
        ...own,
        { label: 'Room', value: room, isWords: true },
        { label: 'Proctor', value: proctor, isWords: true },
        { label: 'Seats', value: seats, isWords: true },
        ...(isPlanned ? [{ label: 'Length', value: formatCount(trials, 'trial'), isWords: true }] : progress),
      ]}
    />
  );
}
