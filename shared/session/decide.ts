import type { ProctorCommand, ScannedBy } from '../contracts/proctor-live.ts';
import { Problem } from '../problem.ts';
import { contributionCommitment } from './answer-leaf.ts';
import { requireBreak, sittingMs, whyRest } from './blocks.ts';
import { cautionsOf, isLastStep, nextStep, stepEndsAt } from './change-steps.ts';
import { type LevelCommand, recordLevels, requireHalfTime, requireLevels, skipLevels } from './decide-levels.ts';
import { keepRemark, type RemarkKept } from './decide-remarks.ts';
import {
  decideByHand,
  decideInventoryEnd,
  decideInventoryScan,
  decideScan,
  decideUndo,
  isInventoryDue,
  requireScanned,
} from './decide-scan.ts';
import type { PayloadOf, SessionEvent, SessionEventKind } from './events.ts';
import type { LabelEnd } from './label-text.ts';
import { type RequestCommand, request, waitsForListeners } from './on-request.ts';
import { excerptOfPractice, isTraining, practiceAsked } from './practice.ts';
import { activeSeats, excerptOf, listeningMayStartAt, nextTrial, openAnswers, trialsInAll } from './progress.ts';
import { soundToRecord } from './sound.ts';
import type { OpenTrial, SessionState } from './state.ts';

type Plain<C> = C extends unknown ? Omit<C, 'expectVersion'> : never;

/** Everything that can be asked of a session: the proctor's commands, the phones', and the clock's. */
export type SessionCommand =
  | Plain<Exclude<ProctorCommand, { kind: 'open-seating' | 'scan-label' | 'end-inventory' }>>
  | { kind: 'open-seating'; commitment: string }
  | {
      kind: 'take-seat';
      seat: string;
      commitment: string;
      consentVersion: number;
      joinedBy: 'code' | 'personal-link';
    }
  | { kind: 'reveal'; seat: string; value: string }
  | RequestCommand
  | { kind: 'too-loud'; seat: string }
  | { kind: 'leave'; seat: string }
  | {
      kind: 'note-scan';
      code: string;
      end: LabelEnd | null;
      by: ScannedBy;
      verdict: 'wanted' | 'other-code' | 'other-study';
    }
  | { kind: 'note-inventory-scan'; code: string; by: ScannedBy; isOurs: boolean }
  | { kind: 'note-inventory-end'; codes: readonly string[]; reason: string }
  | { kind: 'note-late-answer'; seat: string; trial: number; leaf: string }
  | { kind: 'note-restart' }
  | RemarkKept
  | Extract<LevelCommand, { kind: 'record-levels' }>
  | { kind: 'tick' };

export type Emit = <K extends SessionEventKind>(kind: K, payload: Omit<PayloadOf<K>, 'session'>) => SessionEvent;

function refuseUnless(holds: boolean, code: ConstructorParameters<typeof Problem>[0], detail: string): void {
  if (!holds) throw new Problem(code, detail);
}

function requirePhase(state: SessionState, phases: readonly SessionState['phase'][], detail: string): void {
  refuseUnless(phases.includes(state.phase), 'wrong-phase', detail);
}

function requireOpenTrial(state: SessionState): OpenTrial {
  if (state.phase !== 'running' || state.trial === null) throw new Problem('wrong-phase', 'No trial is open.');
  return state.trial;
}

function seatsForTrial(state: SessionState): string[] {
  requirePhase(state, ['running'], 'Trials start once the draw is fixed.');
  refuseUnless(state.trial === null, 'wrong-phase', 'A trial is open already.');
  refuseUnless(state.paused === null, 'wrong-phase', 'The session is paused. Resume it first.');
  const seats = activeSeats(state).map((seat) => seat.seat);
  refuseUnless(seats.length > 0, 'wrong-phase', 'Nobody is seated.');
  return seats;
}

function openTrial(state: SessionState, trial: number, now: number, emit: Emit): SessionEvent[] {
  const seats = seatsForTrial(state);
  const { lastEndedAt, sittings } = state.blocks;
  const isNewSitting = lastEndedAt !== null && now > lastEndedAt + sittingMs;
  return [
    ...(isNewSitting ? [emit('sitting-began', { sitting: sittings + 1 })] : []),
    emit('trial-opened', { trial, excerpt: excerptOf(state, trial), seats }),
  ];
}

function confirmStep(state: SessionState, step: string, now: number, emit: Emit): SessionEvent[] {
  const trial = requireOpenTrial(state);
  refuseUnless(state.paused === null, 'wrong-phase', 'The session is paused. Resume it first.');
  const { plan } = state;
  const expected = nextStep(trial, plan);
  if (expected === null || expected !== step) throw new Problem('stale-view', 'That step is done already.');
  const { trial: number, presentation } = trial;
  if (!isLastStep(trial, plan)) {
    refuseUnless(now >= (stepEndsAt(trial, plan) ?? now), 'too-early', 'This step lasts its least time, every time.');
    requireScanned(trial, expected);
    return [emit('step-confirmed', { trial: number, presentation, step: expected })];
  }
  const startsAt = listeningMayStartAt(trial, plan, now);
  refuseUnless(
    now >= startsAt,
    'too-early',
    'Every change lasts its registered time. Listening starts when it is over.',
  );
  const lengths = Math.round((startsAt - trial.changeStartedAt) / plan.changeMs);
  return [emit('listening-started', { trial: number, presentation, lengths })];
}

/** Locks the trial; where that ends a block and trials remain, the break begins at once. */
function lockTrial(
  state: SessionState,
  trial: OpenTrial,
  reason: 'all-in' | 'window-ended',
  emit: Emit,
): SessionEvent[] {
  if (trial.practice !== null) {
    const { number } = trial.practice;
    return [emit('practice-ended', { number, answered: trial.answers.length, of: trial.seats.length })];
  }
  const leaves = [...trial.answers].sort((a, b) => (a.seat < b.seat ? -1 : 1));
  const held = new Set(leaves.map((answer) => answer.seat));
  const missing = trial.seats.filter((seat) => !held.has(seat));
  const locked = emit('trial-locked', { trial: trial.trial, reason, leaves, missing });
  const { breaks } = state.plan;
  const isBlockOver = breaks !== undefined && state.blocks.locked + 1 >= breaks.trials;
  const isLast = state.ended.length + 1 >= trialsInAll(state);
  return isBlockOver && !isLast ? [locked, emit('paused', { reason: 'break', seat: null })] : [locked];
}

function resume(state: SessionState, reason: string, now: number, emit: Emit): SessionEvent[] {
  const rest = whyRest(state, now);
  if (rest !== null && reason === '') throw new Problem('too-early', rest);
  return [emit('resumed', rest === null ? {} : { early: reason })];
}

function fixDraw(state: SessionState, emit: Emit, lastRevealed?: string): SessionEvent {
  const contributors = contributorsOf(state).filter((seat) => seat.revealed !== null || seat.seat === lastRevealed);
  return emit('draw-fixed', { contributors: contributors.map((seat) => seat.seat) });
}

const contributorsOf = (state: SessionState) => state.seats.filter((seat) => seat.contributes);

function reveal(state: SessionState, seatLabel: string, value: string, emit: Emit): SessionEvent[] {
  requirePhase(state, ['revealing'], 'Randomness is not being collected now.');
  const seat = contributorsOf(state).find((candidate) => candidate.seat === seatLabel);
  if (seat === undefined) throw new Problem('wrong-phase', 'This phone joined too late to contribute to the draw.');
  if (seat.revealed !== null) return [];
  refuseUnless(
    contributionCommitment(value) === seat.commitment,
    'invalid-input',
    'This is not what the phone committed to.',
  );
  const waiting = contributorsOf(state).filter((other) => other.revealed === null && other.seat !== seatLabel);
  const revealed = emit('contribution-revealed', { seat: seatLabel, value });
  return waiting.length > 0 ? [revealed] : [revealed, fixDraw(state, emit, seatLabel)];
}

function tick(state: SessionState, now: number, emit: Emit): SessionEvent[] {
  if (state.phase === 'revealing' && state.revealEndsAt !== null && now >= state.revealEndsAt) {
    const silent = contributorsOf(state).filter((seat) => seat.revealed === null);
    return [...silent.map(({ seat }) => emit('contribution-dropped', { seat })), fixDraw(state, emit)];
  }
  const { trial } = state;
  if (trial === null || state.paused !== null || trial.endsAt === null || now < trial.endsAt) return [];
  if (trial.stage === 'listening')
    return [emit('listening-ended', { trial: trial.trial, presentation: trial.presentation })];
  return lockTrial(state, trial, openAnswers(state, trial).length === 0 ? 'all-in' : 'window-ended', emit);
}

function requireSeat(state: SessionState, label: string): void {
  const seat = state.seats.find((candidate) => candidate.seat === label);
  if (seat === undefined) throw new Problem('not-found', 'There is no such seat in this session.');
  refuseUnless(!seat.left, 'wrong-phase', 'This listener has left the session.');
}

/**
 * What a command does to a session: the events to record, possibly none.
 *
 * @param state the session as it stands, with the open trial's held answers
 * @param now   milliseconds since 1970
 * @throws Problem when the command is refused; nothing is then recorded
 */
export function decide(state: SessionState, command: SessionCommand, now: number): SessionEvent[] {
  const emit: Emit = (kind, payload) =>
    ({ kind, at: now, payload: { session: state.session, ...payload } }) as unknown as SessionEvent;
  const live = ['seating', 'revealing', 'running'] as const;
  switch (command.kind) {
    case 'confirm-cautions': {
      requirePhase(state, ['planned'], 'The cautions are confirmed before seating opens.');
      const due = cautionsOf(state.plan);
      const missing = due.filter((caution) => !command.items.includes(caution));
      refuseUnless(missing.length === 0, 'invalid-input', 'Read and tick every caution before you go on.');
      return state.cautionsConfirmed ? [] : [emit('cautions-confirmed', { items: due })];
    }
    case 'open-seating':
      requirePhase(state, ['planned'], 'Seating is open already.');
      refuseUnless(state.cautionsConfirmed, 'wrong-phase', 'Confirm the cautions first.');
      requireLevels(state);
      return [emit('seating-opened', { commitment: command.commitment })];
    case 'take-seat': {
      requirePhase(state, live, 'This session takes no listeners now.');
      const { seat, commitment, consentVersion, joinedBy } = command;
      const isTaken = state.seats.some((other) => other.seat === seat);
      refuseUnless(!isTaken, 'already-taken', 'This listener has a seat in this session already.');
      const contributes = state.phase === 'seating';
      const isFull = state.plan.onRequest !== undefined && activeSeats(state).length > 0;
      refuseUnless(!isFull, 'already-taken', 'This session is for one listener, and the seat is taken.');
      return [emit('listener-joined', { seat, commitment, consentVersion, contributes, joinedBy })];
    }
    case 'close-seating': {
      requirePhase(state, ['seating'], 'Seating is closed already.');
      refuseUnless(activeSeats(state).length > 0, 'wrong-phase', 'Nobody is seated yet.');
      const contributors = activeSeats(state).filter((seat) => seat.contributes);
      return [
        emit('contributions-fixed', {
          contributors: contributors.map(({ seat, commitment }) => ({ seat, commitment })),
        }),
      ];
    }
    case 'reveal':
      return reveal(state, command.seat, command.value, emit);
    case 'begin-familiarisation':
      refuseUnless(isTraining(state), 'wrong-phase', 'The familiarisation is over once the first trial has opened.');
      requireLevels(state);
      return openTrial(state, 0, now, emit);
    case 'begin-practice': {
      const seats = seatsForTrial(state);
      const asked = practiceAsked(state, command);
      return [emit('practice-opened', { ...asked, excerpt: excerptOfPractice(state, asked), seats })];
    }
    case 'begin-trial': {
      refuseUnless(state.familiarisations > 0, 'wrong-phase', 'The familiarisation trial comes first.');
      const next = nextTrial(state);
      if (next === null) throw new Problem('wrong-phase', 'Every trial of this session has ended.');
      requireBreak(state);
      requireHalfTime(state);
      return openTrial(state, next, now, emit);
    }
    case 'confirm-step':
      return confirmStep(state, command.step, now, emit);
    case 'note-scan':
      return decideScan(state, command, now, emit);
    case 'confirm-by-hand':
      return decideByHand(state, command, now, emit);
    case 'undo-step':
      return decideUndo(state, emit);
    case 'note-inventory-scan':
      return decideInventoryScan(state, command, emit);
    case 'note-inventory-end':
      return decideInventoryEnd(state, command, emit);
    case 'request-presentation': {
      const requested = request(state, requireOpenTrial(state), command);
      return requested === null ? [] : [emit('presentation-requested', requested)];
    }
    case 'lock-trial': {
      const trial = requireOpenTrial(state);
      refuseUnless(waitsForListeners(trial), 'wrong-phase', 'A trial locks after its answers.');
      refuseUnless(state.paused === null, 'wrong-phase', 'The session is paused. Resume it first.');
      const open = openAnswers(state, trial);
      refuseUnless(open.length === 0, 'too-early', `The trial waits for ${open.join(', ')} until its window ends.`);
      return lockTrial(state, trial, 'all-in', emit);
    }
    case 'void-trial': {
      const { trial, answers } = requireOpenTrial(state);
      const { reason, note } = command;
      return [emit('trial-voided', { trial, reason, note, answersHeld: answers.length })];
    }
    case 'pause':
      requirePhase(state, ['running'], 'Only a running session can be paused.');
      refuseUnless(state.paused === null, 'wrong-phase', 'The session is paused already.');
      return [emit('paused', { reason: command.reason, seat: null })];
    case 'too-loud':
      requireSeat(state, command.seat);
      requirePhase(state, live, 'The session is over.');
      if (state.paused?.reason === 'too-loud') return [];
      return [emit('paused', { reason: 'too-loud', seat: command.seat })];
    case 'resume':
      refuseUnless(state.paused !== null, 'wrong-phase', 'The session is not paused.');
      return resume(state, command.reason ?? '', now, emit);
    case 'leave':
    case 'excuse-seat':
      requirePhase(state, live, 'The session is over.');
      requireSeat(state, command.seat);
      return [emit('listener-left', { seat: command.seat, by: command.kind === 'leave' ? 'listener' : 'proctor' })];
    case 'note-late-answer': {
      const { trial, seat, leaf } = command;
      const noted = state.late.some((late) => late.trial === trial && late.seat === seat);
      return noted ? [] : [emit('answer-late', { trial, seat, leaf })];
    }
    case 'keep-remark':
      return keepRemark(state, command, emit);
    case 'note-restart':
      return (live as readonly string[]).includes(state.phase) ? [emit('server-restarted', {})] : [];
    case 'record-deviation':
      return [emit('deviation-recorded', { text: command.text })];
    case 'record-levels':
      return recordLevels(state, command, emit);
    case 'record-sound-level':
      return [emit('sound-level-recorded', soundToRecord(state, command))];
    case 'skip-levels':
      return skipLevels(state, command.reason, emit);
    case 'finish':
      requirePhase(state, ['running'], 'Only a running session can be finished.');
      refuseUnless(
        state.trial === null && state.familiarisations > 0 && nextTrial(state) === null,
        'wrong-phase',
        'Trials are still to come. To end here, abandon the session with a reason.',
      );
      refuseUnless(
        !isInventoryDue(state),
        'wrong-phase',
        'Go through the sleeves once more first, or end the inventory with a reason.',
      );
      return [emit('session-finished', {})];
    case 'abandon':
      requirePhase(state, ['planned', ...live], 'The session is over already.');
      return [
        emit('session-abandoned', {
          reason: command.reason,
          openTrial: state.trial?.trial ?? null,
          answersHeld: state.trial?.answers.length ?? 0,
        }),
      ];
    case 'tick':
      return tick(state, now, emit);
  }
}
