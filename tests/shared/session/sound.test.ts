import { describe, expect, it } from 'vitest';
import { listenedMinutes, plannedListeningMinutes } from '#shared/exposure/listening-time.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { sessionPlanOf } from '#shared/protocol/protocol.ts';
import { closedStudy, protocolFor, SessionMaker, StudyMaker, seal, sealedSecret } from '../../support/closed-study.ts';

const sound = { response: 'slow', instrument: 'Class 2 meter', place: 'Sofa', reason: '' } as const;

function openSession() {
  const maker = new StudyMaker();
  const protocol = protocolFor(maker.study, 1, 'abx');
  seal(maker, protocol, null);
  return { maker, session: new SessionMaker(maker, protocol, 1) };
}

describe('the sound level of a session', () => {
  it('is refused from 90 dBA on unless a reason for it goes on the record [S72]', () => {
    const { maker, session } = openSession();
    const loud = (reason: string) => session.do({ kind: 'record-sound-level', ...sound, tenthsDba: 900, reason });
    expect(() => loud('')).toThrow(/From 90 dBA on hearing is at risk/);
    loud('A horn is tested at its usual distance.');
    session.do({ kind: 'record-sound-level', ...sound, tenthsDba: 899, reason: 'Nobody asks for one here.' });
    const recorded = maker.entries.filter(({ kind }) => kind === 'sound-level-recorded');
    expect(recorded.map(({ payload }) => [payload.tenthsDba, payload.reason])).toEqual([
      [900, 'A horn is tested at its usual distance.'],
      [899, ''],
    ]);
  });

  it('is recorded until the session is over [S72]', () => {
    const { session } = openSession();
    session.seat(['L01'], sealedSecret(1));
    session.do({ kind: 'abandon', reason: 'Enough.' });
    expect(() => session.do({ kind: 'record-sound-level', ...sound, tenthsDba: 750 })).toThrow(/over/);
  });

  it('lasts for as long as excerpts were played, by the record [S71]', () => {
    const { entries, protocol } = closedStudy(1);
    const ofFirst = entries.filter(({ payload }) => payload.session === 1);
    // Six trials of three presentations and a familiarisation of two, 12 s each.
    expect(listenedMinutes(ofFirst)).toBeCloseTo((20 * 12) / 60, 6);
    expect(plannedListeningMinutes(sessionPlanOf(protocol), methodOf('abx'))).toBeCloseTo((17 * 12) / 60, 6);
  });
});
