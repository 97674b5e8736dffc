import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { startsListening, stepWords } from './console-words.ts';
import type { ConsoleCommand } from './use-console.ts';
import { isCounting, isScanning } from './use-labels.ts';

export type NextAct = {
  readonly label: string;
  readonly command: ConsoleCommand;
  readonly step: string | null;
  /** What the button says before that time, before the seconds. */
  readonly waiting: string;
  /** The server's time from which the act is possible, or null when it is possible now. */
  readonly opensAt: number | null;
};

const now = (label: string, command: ConsoleCommand): NextAct => ({
  label,
  waiting: '',
  command,
  step: null,
  opensAt: null,
});

export const isAnybodySeated = (view: ProctorView): boolean => view.seats.some(({ state }) => state !== 'left');

/** Whether every trial has ended and none is to come. */
export const isComplete = (view: ProctorView): boolean =>
  view.phase === 'running' &&
  view.trial === null &&
  view.nextTrial === null &&
  view.familiarised &&
  view.course.every(({ state }) => state === 'locked' || state === 'void');

/** Whether the session need not wait for levels: they bar the start, or are due at half time. */
export const areLevelsIn = ({ levels }: ProctorView): boolean =>
  levels === null || (levels.bar === null && levels.due !== 'half-time');

/** The one act that comes next, or null when the console waits for somebody else. */
export function nextActOf(view: ProctorView): NextAct | null {
  const rest = view.block?.break;
  if (rest) return { ...now('Go on', { kind: 'resume' }), waiting: 'The break ends in', opensAt: rest.leastEndsAt };
  if (view.paused !== null) return now('Resume', { kind: 'resume' });
  if (view.phase === 'planned' && view.cautionsConfirmed && areLevelsIn(view))
    return now('Open seating', { kind: 'open-seating' });
  if (view.phase === 'seating' && isAnybodySeated(view))
    return now('Close seating and fix the draw', { kind: 'close-seating' });
  if (view.phase !== 'running') return null;
  return view.trial === null ? actBetweenTrials(view) : actInTrial(view, view.trial);
}

function actBetweenTrials(view: ProctorView): NextAct | null {
  if (isComplete(view)) {
    if (isCounting(view)) return null;
    return view.inventory === null || view.inventory.isEnded
      ? now('Finish the session', { kind: 'finish' })
      : now('End the inventory', { kind: 'end-inventory', reason: '' });
  }
  if (!isAnybodySeated(view)) return null;
  if (view.block?.isBreakDue) return now('Begin the break', { kind: 'pause', reason: 'break' });
  if (!areLevelsIn(view)) return null;
  if (!view.familiarised) return now('Begin the familiarisation', { kind: 'begin-familiarisation' });
  return view.nextTrial === null ? null : now(`Begin trial ${view.nextTrial}`, { kind: 'begin-trial' });
}

function actInTrial(view: ProctorView, trial: NonNullable<ProctorView['trial']>): NextAct | null {
  const { step } = trial;
  // A label ends this step, or somebody says why none does.
  if (isScanning(view)) return null;
  if (step !== null) {
    const { done } = stepWords(view, step, trial.code ?? '');
    const isLast = startsListening(view, step);
    const opensAt = isLast ? trial.endsAt : trial.stepEndsAt;
    const waiting = isLast ? 'Listening starts in' : `${done} in`;
    return { label: done, waiting, command: { kind: 'confirm-step', step }, step, opensAt };
  }
  if ((trial.stage === 'answering' || trial.stage === 'asking') && trial.answered === trial.expected)
    return now(trial.practice === null ? `Lock trial ${trial.number}` : 'End this practice', { kind: 'lock-trial' });
  return null;
}
