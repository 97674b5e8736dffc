import { describe, expect, it } from 'vitest';
import { methods } from '#shared/methods/methods.ts';
import { observersAfter, witnessOf } from '#shared/session/observers.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import { protocolFor, SessionMaker, StudyMaker, sealedSecret } from '../../support/closed-study.ts';

/** A session of five trials that an observer may watch; `away` is the trial during which their page is not connected. */
function watched({ away = 0, duties = [] as string[], signs = true } = {}) {
  const maker = new StudyMaker();
  const session = new SessionMaker(maker, protocolFor(maker.study, 1, 'abx'), 1);
  session.do({ kind: 'observer-came', observer: 'W1' });
  session.seat(['L01'], sealedSecret(1));
  session.do({ kind: 'begin-familiarisation' });
  session.present();
  for (let trial = 1; trial <= 5; trial += 1) {
    session.do({ kind: 'begin-trial' });
    if (trial === away) session.do({ kind: 'observer-went', observer: 'W1' });
    session.present();
    session.answer('L01', 'A');
    session.lock();
    if (trial === away) session.do({ kind: 'observer-came', observer: 'W1' });
  }
  session.do({ kind: 'finish' });
  if (signs) session.do({ kind: 'observer-signed', observer: 'W1', remarks: '', name: null, duties });
  return sessionsInRecord(maker.entries, methods.abx);
}

describe('a witness', () => {
  it('makes a study witnessed by watching every counted trial and signing it [S128]', () => {
    expect(witnessOf(watched())).toEqual({
      isWitnessed: true,
      words: 'Witnessed: an observer without another duty watched every counted trial and signed it.',
    });
  });

  it('does not where the page was gone in a trial, another duty is theirs, or nothing is signed [S128]', () => {
    expect(witnessOf(watched({ away: 3 })).words).toBe(
      'Not witnessed: not every counted trial of session 1 was watched.',
    );
    expect(witnessOf(watched({ duties: ['listener'] })).words).toContain('W1 in session 1 has another duty (listener)');
    expect(witnessOf(watched({ signs: false }))).toEqual({ isWitnessed: false, words: 'No observer was recorded.' });
  });

  it('is away from a restart of the server on, until the page is back [S126]', () => {
    const [state] = watched({ signs: false });
    if (state === undefined) throw new Error('no session');
    const restarted = observersAfter(state, { kind: 'server-restarted', at: 0, payload: { session: 1 } });
    expect(restarted.map(({ isHere }) => isHere)).toEqual([false]);
  });
});
