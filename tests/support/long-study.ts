import type { ClosedStudy } from '#shared/ledger/publication-parts.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { close, protocolFor, SessionMaker, StudyMaker, seal, sealedSecret } from './closed-study.ts';

/**
 * A closed study of any length, made by the state machine step for step as a session leaves it: one listener a session, of
 * fifty who come again and again. A product's study ends at 20 sessions of 60 trials; this one need not.
 */
export function longStudy(sessions: number, trials: number, startsAt: number, methodId = 'abx'): ClosedStudy {
  const maker = new StudyMaker();
  maker.now = startsAt;
  const protocol = protocolFor(maker.study, 1, methodId, { sessions, trials, spares: 0 });
  const codeKey = seal(maker, protocol, null);
  const choices = methodOf(methodId)
    .options({})
    .map(({ value }) => value);
  for (let session = 1; session <= sessions; session += 1) {
    const made = new SessionMaker(maker, protocol, session);
    const seat = `L${String((session % 50) + 1).padStart(2, '0')}`;
    made.seat([seat], sealedSecret(session));
    made.do({ kind: 'begin-familiarisation' });
    made.present();
    for (let trial = 1; trial <= trials; trial += 1) {
      made.do({ kind: 'begin-trial' });
      made.present();
      made.answer(seat, choices[(trial * session) % choices.length] ?? '');
      made.lock();
    }
    made.do({ kind: 'finish' });
  }
  return close(maker, protocol, codeKey, { complete: true, reason: '' }, null);
}
