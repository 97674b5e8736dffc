import { describe, expect, it } from 'vitest';
import { methodIds, methodOf } from '#shared/methods/methods.ts';
import { nextStep, stepKindsOf } from '#shared/session/change-steps.ts';
import { decide, type SessionCommand } from '#shared/session/decide.ts';
import type { SessionEvent, SessionPlan } from '#shared/session/events.ts';
import { evolve, replay } from '#shared/session/evolve.ts';
import { codeFitted, drawOf, truthOf, truthOfPractice } from '#shared/session/fitting.ts';
import { mostPractice } from '#shared/session/practice.ts';
import type { SessionState } from '#shared/session/state.ts';

const abx = methodOf('abx');
const plan: SessionPlan = {
  method: 'abx',
  trials: 8,
  spares: 1,
  checks: { reference: 1, steps: [2, 1], same: 0 },
  rig: 'loudspeaker',
  changeMs: 30_000,
  answerMs: 20_000,
  confidence: false,
  programme: [
    { title: 'Piano', start: '', lengthMs: 5_000 },
    { title: 'Noise', start: '', lengthMs: 5_000 },
  ],
};

/** A session whose draw is fixed, with one listener. */
class Desk {
  now = 0;
  events: SessionEvent[] = [];
  state: SessionState;

  constructor(method = abx) {
    const payload = { session: 1, sessionId: '6a1f2f60-0000-4000-8000-000000000001', proctor: '', plan };
    const start: SessionEvent = { kind: 'session-planned', at: 0, payload };
    this.events = [start];
    this.state = { ...evolve(null, start, method), phase: 'running' };
    this.state = { ...this.state, seats: [{ ...seat }] };
  }

  do(command: SessionCommand): SessionEvent[] {
    const events = decide(this.state, command, this.now);
    for (const event of events) this.state = evolve(this.state, event, abx);
    this.events.push(...events);
    return events;
  }

  /** Every presentation of the open trial, up to its question or its end. */
  present(): void {
    for (;;) {
      const { trial } = this.state;
      if (trial === null || trial.stage === 'answering') return;
      const step = nextStep(trial, plan);
      this.now = step === null ? (trial.endsAt ?? 0) : this.now;
      if (step === stepKindsOf(plan).at(-1)) this.now = trial.changeStartedAt + plan.changeMs;
      this.do(step === null ? { kind: 'tick' } : { kind: 'confirm-step', step });
    }
  }

  hearBoth(): void {
    this.do({ kind: 'begin-familiarisation' });
    this.present();
  }
}
const seat = { seat: 'L01', commitment: '', contributes: true, isLinked: true, revealed: null, left: false };

describe('training', () => {
  it('presents both cables labelled as often as anybody likes, until the first trial opens [S130]', () => {
    const desk = new Desk();
    desk.hearBoth();
    desk.hearBoth();
    desk.hearBoth();
    expect(desk.state.familiarisations).toBe(3);
    expect(desk.events.filter(({ kind }) => kind === 'trial-opened').map(({ payload }) => payload)).toHaveLength(3);
    desk.do({ kind: 'begin-trial' });
    expect(() => desk.do({ kind: 'begin-familiarisation' })).toThrow(/over once the first trial/);
    desk.do({ kind: 'void-trial', reason: 'noise', note: '' });
    expect(() => desk.do({ kind: 'begin-familiarisation' })).toThrow(/over once the first trial/);
    expect(() => desk.do({ kind: 'begin-practice', form: 'blind', step: null })).toThrow(/over once the first trial/);
  });

  it('takes no place of a trial or a spare, and goes through the same change and question [S131]', () => {
    const desk = new Desk();
    desk.hearBoth();
    for (const [form, step] of [
      ['feedback', 0],
      ['feedback', 1],
      ['blind', null],
    ] as const) {
      desk.do({ kind: 'begin-practice', form, step });
      desk.present();
      expect(desk.state.trial).toMatchObject({ stage: 'answering', presentation: 2 });
      desk.now = desk.state.trial?.endsAt ?? 0;
      desk.do({ kind: 'tick' });
      expect(desk.state.trial).toBeNull();
    }
    expect(desk.state.practised.map(({ number, form, step }) => [number, form, step])).toEqual([
      [1, 'feedback', 0],
      [2, 'feedback', 1],
      [3, 'blind', null],
    ]);
    expect(desk.state.ended).toEqual([]);
    const [opened] = desk.do({ kind: 'begin-trial' });
    expect(opened).toMatchObject({ kind: 'trial-opened', payload: { trial: 1, excerpt: 0 } });
    const excerpts = desk.events.flatMap((event) => (event.kind === 'practice-opened' ? [event.payload.excerpt] : []));
    expect(excerpts).toEqual([0, 1, 0]);
  });

  it('stays on the record where it is set aside, and begins anew under the next number [S131]', () => {
    const desk = new Desk();
    desk.hearBoth();
    desk.do({ kind: 'begin-practice', form: 'blind', step: null });
    expect(desk.do({ kind: 'void-trial', reason: 'noise', note: '' })).toMatchObject([{ payload: { trial: -1 } }]);
    expect(desk.state).toMatchObject({ trial: null, ended: [] });
    desk.do({ kind: 'begin-practice', form: 'blind', step: null });
    expect(desk.state.trial).toMatchObject({ trial: -2, practice: { number: 2 } });
  });

  it.each([
    ['before the familiarisation', { form: 'blind', step: null }, 0, /familiarisation trial comes first/],
    ['on a step that is not registered', { form: 'feedback', step: 2 }, 1, /no such known difference/],
    ['with feedback on the question itself', { form: 'feedback', step: null }, 1, /no such known difference/],
    ['blind on a step', { form: 'blind', step: 0 }, 1, /presents the two cables/],
  ] as const)('is refused %s [S131]', (_, asked, heard, why) => {
    const desk = new Desk();
    if (heard > 0) desk.hearBoth();
    expect(() => desk.do({ kind: 'begin-practice', ...asked })).toThrow(why);
  });

  it('has an end, and a replay that equals its state [S131]', () => {
    const desk = new Desk();
    desk.hearBoth();
    for (let number = 1; number <= mostPractice; number += 1) {
      desk.do({ kind: 'begin-practice', form: 'blind', step: null });
      desk.do({ kind: 'void-trial', reason: 'noise', note: '' });
    }
    expect(() => desk.do({ kind: 'begin-practice', form: 'blind', step: null })).toThrow(/At most/);
    const replayed = replay(desk.events, abx);
    expect(replayed).toMatchObject({ practised: desk.state.practised, familiarisations: 1, ended: [] });
  });

  it('records how many answered and nothing of what [S132]', () => {
    const desk = new Desk();
    desk.hearBoth();
    desk.do({ kind: 'begin-practice', form: 'blind', step: null });
    desk.present();
    desk.state = { ...desk.state, trial: { ...open(desk), answers: [{ seat: 'L01', leaf: 'a leaf' }] } };
    const [ended] = desk.do({ kind: 'lock-trial' });
    expect(ended).toEqual({
      kind: 'practice-ended',
      at: desk.now,
      payload: { session: 1, number: 1, answered: 1, of: 1 },
    });
  });
});

function open(desk: Desk) {
  const { trial } = desk.state;
  if (trial === null) throw new Error('no trial is open');
  return trial;
}

describe('what practice presents', () => {
  const rows = [0, 1, 2, 3].map((cable) => ({ code: String(100 + cable), specimen: '', serial: '', cable }));
  const secret = 'ab'.repeat(32);
  const contributions = ['cd'.repeat(32)];
  const code = (form: 'blind' | 'feedback', step: number | null, number: number, presentation: string) =>
    codeFitted({
      secret,
      contributions,
      method: abx,
      rows,
      state: { plan, ended: [] },
      trial: -number,
      practice: { number, form, step },
      presentation,
    });

  it('is the two cables, or the reference cable and the check cable of the step [S131]', () => {
    const heard = (form: 'blind' | 'feedback', step: number | null) =>
      [
        ...new Set([1, 2, 3, 4].flatMap((number) => ['A', 'B', 'X'].map((one) => code(form, step, number, one)))),
      ].sort();
    expect(heard('blind', null)).toEqual(['100', '101']);
    expect(heard('feedback', 0)).toEqual(['101', '102']);
    expect(heard('feedback', 1)).toEqual(['101', '103']);
  });

  it.each(methodIds)('has fair truths of its own, and leaves every drawn one as it was, %s [S131]', (id) => {
    const method = methodOf(id);
    const drawn = { secret, contributions, method, plan, rows };
    const truths = Array.from({ length: mostPractice }, (_, index) => truthOfPractice(drawn, practiceOf(index + 1)));
    expect(new Set(truths)).toEqual(new Set(method.truths));
    const counted = Array.from({ length: plan.trials }, (_, index) => truthOf(drawOf(drawn), index + 1));
    expect(truths.slice(0, plan.trials)).not.toEqual(counted);
  });

  it('presents X as its truth says [S131]', () => {
    for (let number = 1; number <= 12; number += 1) {
      const truth = truthOfPractice({ secret, contributions, method: abx, plan, rows }, practiceOf(number));
      expect(code('feedback', 0, number, 'X')).toBe(code('feedback', 0, number, truth));
    }
  });
});

const practiceOf = (number: number) => ({ number, form: 'feedback', step: 0 }) as const;
