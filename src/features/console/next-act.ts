import { changeSteps, type ProctorView } from '#shared/contracts/proctor-live.ts';
import { stepWords } from './console-words.ts';
import type { ConsoleCommand } from './use-console.ts';

export type NextAct = {
  readonly label: string;
  readonly command: ConsoleCommand;
  readonly step: string | null;
  /** The server's time from which the act is possible, or null when it is possible now. */
  readonly opensAt: number | null;
};

const now = (label: string, command: ConsoleCommand): NextAct => ({ label, command, step: null, opensAt: null });

/** The one act that comes next, or null when the console waits for somebody else. */
export function nextActOf(view: ProctorView): NextAct | null {
  if (view.paused !== null) return now('Resume', { kind: 'resume' });
  if (view.phase === 'planned' && view.cautionsConfirmed) return now('Open seating', { kind: 'open-seating' });
  if (view.phase === 'seating' && view.seats.some(({ state }) => state !== 'left'))
    return now('Close seating and fix the draw', { kind: 'close-seating' });
  if (view.phase !== 'running') return null;
  const { trial } = view;
  if (trial === null) {
    if (!view.familiarised) return now('Begin the familiarisation', { kind: 'begin-familiarisation' });
    if (view.nextTrial !== null) return now(`Begin trial ${view.nextTrial}`, { kind: 'begin-trial' });
    return view.course.every(({ state }) => state === 'locked' || state === 'void')
      ? now('Finish the session', { kind: 'finish' })
      : null;
  }
  if (trial.step !== null) {
    const { step } = trial;
    const { done } = stepWords(step, view.rig, trial.code ?? '');
    const isLast = step === changeSteps.at(-1);
    return { label: done, command: { kind: 'confirm-step', step }, step, opensAt: isLast ? trial.endsAt : null };
  }
  if (trial.stage === 'answering' && trial.answered === trial.expected)
    return now(`Lock trial ${trial.number}`, { kind: 'lock-trial' });
  return null;
}
