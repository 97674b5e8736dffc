import { describe, expect, it } from 'vitest';
import { readSessionEvent } from '#shared/session/events.ts';
import { labelFaults, listenersToldApart, toldApartWords } from '#shared/session/listeners-told-apart.ts';
import type { SessionState } from '#shared/session/state.ts';

/** Sessions by what this file reads of them: "L01" came by code, "L01*" by a personal link. */
const sessionsOf = (...seated: string[][]) =>
  seated.map((labels, index) => ({
    session: index + 1,
    seats: labels.map((label) => ({ seat: label.replace('*', ''), isLinked: label.endsWith('*') })),
  })) as unknown as SessionState[];

describe('telling listeners apart', () => {
  it.each([
    { sessions: sessionsOf(['L01*', 'L02*'], ['L01*', 'L03*']), listeners: 3, unlinked: 0 },
    { sessions: sessionsOf(['L01*', 'L02'], ['L01*', 'L03']), listeners: 3, unlinked: 2 },
    { sessions: sessionsOf(['L01'], []), listeners: 1, unlinked: 1 },
    { sessions: sessionsOf(), listeners: 0, unlinked: 0 },
  ])(
    'counts a label once over all sessions: $listeners, $unlinked by code [G7]',
    ({ sessions, listeners, unlinked }) => {
      expect(listenersToldApart(sessions)).toEqual({ listeners, unlinked });
      expect(labelFaults(sessions)).toEqual([]);
    },
  );

  it('finds a label that took two seats, and one that came back by code [G7]', () => {
    expect(labelFaults(sessionsOf(['L01*', 'L01*']))).toEqual(['Session 1: L01 took two seats.']);
    for (const second of ['L01', 'L01*'])
      expect(labelFaults(sessionsOf(['L01'], [second]))).toEqual([
        'L01 is in sessions 1 and 2, and did not join both by a personal link.',
      ]);
  });

  it('says what is not certain, and nothing more [G7]', () => {
    expect(toldApartWords({ listeners: 5, unlinked: 2 })).toBe(
      '2 of 5 listeners joined by code alone, so it is not certain that each is a different person.',
    );
    expect(toldApartWords({ listeners: 1, unlinked: 1 })).toBe('The one listener joined by code alone.');
    expect(toldApartWords({ listeners: 2, unlinked: 0 })).not.toContain('code');
  });

  it('reads an entry from before personal links, which says nothing of them, as one by code [G7]', () => {
    const payload = { session: 1, seat: 'L01', commitment: 'a'.repeat(64), contributes: true, consentVersion: 1 };
    expect(readSessionEvent('listener-joined', '2026-12-01T09:00:00.000Z', payload)?.payload).toEqual(payload);
  });
});
