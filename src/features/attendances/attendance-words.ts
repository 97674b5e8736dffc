import type { AttendanceCounts, AttendanceRow } from '#shared/contracts/attendances.ts';
import { formatCount } from '../../lib/format.ts';

type StateWord = { word: string; tone: 'neutral' | 'held' | 'now' | 'amber' };

const stateWords: Record<AttendanceRow['state'], StateWord> = {
  invited: { word: 'No answer yet', tone: 'now' },
  accepted: { word: 'Comes', tone: 'held' },
  waiting: { word: 'Waits for a seat', tone: 'amber' },
  declined: { word: 'Does not come', tone: 'neutral' },
  withdrawn: { word: 'Withdrawn', tone: 'neutral' },
};

export function stateWordOf({ state, waitingPlace, seated }: AttendanceRow): StateWord {
  if (seated) return { word: 'Has taken the seat', tone: 'held' };
  const { word, tone } = stateWords[state];
  return { word: waitingPlace === null ? word : `${word}, place\u00a0${waitingPlace}`, tone };
}

/** "2 of 3 seats offered: 1 comes, 1 without an answer" */
export function countWords({ seats, invited, accepted, waiting, declined }: AttendanceCounts): string {
  const offered = `${invited + accepted} of ${formatCount(seats, 'seat')} offered`;
  const parts = [
    accepted === 0 ? null : `${accepted} ${accepted === 1 ? 'comes' : 'come'}`,
    invited === 0 ? null : `${invited} without an answer`,
    waiting === 0 ? null : `${waiting} waiting`,
    declined === 0 ? null : `${declined} ${declined === 1 ? 'does' : 'do'} not come`,
  ].filter((part) => part !== null);
  return parts.length === 0 ? offered : `${offered}: ${parts.join(', ')}`;
}
