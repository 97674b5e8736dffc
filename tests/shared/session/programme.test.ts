import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { abx } from '#shared/methods/abx.ts';
import type { SessionEvent, SessionPlan } from '#shared/session/events.ts';
import { evolve } from '#shared/session/evolve.ts';
import { excerptOf, standsFor } from '#shared/session/progress.ts';
import type { EndedTrial, SessionState } from '#shared/session/state.ts';
import { proctorViewOf } from '#shared/session/views.ts';

function stateOf(plan: Partial<SessionPlan>, voids: readonly number[] = []): SessionState {
  const whole: SessionPlan = {
    method: 'abx',
    trials: 16,
    spares: 4,
    rig: 'line',
    changeMs: 3000,
    answerMs: 5000,
    confidence: false,
    programme: [],
    ...plan,
  };
  const payload = { session: 1, sessionId: 'id', proctor: 'somebody', plan: whole };
  let state = evolve(null, { kind: 'session-planned', at: 0, payload }, abx);
  for (let trial = 1; trial <= Math.max(0, ...voids); trial += 1) {
    const ended: EndedTrial = {
      trial,
      outcome: voids.includes(trial) ? 'void' : 'locked',
      excerpt: excerptOf(state, trial),
      seats: [],
      missing: [],
      longChanges: 0,
      voidReason: null,
    };
    state = { ...state, ended: [...state.ended, ended] };
  }
  return state;
}

const programme = (excerpts: number) =>
  Array.from({ length: excerpts }, (_, index) => ({ title: `Excerpt ${index + 1}`, start: '', lengthMs: 5000 }));

describe('the excerpts of a session', () => {
  it('are spread over trial numbers so that no two counts differ by more than one, whatever the numbers [S80]', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 120 }), fc.integer({ min: 1, max: 12 }), (trials, excerpts) => {
        const state = stateOf({ trials, programme: programme(excerpts) });
        const counts = programme(excerpts).map(() => 0);
        for (let trial = 1; trial <= trials; trial += 1)
          counts[excerptOf(state, trial)] = (counts[excerptOf(state, trial)] ?? 0) + 1;
        expect(Math.max(...counts) - Math.min(...counts)).toBeLessThanOrEqual(1);
      }),
      { numRuns: 50 },
    );
  });

  it('follow from the trial number and the voids alone: the state holds no draw to depend on [S80]', () => {
    const state = stateOf({ trials: 7, programme: programme(3) });
    expect(Array.from({ length: 7 }, (_, index) => excerptOf(state, index + 1))).toEqual([0, 1, 2, 0, 1, 2, 0]);
    expect(JSON.stringify(state)).not.toMatch(/truth|code|secret/);
  });

  it('come again in a spare: that of the void trial it stands for, also where a spare was void [S81]', () => {
    const state = stateOf({ trials: 5, spares: 3, programme: programme(3) }, [2, 6]);
    expect(excerptOf(state, 6)).toBe(excerptOf(state, 2));
    expect(excerptOf(state, 7)).toBe(excerptOf(state, 2));
    expect([5, 6, 7].map((trial) => standsFor(state, trial))).toEqual([5, 2, 2]);
    expect(() => standsFor(state, 8)).toThrow(RangeError);
  });

  it('stand on the console with their start and length from the start of the change on [S82]', () => {
    const opened: SessionEvent = {
      kind: 'trial-opened',
      at: 1000,
      payload: { session: 1, trial: 2, excerpt: 1, seats: ['L01'] },
    };
    const list = [
      { title: 'Piano', start: '', lengthMs: 4000 },
      { title: 'Choir', start: '1:20', lengthMs: 12_000 },
    ];
    const state = evolve({ ...stateOf({ programme: list }), phase: 'running' }, opened, abx);
    const context = { title: '', room: '', now: 1000, code: null, join: null, presence: [], entries: 1 };
    const { trial } = proctorViewOf(state, abx, { ...context, demo: false, rehearsal: false });
    expect(trial).toMatchObject({
      stage: 'change',
      stepsDone: [],
      excerpt: 'Choir',
      excerptStart: '1:20',
      excerptS: 12,
    });
  });
});
