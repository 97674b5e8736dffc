import type { CourseRing, HeldAnswer, ListenerView, LockReceipt } from '../contracts/listener-live.ts';
import type { ProctorView } from '../contracts/proctor-live.ts';
import type { Method } from '../methods/method.ts';
import { cautionsOf, nextStep, stepEndsAt, stepsOf } from './change-steps.ts';
import { levelsFor } from './level-view.ts';
import { canRequest, isOnRequest, requestsLeft, takesAnswers, waitsForListeners } from './on-request.ts';
import { isTraining } from './practice.ts';
import {
  activeSeats,
  dueAt,
  listeningMayStartAt,
  nextTrial,
  openAnswers,
  optionsOf,
  presentationNow,
  presentationsOf,
  trialsInAll,
} from './progress.ts';
import { blockFor, breakFor, exitFor, exitsFor } from './remark-views.ts';
import { soundFor } from './sound.ts';
import type { OpenTrial, SessionState } from './state.ts';

// A view is built field by field from nothing; it is never "the state without the secret".

/** The trials of a session as rings on the course line. */
export function courseOf(state: SessionState): CourseRing[] {
  const now = state.trial?.trial ?? nextTrial(state);
  return Array.from({ length: trialsInAll(state) }, (_, index) => {
    const number = index + 1;
    const ended = state.ended.find((trial) => trial.trial === number);
    if (ended !== undefined) return { number, state: ended.outcome };
    return { number, state: number === now && state.phase === 'running' ? 'now' : 'open' };
  });
}

/** What a listener may ask for; null where presentations come in a fixed order. */
function requestsFor(state: SessionState, trial: OpenTrial, method: Method) {
  if (!isOnRequest(state, trial.trial)) return null;
  return {
    left: requestsLeft(state, trial),
    labels: method.presentations.map((label) => ({
      label,
      times: trial.requests.filter((asked) => asked.label === label).length,
      canRequest: canRequest(state, trial, method, label),
    })),
    takesAnswers: takesAnswers(trial, method),
  };
}

/** The number of the presentation now, from 1, and of how many: on request the latest one, of the most that there may be. */
function placeIn(state: SessionState, trial: OpenTrial, method: Method) {
  const { onRequest } = state.plan;
  return onRequest !== undefined && isOnRequest(state, trial.trial)
    ? { presentationNumber: trial.requests.length, presentations: onRequest.most }
    : { presentationNumber: trial.presentation + 1, presentations: presentationsOf(method, trial.trial).length };
}

export type ListenerContext = {
  readonly title: string;
  readonly rehearsal: boolean;
  readonly seat: string;
  readonly now: number;
  readonly held: HeldAnswer | null;
  /** What was right in the practice trial that has just ended, where practice tells it. */
  readonly told: ListenerView['told'];
  readonly lastLock: LockReceipt | null;
};

/** What one listener's phone shows. */
export function listenerViewOf(state: SessionState, method: Method, context: ListenerContext): ListenerView {
  const { title, seat, now, held, lastLock, told } = context;
  const own = state.seats.find((candidate) => candidate.seat === seat);
  const { trial } = state;
  const last = state.ended.at(-1);
  const words = state.plan.onRequest === undefined ? null : method.onRequest;
  return {
    audience: 'listener',
    title,
    rehearsal: context.rehearsal,
    session: state.session,
    sessionId: state.sessionId,
    seat,
    now,
    phase: state.phase === 'planned' ? 'seating' : state.phase,
    contributes: own?.contributes ?? false,
    revealWanted: state.phase === 'revealing' && own?.contributes === true && own.revealed === null,
    left: own?.left ?? true,
    paused: state.paused?.reason ?? null,
    exit: exitFor(state, method, seat),
    break: breakFor(state, seat),
    course: courseOf(state),
    trial:
      trial === null
        ? null
        : {
            number: trial.trial,
            of: trialsInAll(state),
            familiarisation: trial.trial === 0,
            practice:
              trial.practice === null
                ? null
                : { number: trial.practice.number, feedback: trial.practice.form === 'feedback' },
            takesPart: trial.seats.includes(seat),
            stage: trial.stage,
            presentation: presentationNow(state, method) ?? '',
            spoken: method.spoken(presentationNow(state, method) ?? ''),
            ...placeIn(state, trial, method),
            endsAt: state.paused === null ? trial.endsAt : null,
            held,
            requests: requestsFor(state, trial, method),
          },
    question: {
      explanation: words?.explanation ?? method.explanation,
      text: method.question(state.plan),
      announcement: words?.announcement ?? method.announcement,
      options: optionsOf(state, method).map(({ value, letter, sentence, short }) => ({
        value,
        letter,
        sentence,
        short,
      })),
      confidence: state.plan.confidence,
    },
    lastLock,
    told,
    lastOutcome:
      last === undefined
        ? null
        : {
            trial: last.trial,
            outcome: last.outcome,
            counted: last.outcome === 'locked' && last.seats.includes(seat) && !last.missing.includes(seat),
          },
  };
}

export type Presence = { readonly seat: string; readonly place: string; readonly awaySince: number | null };

export type ProctorContext = {
  readonly title: string;
  readonly room: string;
  readonly now: number;
  /** The blind code of the current presentation, or null when none is to be fitted. */
  readonly code: string | null;
  /** How many codes the study has, while they are gone through at the end; null otherwise. */
  readonly codesInAll?: number | null;
  readonly join: ProctorView['join'];
  readonly presence: readonly Presence[];
  readonly entries: number;
  readonly demo: boolean;
  readonly rehearsal: boolean;
};

function seatsFor(state: SessionState, presence: readonly Presence[]): ProctorView['seats'] {
  const answered = new Set(state.trial?.answers.map((answer) => answer.seat));
  return state.seats.map(({ seat, left }) => {
    const here = presence.find((candidate) => candidate.seat === seat);
    const awaySince = left ? null : (here?.awaySince ?? null);
    const present = answered.has(seat) ? 'answered' : awaySince === null ? 'ready' : 'away';
    return {
      seat,
      place: here?.place ?? '',
      state: left ? 'left' : present,
      awaySince,
      late: state.late.some((late) => late.seat === seat),
    };
  });
}

/** The step that `undo-step` would take back. */
const undoOf = (trial: OpenTrial) =>
  waitsForListeners(trial) || trial.answers.length > 0 ? null : (trial.stepsDone.at(-1) ?? null);

const asCodes = (codes: readonly string[]) => codes.map((code) => ({ code }));

/** Every code in it was read off a sleeve, but those that are missing once it is ended. */
function inventoryFor(state: SessionState, codes: number | null): ProctorView['inventory'] {
  const { found, foreign, ended } = state.inventory;
  if (ended === null && codes === null) return null;
  return {
    of: ended?.codes ?? codes ?? 0,
    found: asCodes(found),
    foreign: asCodes(foreign),
    isEnded: ended !== null,
    missing: asCodes(ended?.missing ?? []),
  };
}

function trialFor(state: SessionState, method: Method, context: ProctorContext): ProctorView['trial'] {
  const { trial, plan } = state;
  if (trial === null) return null;
  const mayStartAt = listeningMayStartAt(trial, plan, context.now);
  const endsAt = trial.stage === 'change' ? mayStartAt : trial.endsAt;
  const excerpt = plan.programme[trial.excerpt];
  return {
    number: trial.trial,
    of: trialsInAll(state),
    familiarisation: trial.trial === 0,
    practice: trial.practice,
    stage: trial.stage,
    ...placeIn(state, trial, method),
    onRequest: isOnRequest(state, trial.trial),
    code: context.code,
    excerpt: excerpt?.title ?? '',
    excerptStart: excerpt?.start ?? '',
    excerptS: Math.round((excerpt?.lengthMs ?? 0) / 1000),
    stepsDone: [...trial.stepsDone],
    step: state.paused === null ? nextStep(trial, plan) : null,
    scannedEnds: trial.stage === 'change' ? trial.scannedEnds.length : 0,
    undo: state.paused === null ? undoOf(trial) : null,
    stepEndsAt: state.paused === null ? stepEndsAt(trial, plan) : null,
    endsAt: state.paused === null ? endsAt : null,
    longChange: trial.stage === 'change' && mayStartAt > trial.changeStartedAt + plan.changeMs,
    answered: trial.answers.length,
    expected: trial.answers.length + openAnswers(state, trial).length,
  };
}

/** What the console shows. */
export function proctorViewOf(state: SessionState, method: Method, context: ProctorContext): ProctorView {
  const contributors = state.seats.filter((seat) => seat.contributes);
  const { paused } = state;
  return {
    audience: 'proctor',
    version: state.version,
    now: context.now,
    title: context.title,
    session: state.session,
    room: context.room,
    method: method.name,
    rig: state.plan.rig,
    phase: state.phase,
    cautions: cautionsOf(state.plan),
    cautionsConfirmed: state.cautionsConfirmed,
    steps: stepsOf(state.plan).map(({ kind, leastS, act, how, done }) => ({ kind, leastS, act, how, done })),
    paused: paused === null ? null : { reason: paused.reason, seat: paused.seat, since: paused.since },
    join: context.join,
    dueAt: dueAt(state, context.now),
    revealed:
      state.phase === 'revealing'
        ? { done: contributors.filter((seat) => seat.revealed !== null).length, of: contributors.length }
        : null,
    familiarised: state.familiarisations > 0,
    training: isTraining(state)
      ? { practised: state.practised.length, steps: state.plan.checks?.steps.length ?? 0 }
      : null,
    trial: trialFor(state, method, context),
    nextTrial:
      state.phase === 'running' && state.trial === null && activeSeats(state).length > 0 ? nextTrial(state) : null,
    scans: { made: state.scans.made, byHand: state.scans.byHand, wrong: state.scans.wrong },
    inventory: inventoryFor(state, context.codesInAll ?? null),
    course: courseOf(state),
    seats: seatsFor(state, context.presence),
    levels: levelsFor(state),
    sound: soundFor(state),
    record: { entries: context.entries, sessionEntries: state.version },
    block: blockFor(state, context.now),
    exit: exitsFor(state),
    demo: context.demo,
    rehearsal: context.rehearsal,
  };
}
