import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { listenerView } from '#shared/contracts/listener-live.ts';
import { proctorView, stepKinds } from '#shared/contracts/proctor-live.ts';
import { Problem } from '#shared/problem.ts';
import type { RigPreset } from '#shared/protocol/rig-preset.ts';
import { shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { isLastStep, nextStep, stepEndsAt } from '#shared/session/change-steps.ts';
import type { SessionCommand } from '#shared/session/decide.ts';
import { replay } from '#shared/session/evolve.ts';
import { startGraceMs } from '#shared/session/state.ts';
import { listenerViewOf, proctorViewOf } from '#shared/session/views.ts';
import { MachineSession, planWith } from '../../support/state-machine.ts';

// Whatever anybody sends, in whatever order: the state is the replay of its events, every change lasts a whole number of
// its registered lengths, and no view has a field that is not listed here.

const seats = ['L01', 'L02'] as const;
const seat = fc.constantFrom(...seats);

const anything: fc.Arbitrary<SessionCommand> = fc.oneof(
  fc.record({ kind: fc.constant('confirm-step' as const), step: fc.constantFrom(...stepKinds) }),
  fc.record({
    kind: fc.constant('note-scan' as const),
    code: fc.constantFrom('417', '582'),
    end: fc.constantFrom(1 as const, 2 as const, null),
    by: fc.constantFrom('scanner' as const, 'typed' as const, 'camera' as const),
    verdict: fc.constantFrom('wanted' as const, 'other-code' as const, 'other-study' as const),
  }),
  fc.constant({ kind: 'confirm-by-hand' as const, reason: 'torn' }),
  fc.constant({ kind: 'begin-familiarisation' as const }),
  fc.constant({ kind: 'begin-practice' as const, form: 'blind' as const, step: null }),
  fc.constant({ kind: 'undo-step' as const }),
  fc.constant({ kind: 'pause' as const, reason: 'break' as const }),
  fc.constant({ kind: 'resume' as const }),
  fc.record({ kind: fc.constant('too-loud' as const), seat }),
  fc.constant({ kind: 'leave' as const, seat: 'L02' }),
  fc.constant({ kind: 'void-trial' as const, reason: 'noise' as const, note: '' }),
  fc.constant({ kind: 'lock-trial' as const }),
  fc.constant({ kind: 'note-restart' as const }),
  fc.constant({ kind: 'finish' as const }),
  fc.record({
    kind: fc.constant('note-inventory-scan' as const),
    code: fc.constantFrom('417', '582', '903'),
    by: fc.constant('scanner' as const),
    isOurs: fc.boolean(),
  }),
  fc.constant({ kind: 'note-inventory-end' as const, codes: ['417', '582'], reason: 'enough' }),
);

type Move = { readonly kind: 'go-on' } | { readonly kind: 'hold'; readonly seat: string } | SessionCommand;
const move: fc.Arbitrary<Move> = fc.oneof(
  { weight: 6, arbitrary: fc.constant({ kind: 'go-on' as const }) },
  { weight: 1, arbitrary: fc.record({ kind: fc.constant('hold' as const), seat }) },
  { weight: 2, arbitrary: anything },
);

/** What the console would do next, at the time at which it may. */
function goOn(desk: MachineSession): void {
  const { trial, paused, plan } = desk.state;
  if (paused !== null) desk.do({ kind: 'resume' });
  else if (trial === null) desk.do({ kind: desk.state.familiarisations > 0 ? 'begin-trial' : 'begin-familiarisation' });
  else if (trial.stage !== 'change') {
    desk.now = Math.max(desk.now, trial.endsAt ?? desk.now);
    desk.do({ kind: 'tick' });
  } else {
    const step = nextStep(trial, plan);
    if (step === null) return;
    desk.now = Math.max(desk.now, stepEndsAt(trial, plan) ?? 0);
    if (isLastStep(trial, plan)) desk.now = Math.max(desk.now, trial.changeStartedAt + plan.changeMs);
    if (step === 'scan' && trial.scannedEnds.length < 2)
      desk.do({ kind: 'note-scan', code: '417', end: null, by: 'scanner', verdict: 'wanted' });
    else desk.do({ kind: 'confirm-step', step });
  }
}

function make(desk: MachineSession, one: Move): void {
  if (one.kind === 'hold') {
    const { trial } = desk.state;
    if (trial?.stage === 'answering' && trial.seats.includes(one.seat)) desk.hold(one.seat);
    return;
  }
  try {
    if (one.kind === 'go-on') goOn(desk);
    else desk.do(one);
  } catch (error) {
    if (!(error instanceof Problem)) throw error;
  }
}

const preset: RigPreset = shippedPresets.loudspeaker;
const course = fc.array(fc.tuple(fc.nat(12_000), move), { minLength: 40, maxLength: 160 });

function run(moves: readonly (readonly [number, Move])[], each: (desk: MachineSession) => void = () => {}) {
  const desk = new MachineSession({ ...planWith(preset), trials: 5, spares: 1 });
  desk.seat(seats);
  for (const [waitMs, one] of moves) {
    desk.now += waitMs;
    make(desk, one);
    each(desk);
  }
  return desk;
}

/** Every name of a field that a view has, however deep. */
function keysOf(value: unknown, keys = new Set<string>()): Set<string> {
  if (Array.isArray(value)) for (const one of value) keysOf(one, keys);
  else if (typeof value === 'object' && value !== null)
    for (const [key, inner] of Object.entries(value)) keysOf(inner, keys.add(key));
  return keys;
}

// A new field of a view is listed here once somebody has asked whether whoever gets it may know it.
const inBoth =
  'audience now title session phase paused course trial number of familiarisation stage presentationNumber presentations endsAt state seat rehearsal text practice';
const listenersFields = new Set(
  `${inBoth} sessionId contributes revealWanted left takesPart presentation spoken held question explanation announcement options value letter sentence short confidence lastLock lastOutcome outcome counted feedback told requests exit guesses break leastEndsAt`.split(
    ' ',
  ),
);
const proctorsFields = new Set(
  `${inBoth} version room method rig cautions cautionsConfirmed steps kind leastS act how done reason since join dueAt revealed familiarised code excerpt stepsDone step stepEndsAt scannedEnds undo longChange answered expected nextTrial scans made byHand wrong inventory found foreign isEnded missing seats place awaySince late record entries sessionEntries demo levels handling checks check at isIn due bar sound tenthsDba response instrument advice excerptStart excerptS training practised form onRequest block trials locked isBreakDue break leastEndsAt why said exit`.split(
    ' ',
  ),
);

describe('any commands, in any order', () => {
  it('leave a state that is the replay of its events, but for answers held [S32]', () => {
    fc.assert(
      fc.property(course, (moves) => {
        const desk = run(moves);
        const replayed = replay(desk.events, desk.method);
        const { trial } = desk.state;
        const withoutAnswers = trial === null ? desk.state : { ...desk.state, trial: { ...trial, answers: [] } };
        expect(replayed).toEqual(withoutAnswers);
      }),
      { numRuns: 40 },
    );
  });

  it('start listening a whole number of registered lengths after the change began, told in the entry [S5] [S32]', () => {
    let heard = 0;
    fc.assert(
      fc.property(course, (moves) => {
        let began = 0;
        let seen = 0;
        run(moves, (desk) => {
          for (const event of desk.events.slice(seen)) {
            if (event.kind !== 'listening-started') continue;
            heard += 1;
            const late = event.at - began - event.payload.lengths * desk.state.plan.changeMs;
            expect(late).toBeGreaterThanOrEqual(0);
            expect(late).toBeLessThanOrEqual(startGraceMs(desk.state.plan.changeMs));
          }
          seen = desk.events.length;
          if (desk.state.trial?.stage === 'change') began = desk.state.trial.changeStartedAt;
        });
      }),
      { numRuns: 40 },
    );
    expect(heard).toBeGreaterThan(40);
  });

  it('show a listener and the proctor nothing but what is listed [S32] [B1]', () => {
    const context = { title: 'Study Plover', rehearsal: false };
    let views = 0;
    fc.assert(
      fc.property(course, (moves) => {
        run(moves, ({ state, method, now }) => {
          views += 1;
          const phone = { ...context, seat: 'L01', now, held: null, lastLock: null, told: null };
          const forListener = listenerView.parse(listenerViewOf(state, method, phone));
          const presence = seats.map((one) => ({ seat: one, place: '', awaySince: null }));
          const desk = { ...context, room: '', now, code: '417', codesInAll: 2, join: null, presence, entries: 1 };
          const forProctor = proctorView.parse(proctorViewOf(state, method, { ...desk, demo: false }));
          expect([...keysOf(forListener)].filter((key) => !listenersFields.has(key))).toEqual([]);
          expect([...keysOf(forProctor)].filter((key) => !proctorsFields.has(key))).toEqual([]);
        });
      }),
      { numRuns: 15 },
    );
    expect(views).toBeGreaterThan(500);
  });
});
