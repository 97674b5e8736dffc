import type { Method } from '../methods/method.ts';
import { blocksAfter, noBlocks } from './blocks.ts';
import { stepKindsOf } from './change-steps.ts';
import type { SessionEvent } from './events.ts';
import { isOnRequest, waitsForListeners } from './on-request.ts';
import { practiceTrial } from './practice.ts';
import { presentationsOf } from './progress.ts';
import type { EndedTrial, OpenTrial, SessionState } from './state.ts';
import { revealMs } from './state.ts';

type Folded = Omit<SessionState, 'version'>;

type Opened = Omit<
  OpenTrial,
  'presentation' | 'stage' | 'changeStartedAt' | 'stepsDone' | 'scannedEnds' | 'readyAt' | 'endsAt'
>;

function startChange(trial: Opened, presentation: number, at: number): OpenTrial {
  return {
    ...trial,
    presentation,
    stage: 'change',
    changeStartedAt: at,
    stepsDone: [],
    scannedEnds: [],
    readyAt: at,
    endsAt: null,
  };
}

function openTrialOf(state: SessionState, event: SessionEvent): OpenTrial {
  if (state.trial === null) throw new RangeError(`${event.kind} without an open trial`);
  return state.trial;
}

function endTrial(state: SessionState, ended: Omit<EndedTrial, 'excerpt' | 'seats' | 'longChanges'>): Folded {
  const { excerpt, seats, longChanges } = state.trial ?? { excerpt: 0, seats: [], longChanges: 0 };
  return { ...state, trial: null, paused: null, ended: [...state.ended, { ...ended, excerpt, seats, longChanges }] };
}

/** The listener's turn: as long as an answer would have. */
const asking = (trial: OpenTrial, at: number, { answerMs }: SessionState['plan']): OpenTrial => ({
  ...trial,
  stage: 'asking',
  stepsDone: [],
  scannedEnds: [],
  endsAt: at + answerMs,
});

function afterListening(state: SessionState, trial: OpenTrial, at: number, method: Method): Folded {
  if (isOnRequest(state, trial.trial)) return { ...state, trial: asking(trial, at, state.plan) };
  const isLast = trial.presentation + 1 >= presentationsOf(method, trial.trial).length;
  if (!isLast) return { ...state, trial: startChange(trial, trial.presentation + 1, at) };
  if (trial.trial === 0) return { ...state, trial: null, familiarisations: state.familiarisations + 1 };
  return { ...state, trial: { ...trial, stage: 'answering', endsAt: at + state.plan.answerMs } };
}

function openedBy(event: Extract<SessionEvent, { kind: 'trial-opened' | 'practice-opened' }>) {
  if (event.kind === 'trial-opened') return { trial: event.payload.trial, practice: null };
  const { number, form, step } = event.payload;
  return { trial: practiceTrial({ number }), practice: { number, form, step } };
}

function pauseTrial(state: SessionState, at: number): number | null {
  return state.trial !== null && waitsForListeners(state.trial) && state.trial.endsAt !== null
    ? Math.max(0, state.trial.endsAt - at)
    : null;
}

function resumeTrial(state: SessionState, at: number): OpenTrial | null {
  const { trial, paused } = state;
  if (trial === null) return null;
  if (waitsForListeners(trial)) return { ...trial, endsAt: at + (paused?.remainingMs ?? state.plan.answerMs) };
  return startChange(trial, trial.presentation, at);
}

type ScanEvent = Extract<SessionEvent, { kind: 'label-scanned' | 'scan-refused' | 'scan-by-hand' | 'step-undone' }>;

/** Scans and steps taken back, all within the open change; or a start taken back, which begins the change again. */
function foldScan(state: SessionState, trial: OpenTrial, event: ScanEvent): Folded {
  const { scans } = state;
  switch (event.kind) {
    case 'label-scanned': {
      const scannedEnds = [...trial.scannedEnds, event.payload.end];
      return { ...state, trial: { ...trial, scannedEnds }, scans: { ...scans, made: scans.made + 1 } };
    }
    case 'scan-refused':
      return { ...state, trial: { ...trial, scannedEnds: [] }, scans: { ...scans, wrong: scans.wrong + 1 } };
    case 'scan-by-hand':
      return { ...state, scans: { ...scans, byHand: scans.byHand + 1 } };
    case 'step-undone': {
      const undone = { ...state, scans: { ...scans, undone: scans.undone + 1 } };
      if (trial.stage === 'listening') return { ...undone, trial: startChange(trial, trial.presentation, event.at) };
      const stepsDone = trial.stepsDone.slice(0, -1);
      const scannedEnds = stepsDone.includes('scan') ? trial.scannedEnds : [];
      return { ...undone, trial: { ...trial, stepsDone, scannedEnds, readyAt: event.at } };
    }
  }
}

function fold(state: SessionState, event: SessionEvent, method: Method): Folded {
  switch (event.kind) {
    case 'session-planned':
      throw new RangeError('a session is planned once');
    case 'session-replanned':
      if (state.phase !== 'planned') throw new RangeError('a session that has opened keeps its plan');
      // The rig may be another one now, and its cautions with it.
      return { ...state, plan: event.payload.plan, cautionsConfirmed: false, levels: [] };
    case 'cautions-confirmed':
      return { ...state, cautionsConfirmed: true };
    case 'seating-opened':
      return { ...state, phase: 'seating' };
    case 'listener-joined': {
      const { seat, commitment, contributes, joinedBy } = event.payload;
      const isLinked = joinedBy === 'personal-link';
      const joined = { seat, commitment, contributes, isLinked, revealed: null, left: false };
      return { ...state, seats: [...state.seats, joined] };
    }
    case 'contributions-fixed':
      return { ...state, phase: 'revealing', revealEndsAt: event.at + revealMs };
    case 'contribution-revealed': {
      const { seat, value } = event.payload;
      return { ...state, seats: state.seats.map((s) => (s.seat === seat ? { ...s, revealed: value } : s)) };
    }
    case 'contribution-dropped':
      return {
        ...state,
        seats: state.seats.map((s) => (s.seat === event.payload.seat ? { ...s, contributes: false } : s)),
      };
    case 'draw-fixed':
      return { ...state, phase: 'running', revealEndsAt: null };
    case 'trial-opened':
    case 'practice-opened': {
      const { excerpt, seats } = event.payload;
      const opened = { ...openedBy(event), excerpt, seats, longChanges: 0, answers: [], requests: [] };
      const trial = startChange(opened, 0, event.at);
      return {
        ...state,
        practised: opened.practice === null ? state.practised : [...state.practised, opened.practice],
        trial: isOnRequest(state, trial.trial) ? asking(trial, event.at, state.plan) : trial,
      };
    }
    case 'presentation-requested': {
      const trial = openTrialOf(state, event);
      const requests = [...trial.requests, { leaf: event.payload.leaf, label: null }];
      return { ...state, trial: startChange({ ...trial, requests }, event.payload.presentation, event.at) };
    }
    case 'step-confirmed': {
      const trial = openTrialOf(state, event);
      return {
        ...state,
        trial: { ...trial, stepsDone: [...trial.stepsDone, event.payload.step], readyAt: event.at },
      };
    }
    case 'label-scanned':
    case 'scan-refused':
    case 'scan-by-hand':
    case 'step-undone':
      return foldScan(state, openTrialOf(state, event), event);
    case 'inventory-scanned': {
      const { code, isOurs } = event.payload;
      const { found, foreign, ended } = state.inventory;
      const inventory = isOurs
        ? { found: [...found, code], foreign, ended }
        : { found, foreign: [...foreign, code], ended };
      return { ...state, inventory };
    }
    case 'inventory-ended': {
      const { codes, missing, reason } = event.payload;
      return { ...state, inventory: { ...state.inventory, ended: { codes, missing, reason } } };
    }
    case 'listening-started': {
      const trial = openTrialOf(state, event);
      const lengthMs = state.plan.programme[trial.excerpt]?.lengthMs;
      if (lengthMs === undefined) throw new RangeError(`excerpt ${trial.excerpt} is not in the programme`);
      const longChanges = trial.longChanges + (event.payload.lengths > 1 ? 1 : 0);
      const endsAt = event.at + lengthMs;
      return {
        ...state,
        trial: { ...trial, stage: 'listening', stepsDone: stepKindsOf(state.plan), endsAt, longChanges },
      };
    }
    case 'listening-ended':
      return afterListening(state, openTrialOf(state, event), event.at, method);
    case 'trial-locked': {
      const { trial, missing } = event.payload;
      return endTrial(state, { trial, outcome: 'locked', missing, voidReason: null });
    }
    case 'trial-voided': {
      const { trial, reason } = event.payload;
      if (trial <= 0) return { ...state, trial: null, paused: null };
      return endTrial(state, { trial, outcome: 'void', missing: [], voidReason: reason });
    }
    case 'practice-ended':
      return { ...state, trial: null, paused: null };
    case 'answer-late': {
      const { trial, seat } = event.payload;
      return { ...state, late: [...state.late, { trial, seat }] };
    }
    case 'paused': {
      const { reason, seat } = event.payload;
      return { ...state, paused: { reason, seat, since: event.at, remainingMs: pauseTrial(state, event.at) } };
    }
    case 'resumed':
      return { ...state, paused: null, trial: resumeTrial(state, event.at) };
    case 'server-restarted': {
      const { trial } = state;
      if (trial === null || !waitsForListeners(trial) || state.paused !== null) return state;
      return { ...state, trial: { ...trial, endsAt: event.at + state.plan.answerMs } };
    }
    case 'listener-left':
      return { ...state, seats: state.seats.map((s) => (s.seat === event.payload.seat ? { ...s, left: true } : s)) };
    case 'remark-kept': {
      const { seat, about, leaf } = event.payload;
      return { ...state, remarks: [...state.remarks, { seat, about, leaf }] };
    }
    case 'sitting-began':
    case 'deviation-recorded':
      return state;
    case 'sound-level-recorded': {
      const { tenthsDba, response, instrument, place } = event.payload;
      return { ...state, sound: { tenthsDba, response, instrument, place } };
    }
    case 'levels-measured': {
      const { check, grade, isDrifted } = event.payload;
      return { ...state, levels: [...state.levels, { check, at: event.at, grade, isDrifted }] };
    }
    case 'levels-skipped': {
      const { check } = event.payload;
      return { ...state, levels: [...state.levels, { check, at: event.at, grade: null, isDrifted: null }] };
    }
    case 'session-finished':
      return { ...state, phase: 'finished' };
    case 'session-abandoned':
      return { ...state, phase: 'abandoned', trial: null, paused: null };
  }
}

/** The state after one more event. Pure; the same events give the same state on the server and in a browser. */
export function evolve(state: SessionState | null, event: SessionEvent, method: Method): SessionState {
  if (state === null) {
    if (event.kind !== 'session-planned')
      throw new RangeError(`a session begins with its plan, not with ${event.kind}`);
    const { session, sessionId, proctor, plan } = event.payload;
    return {
      session,
      sessionId,
      proctor,
      plan,
      version: 1,
      phase: 'planned',
      cautionsConfirmed: false,
      seats: [],
      revealEndsAt: null,
      familiarisations: 0,
      practised: [],
      paused: null,
      trial: null,
      ended: [],
      scans: { made: 0, byHand: 0, wrong: 0, undone: 0 },
      inventory: { found: [], foreign: [], ended: null },
      late: [],
      levels: [],
      sound: null,
      blocks: noBlocks,
      remarks: [],
    };
  }
  return { ...fold(state, event, method), blocks: blocksAfter(state, event), version: state.version + 1 };
}

/** The state after all of a session's events, in order; null when there are none. */
export function replay(events: readonly SessionEvent[], method: Method): SessionState | null {
  return events.reduce<SessionState | null>((state, event) => evolve(state, event, method), null);
}

/** The state with an answer held for the open trial (a row beside the record, not an event). */
export function holdAnswer(state: SessionState, seat: string, leaf: string): SessionState {
  if (state.trial === null) throw new RangeError('no trial is open');
  const others = state.trial.answers.filter((answer) => answer.seat !== seat);
  return { ...state, trial: { ...state.trial, answers: [...others, { seat, leaf }] } };
}
