import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cautions } from '#shared/contracts/proctor-live.ts';
import { studyDraft } from '#shared/contracts/studies.ts';
import { publicationParts, publicationText, readPublication } from '#shared/ledger/publication-parts.ts';
import { verifyStudy } from '#shared/ledger/verify.ts';
import { methodIds, methodOf, methods } from '#shared/methods/methods.ts';
import { Problem } from '#shared/problem.ts';
import { sessionPlanOf } from '#shared/protocol/protocol.ts';
import { contributionCommitment } from '#shared/session/answer-leaf.ts';
import { blindingRung } from '#shared/session/blinding-rung.ts';
import { decide, type SessionCommand } from '#shared/session/decide.ts';
import type { SessionEvent } from '#shared/session/events.ts';
import { evolve, holdAnswer, replay } from '#shared/session/evolve.ts';
import { holdRequest, takesAnswers, unheardOf } from '#shared/session/on-request.ts';
import { dueAt, presentationNow } from '#shared/session/progress.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import { requestLeaf } from '#shared/session/request-leaf.ts';
import { onRequestSentence } from '#shared/session/requests-told.ts';
import type { SessionState } from '#shared/session/state.ts';
import { listenerViewOf, proctorViewOf } from '#shared/session/views.ts';
import { closedStudy, protocolFor } from '../../support/closed-study.ts';
import { plainStudy } from '../../support/people.ts';

const abx = methodOf('abx');
const most = 5;
const sessionId = '00000000-0000-4000-8000-000000000001';
const value = '11'.repeat(32);

/** A session on request as the server holds it: its events, and beside them the labels and answers. */
class Run {
  now = Date.parse('2026-12-05T18:00:00.000Z');
  readonly events: SessionEvent[] = [];
  state: SessionState;

  constructor() {
    const { design, ...rest } = protocolFor('s', 1, 'abx');
    const plan = sessionPlanOf({ ...rest, design: { ...design, onRequest: { most } } });
    const payload = { session: 1, sessionId, proctor: sessionId, plan };
    const planned: SessionEvent = { kind: 'session-planned', at: this.now, payload };
    this.events.push(planned);
    this.state = evolve(null, planned, abx);
  }

  do(command: SessionCommand): SessionEvent[] {
    const events = decide(this.state, command, this.now);
    this.events.push(...events);
    this.state = events.reduce((state, event) => evolve(state, event, abx), this.state);
    return events;
  }

  /** Whether it was taken; a refusal changes nothing. */
  tries(command: SessionCommand): boolean {
    try {
      this.do(command);
      return true;
    } catch (error) {
      if (error instanceof Problem) return false;
      throw error;
    }
  }

  seat(label: string): boolean {
    const commitment = contributionCommitment(value);
    return this.tries({ kind: 'take-seat', seat: label, commitment, consentVersion: 1, joinedBy: 'code' });
  }

  begin(): void {
    this.do({ kind: 'confirm-cautions', items: [...cautions] });
    this.do({ kind: 'open-seating', commitment: '00'.repeat(32) });
    this.seat('L01');
    this.do({ kind: 'close-seating' });
    this.do({ kind: 'reveal', seat: 'L01', value });
    this.do({ kind: 'begin-familiarisation' });
    this.present();
    this.present();
  }

  ask(label: string): boolean {
    const { trial } = this.state;
    const content = {
      session: sessionId,
      seat: 'L01',
      trial: trial?.trial ?? 1,
      presentation: trial?.requests.length ?? 0,
    };
    const leaf = requestLeaf({ ...content, label, salt: '22'.repeat(16) });
    const { trial: number, presentation } = content;
    const command = { kind: 'request-presentation', seat: 'L01', trial: number, presentation, label, leaf } as const;
    if (!this.tries(command)) return false;
    this.state = holdRequest(this.state, presentation, label);
    return true;
  }

  /** The change and the excerpt of one presentation. */
  present(): void {
    for (const step of ['mute', 'unplug', 'fit', 'check', 'unmute'] as const) {
      if (step === 'unmute') this.now = (this.state.trial?.changeStartedAt ?? 0) + this.state.plan.changeMs;
      this.do({ kind: 'confirm-step', step });
    }
    this.now = this.state.trial?.endsAt ?? this.now;
    this.do({ kind: 'tick' });
  }

  answer(): void {
    this.state = holdAnswer(this.state, 'L01', '33'.repeat(32));
  }
}

const context = {
  title: 'Study Plover',
  room: 'B',
  now: 0,
  join: null,
  presence: [],
  entries: 1,
  demo: false,
  rehearsal: false,
};
const asListener = (state: SessionState) =>
  listenerViewOf(state, abx, {
    title: 'Study Plover',
    rehearsal: false,
    seat: 'L01',
    now: 0,
    held: null,
    lastLock: null,
    told: null,
  });

describe('a session on request', () => {
  it('seats one listener, and another only once the seat is free [S50]', () => {
    const run = new Run();
    run.do({ kind: 'confirm-cautions', items: [...cautions] });
    run.do({ kind: 'open-seating', commitment: '00'.repeat(32) });
    expect([run.seat('L01'), run.seat('L02')]).toEqual([true, false]);
    run.do({ kind: 'leave', seat: 'L01' });
    expect(run.seat('L02')).toBe(true);
  });

  it('lets the listener ask, hear, ask again and answer once each was heard [S51]', () => {
    const run = new Run();
    run.begin();
    run.do({ kind: 'begin-trial' });
    expect(run.state.trial?.stage).toBe('asking');
    for (const [label, open] of [
      ['B', false],
      ['X', false],
      ['B', false],
      ['A', true],
    ] as const) {
      expect(run.ask(label)).toBe(true);
      expect([run.state.trial?.stage, presentationNow(run.state, abx)]).toEqual(['change', label]);
      expect(run.ask('X')).toBe(false);
      run.present();
      expect(asListener(run.state).trial?.requests?.takesAnswers).toBe(open);
    }
    run.answer();
    expect(run.ask('X')).toBe(false);
    expect(run.do({ kind: 'lock-trial' }).map(({ kind }) => kind)).toEqual(['trial-locked']);
  });

  it('begins the change of the same presentation again after “too loud”, and keeps what is left of the window [S53]', () => {
    const run = new Run();
    run.begin();
    run.do({ kind: 'begin-trial' });
    run.now += 5_000;
    run.do({ kind: 'pause', reason: 'break' });
    run.now += 60_000;
    run.do({ kind: 'resume' });
    expect(run.state.trial?.endsAt).toBe(run.now + run.state.plan.answerMs - 5_000);
    run.ask('X');
    run.do({ kind: 'too-loud', seat: 'L01' });
    expect(run.ask('A')).toBe(false);
    run.do({ kind: 'resume' });
    expect([run.state.trial?.stage, run.state.trial?.requests.length]).toEqual(['change', 1]);
    expect(presentationNow(run.state, abx)).toBe('X');
  });

  it('locks a trial whose listener asks for nothing until the window ends, with the answer missing [S53]', () => {
    const run = new Run();
    run.begin();
    run.do({ kind: 'begin-trial' });
    expect(dueAt(run.state, run.now)).toBe(run.now + run.state.plan.answerMs);
    run.now += run.state.plan.answerMs;
    const [locked] = run.do({ kind: 'tick' });
    expect(locked?.payload).toMatchObject({ reason: 'window-ended', missing: ['L01'], leaves: [] });
  });

  const act = fc.constantFrom('A', 'B', 'X', 'answer', 'lock', 'pause', 'resume', 'restart', 'void', 'tick', 'wait');

  it('whatever is done: nobody answers before each was heard or hears more than allowed, and the record replays [S51] [S52]', () => {
    fc.assert(
      fc.property(fc.array(act, { maxLength: 40 }), (acts) => {
        const run = new Run();
        run.begin();
        for (const one of acts) {
          if (run.state.trial === null) run.tries({ kind: 'begin-trial' });
          if (one === 'A' || one === 'B' || one === 'X') {
            if (run.ask(one)) run.present();
          } else if (one === 'answer' && run.state.trial !== null && takesAnswers(run.state.trial, abx)) run.answer();
          else if (one === 'lock') run.tries({ kind: 'lock-trial' });
          else if (one === 'pause') run.tries({ kind: 'pause', reason: 'break' });
          else if (one === 'resume') run.tries({ kind: 'resume' });
          else if (one === 'restart') run.tries({ kind: 'note-restart' });
          else if (one === 'void') run.tries({ kind: 'void-trial', reason: 'noise', note: '' });
          else if (one === 'tick') run.tries({ kind: 'tick' });
          else run.now += 7_000;
          const { trial } = run.state;
          if (trial !== null) {
            expect(trial.requests.length).toBeLessThanOrEqual(most);
            if (trial.answers.length > 0) expect(unheardOf(trial, abx)).toEqual([]);
            // However it was asked, all three can still be heard.
            expect(most - trial.requests.length).toBeGreaterThanOrEqual(unheardOf(trial, abx).length);
          }
        }
        // Labels and answers lie beside the record; the rest of the state is its replay.
        const replayed = replay(run.events, abx);
        const bare = (state: SessionState | null) =>
          JSON.stringify({
            ...state,
            trial: state?.trial && {
              ...state.trial,
              answers: [],
              requests: state.trial.requests.map(({ leaf }) => leaf),
            },
          });
        expect(bare(replayed)).toBe(bare(run.state));
      }),
      { numRuns: 60 },
    );
  });

  it('shows the console the same, whatever is asked for [S54]', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom('A', 'B', 'X'), { minLength: 1, maxLength: 3 }), (labels) => {
        const consoles = [labels, labels.map(() => 'X')].map((asked) => {
          const run = new Run();
          run.begin();
          run.do({ kind: 'begin-trial' });
          const views: string[] = [];
          const look = () => views.push(JSON.stringify(proctorViewOf(run.state, abx, { ...context, code: null })));
          look();
          for (const label of asked) {
            run.ask(label);
            look();
            run.present();
            look();
          }
          return views;
        });
        expect(consoles[0]).toEqual(consoles[1]);
      }),
      { numRuns: 12 },
    );
  });
});

describe('a plan on request', () => {
  const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;
  const cables = [1, 2].map((n) => ({ cableId: id(n), specimenIds: [id(n * 10)] }));
  const faults = (change: object) => {
    const parsed = studyDraft.safeParse({ ...plainStudy, cables, codeHolderId: id(9), ...change });
    return parsed.error?.issues.map(({ path }) => path.join('/')) ?? [];
  };

  it('has one listener a session and room for each label, with the method that can [S50]', () => {
    expect(faults({ listenersPerSession: 1, onRequest: { most: 3 } })).toEqual([]);
    expect(faults({ listenersPerSession: 2, onRequest: { most: 9 } })).toEqual(['listenersPerSession']);
    expect(faults({ listenersPerSession: 1, onRequest: { most: 2 } })).toEqual(['onRequest/most']);
    expect(faults({ method: 'triangle', listenersPerSession: 1, onRequest: { most: 9 } })).toEqual(['onRequest']);
    expect(methodIds.filter((method) => methods[method].onRequest !== null)).toEqual(['abx']);
  });
});

describe('a closed study on request', () => {
  const study = closedStudy(1, 'abx', undefined, false, { onRequest: { most } });
  const parts = publicationParts(study);
  const requests = parts.requests as { label: string; trial: number }[];
  const answersLine = (changed: object) => verifyStudy({ ...parts, ...changed }).find(({ id }) => id === 'answers');

  it('publishes what was asked for with its salts, and every line holds [S55]', () => {
    expect(requests.length).toBeGreaterThan(20);
    expect(verifyStudy(parts).filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(answersLine({})?.reason).toContain(`${requests.length} presentations, each as it was asked for.`);
    expect('parts' in readPublication(publicationText(parts))).toBe(true);
  });

  it('fails where a request is altered, left out or added [S55]', () => {
    const other = requests.map((one, index) => (index === 3 ? { ...one, label: one.label === 'A' ? 'B' : 'A' } : one));
    for (const changed of [other, requests.slice(1), [...requests, { ...requests[0], trial: 40 }]])
      expect(answersLine({ requests: changed })?.outcome).toBe('fail');
  });

  it('has no label on the record, only leaves [S54]', () => {
    const texts = study.entries
      .filter(({ kind }) => kind === 'presentation-requested')
      .map(({ payload }) => Object.keys(payload).sort().join());
    expect(new Set(texts)).toEqual(new Set(['leaf,presentation,seat,session,trial']));
  });

  it('says how it was run and how often each was asked for [S56]', () => {
    const states = sessionsInRecord(study.entries, abx);
    expect(onRequestSentence(states, study.requests ?? [], abx)).toMatch(
      /^Run on request of a single listener: 3\.\d presentations in a trial on average \(A 1\.0, B 1\.0, X 1\.\d\), at most 5\.$/,
    );
    expect(blindingRung(study.entries, states, abx).why).toContain('saw codes and never what was asked for');
  });
});
