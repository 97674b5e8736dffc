import { z } from 'zod';
import { Problem } from '../problem.ts';
import type { SessionState } from './state.ts';
import { mostSteps } from './trial-kinds.ts';

// Training, before the first trial that counts: the labelled cables as often as they are wanted, practice on known
// differences with feedback, and blind practice. Practice trials count down from -1, so that no number of a trial that
// counts is ever theirs; their answers are kept nowhere.

export const practiceForms = ['blind', 'feedback'] as const;

/** The most practice trials of a session. */
export const mostPractice = 60;

/** A practice trial: which one it is, from 1; whether phones are told what was right; the step it presents, from 0, or null. */
export const practice = z.strictObject({
  number: z.int().min(1).max(mostPractice),
  form: z.enum(practiceForms),
  /** The place of the protocol's known difference, the largest first; null for the cables of the question. */
  step: z
    .int()
    .min(0)
    .max(mostSteps - 1)
    .nullable(),
});
export type Practice = z.output<typeof practice>;

/** The number under which a practice trial runs. */
export const practiceTrial = ({ number }: Pick<Practice, 'number'>): number => -number;

/** The excerpts in their order, over and over. */
export const excerptOfPractice = ({ plan }: SessionState, { number }: Pick<Practice, 'number'>): number =>
  (number - 1) % plan.programme.length;

/** Whether no trial that counts has been opened yet, so that ears may still be trained. */
export const isTraining = ({ phase, trial, ended }: SessionState): boolean =>
  phase === 'running' && ended.length === 0 && (trial === null || trial.trial <= 0);

/**
 * The practice trial that is asked for, numbered.
 * @throws Problem `wrong-phase` when it is too late or too early for it, `invalid-input` for a step that is not registered
 */
export function practiceAsked(state: SessionState, { form, step }: Omit<Practice, 'number'>): Practice {
  if (!isTraining(state)) throw new Problem('wrong-phase', 'Practice is over once the first trial has opened.');
  if (state.familiarisations === 0) throw new Problem('wrong-phase', 'The familiarisation trial comes first.');
  if (state.practised.length >= mostPractice)
    throw new Problem('wrong-phase', `At most ${mostPractice} practice trials.`);
  const steps = state.plan.checks?.steps.length ?? 0;
  if (form === 'feedback' && (step === null || step >= steps))
    throw new Problem(
      'invalid-input',
      steps === 0
        ? 'This study registers no known differences; practise blind instead.'
        : 'The study registers no such known difference.',
    );
  if (form === 'blind' && step !== null) throw new Problem('invalid-input', 'Blind practice presents the two cables.');
  return { number: state.practised.length + 1, form, step };
}
