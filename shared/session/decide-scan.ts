import { Problem } from '../problem.ts';
import { nextStep, scansOf, stepEndsAt } from './change-steps.ts';
import type { Emit, SessionCommand } from './decide.ts';
import type { SessionEvent } from './events.ts';
import { waitsForListeners } from './on-request.ts';
import { nextTrial } from './progress.ts';
import type { OpenTrial, SessionState } from './state.ts';

// What is read off the sleeves: at every change, and once more at the end of the session. Whether a code is the one to be
// fitted is told by the gate to the secrets; nothing here knows it.

type Command<K extends SessionCommand['kind']> = Extract<SessionCommand, { kind: K }>;

function requireScan(state: SessionState): OpenTrial {
  const { trial, plan } = state;
  if (state.phase !== 'running' || trial === null || nextStep(trial, plan) !== 'scan')
    throw new Problem('wrong-phase', 'Nothing is to be scanned now.');
  if (state.paused !== null) throw new Problem('wrong-phase', 'The session is paused. Resume it first.');
  return trial;
}

/** A label held up at the step for it. The second end ends the step, unless its least wait is still running. */
export function decideScan(
  state: SessionState,
  { code, end, by, verdict }: Command<'note-scan'>,
  now: number,
  emit: Emit,
): SessionEvent[] {
  const trial = requireScan(state);
  const at = { trial: trial.trial, presentation: trial.presentation };
  if (verdict !== 'wanted') return [emit('scan-refused', { ...at, code, why: verdict, by })];
  const ends = trial.scannedEnds;
  if (end !== null && ends.includes(end))
    throw new Problem('already-taken', 'This end is scanned already. Scan the label at the other end.');
  const scanned = emit('label-scanned', { ...at, end: end ?? (ends.includes(1) ? 2 : 1), by });
  const isOver = now >= (stepEndsAt(trial, state.plan) ?? now);
  return ends.length === 1 && isOver ? [scanned, emit('step-confirmed', { ...at, step: 'scan' })] : [scanned];
}

/** Whoever cannot scan says why, and has read both ends. */
export function decideByHand(
  state: SessionState,
  { reason }: Command<'confirm-by-hand'>,
  now: number,
  emit: Emit,
): SessionEvent[] {
  const trial = requireScan(state);
  if (now < (stepEndsAt(trial, state.plan) ?? now))
    throw new Problem('too-early', 'This step lasts its least time, every time.');
  const at = { trial: trial.trial, presentation: trial.presentation };
  return [
    emit('scan-by-hand', { ...at, reason, ends: trial.scannedEnds.length }),
    emit('step-confirmed', { ...at, step: 'scan' }),
  ];
}

/** Takes back the last step of the open change; while they listen, the start, and the presentation begins with its change. */
export function decideUndo(state: SessionState, emit: Emit): SessionEvent[] {
  const { trial } = state;
  if (state.phase !== 'running' || trial === null) throw new Problem('wrong-phase', 'No trial is open.');
  if (state.paused !== null) throw new Problem('wrong-phase', 'The session is paused. Resume it first.');
  const step = trial.stepsDone.at(-1);
  if (waitsForListeners(trial) || trial.answers.length > 0)
    throw new Problem('wrong-phase', 'They are answering. What went wrong before is a void, with its reason.');
  if (step === undefined)
    throw new Problem('wrong-phase', 'This change has only begun; there is no step to take back.');
  return [emit('step-undone', { trial: trial.trial, presentation: trial.presentation, step })];
}

/** Whether every trial has ended and the sleeves are to be gone through once more. */
export const isInventoryDue = (state: SessionState): boolean =>
  state.phase === 'running' &&
  state.trial === null &&
  state.familiarisations > 0 &&
  nextTrial(state) === null &&
  scansOf(state.plan) &&
  state.inventory.ended === null;

function requireInventory(state: SessionState): void {
  if (!isInventoryDue(state)) throw new Problem('wrong-phase', 'The sleeves are gone through after the last trial.');
}

/** A sleeve held up at the end of the session. */
export function decideInventoryScan(
  state: SessionState,
  { code, by, isOurs }: Command<'note-inventory-scan'>,
  emit: Emit,
): SessionEvent[] {
  requireInventory(state);
  const { found, foreign } = state.inventory;
  if (found.includes(code)) throw new Problem('already-taken', `${code} is in already.`);
  return !isOurs && foreign.includes(code) ? [] : [emit('inventory-scanned', { code, by, isOurs })];
}

/** The end of it: complete, or with the missing ones named and a reason, which is a deviation. */
export function decideInventoryEnd(
  state: SessionState,
  { codes, reason }: Command<'note-inventory-end'>,
  emit: Emit,
): SessionEvent[] {
  requireInventory(state);
  const { found, foreign } = state.inventory;
  const missing = codes.filter((code) => !found.includes(code));
  const ended = emit('inventory-ended', { codes: codes.length, missing: [...missing], foreign: [...foreign], reason });
  if (missing.length === 0) return [ended];
  const named = missing.join(', ');
  if (reason === '')
    throw new Problem('invalid-input', `Not found: ${named}. Scan what is missing, or say why it is not.`, [
      { pointer: '/reason', detail: 'Say why, in a few words' },
    ]);
  // Managers read deviations before closing, so this one has no code in it.
  const text = `The inventory was ended with ${missing.length} of ${codes.length} codes not found: ${reason}`;
  return [ended, emit('deviation-recorded', { text })];
}

/** Both ends are in before the step is confirmed by its button. */
export function requireScanned(trial: OpenTrial, step: string): void {
  if (step === 'scan' && trial.scannedEnds.length < 2)
    throw new Problem('wrong-phase', 'Scan the labels at both ends, or confirm by hand and say why.');
}
