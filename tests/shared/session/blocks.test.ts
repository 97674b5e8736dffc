import { describe, expect, it } from 'vitest';
import { methods } from '#shared/methods/methods.ts';
import { type Protocol, sessionPlanOf } from '#shared/protocol/protocol.ts';
import { breakNow, whyRest } from '#shared/session/blocks.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import { sessionMinutes } from '#shared/session/session-minutes.ts';
import type { SessionState } from '#shared/session/state.ts';
import { protocolFor, SessionMaker, StudyMaker, sealedSecret } from '../../support/closed-study.ts';

const minute = 60_000;
const breaks = { trials: 2, leastMinutes: 10, blocksPerDay: 2 };

/** A session whose protocol registers breaks, seated and familiarised. */
function started() {
  const maker = new StudyMaker();
  const plain = protocolFor(maker.study, 1, 'abx');
  const protocol: Protocol = { ...plain, conduct: { ...plain.conduct, breaks } };
  const session = new SessionMaker(maker, protocol, 1);
  session.seat(['L01'], sealedSecret(1));
  session.do({ kind: 'begin-familiarisation' });
  session.present();
  const state = (): SessionState => {
    const [found] = sessionsInRecord(maker.entries, methods.abx);
    if (found === undefined) throw new Error('no session');
    return found;
  };
  const trial = (number: number) => {
    session.do({ kind: 'begin-trial' });
    session.present();
    session.answer('L01', 'A');
    session.lock();
    return number;
  };
  return { maker, session, state, trial, protocol };
}

const leaf = (digit: string) => digit.repeat(64);

describe('breaks', () => {
  it('begin by themselves once a block has locked, and not after the last trial [S120]', () => {
    const { session, state, trial, maker } = started();
    trial(1);
    expect(state().paused).toBeNull();
    trial(2);
    expect(breakNow(state())).toEqual({ number: 1, leastEndsAt: maker.now + 10 * minute });
    maker.now += 10 * minute;
    session.do({ kind: 'resume' });
    trial(3);
    trial(4);
    maker.now += 10 * minute;
    session.do({ kind: 'resume', reason: 'All of them want to finish today.' });
    trial(5);
    expect(state().paused).toBeNull();
    session.do({ kind: 'finish' });
    expect(state().phase).toBe('finished');
  });

  it('do not end before their least length without a reason, which stands on the record [S121]', () => {
    const { session, trial, maker, state } = started();
    trial(1);
    trial(2);
    maker.now += 9 * minute;
    expect(() => session.do({ kind: 'resume' })).toThrow('10 min at least');
    session.do({ kind: 'resume', reason: 'The building closes.' });
    expect(maker.entries.at(-1)).toMatchObject({ kind: 'resumed', payload: { early: 'The building closes.' } });
    expect(state().blocks.locked).toBe(0);
  });

  it('come before the next trial even where another pause took their place [S120]', () => {
    const { session, trial, state, maker } = started();
    trial(1);
    trial(2);
    session.do({ kind: 'too-loud', seat: 'L01' });
    session.do({ kind: 'resume' });
    expect(() => session.do({ kind: 'begin-trial' })).toThrow('the break comes first');
    session.do({ kind: 'pause', reason: 'break' });
    expect(breakNow(state())?.leastEndsAt).toBe(maker.now + 10 * minute);
  });

  it('allow so many blocks a day; more takes a reason or another day [S122]', () => {
    const { session, trial, state, maker } = started();
    trial(1);
    trial(2);
    maker.now += 10 * minute;
    session.do({ kind: 'resume' });
    trial(3);
    trial(4);
    maker.now += 60 * minute;
    expect(whyRest(state(), maker.now)).toContain('at most 2 blocks a day');
    expect(() => session.do({ kind: 'resume' })).toThrow('Go on tomorrow');
    maker.now += 18 * 60 * minute;
    session.do({ kind: 'resume' });
    expect(state().paused).toBeNull();
  });

  it('mark another sitting after more than a day [S122]', () => {
    const { session, trial, state, maker } = started();
    trial(1);
    trial(2);
    maker.now += 25 * 60 * minute;
    session.do({ kind: 'resume' });
    trial(3);
    expect(state().blocks.sittings).toBe(2);
    expect(maker.entries.find(({ kind }) => kind === 'sitting-began')?.payload).toEqual({ session: 1, sitting: 2 });
  });

  it('are in the minutes that listeners are told [S123]', () => {
    const { protocol } = started();
    const plan = sessionPlanOf(protocol);
    const { breaks: _none, ...without } = plan;
    expect(sessionMinutes(plan, methods.abx) - sessionMinutes(without, methods.abx)).toBe(20);
  });
});

describe('remarks', () => {
  it('are kept once by seat and break; a repeat changes nothing, another one is refused [S116]', () => {
    const { session, trial, maker } = started();
    const remark = { kind: 'keep-remark', seat: 'L01', about: 'break/1', leaf: leaf('a') } as const;
    expect(() => session.do(remark)).toThrow('has not come');
    trial(1);
    trial(2);
    session.do(remark);
    const before = maker.entries.length;
    session.do(remark);
    expect(maker.entries.length).toBe(before);
    expect(() => session.do({ ...remark, leaf: leaf('b') })).toThrow('the first answer stands');
  });

  it('at the exit are asked of whoever had a trial, once the session is over or they have left [S110]', () => {
    const { session, trial } = started();
    const remark = { kind: 'keep-remark', seat: 'L01', about: 'exit', leaf: leaf('a') } as const;
    expect(() => session.do(remark)).toThrow('after the last trial');
    trial(1);
    expect(() => session.do(remark)).toThrow('after the last trial');
    session.do({ kind: 'abandon', reason: 'The amplifier failed.' });
    session.do(remark);
    expect(() => session.do({ ...remark, seat: 'L09' })).toThrow('after the last trial');
  });
});
