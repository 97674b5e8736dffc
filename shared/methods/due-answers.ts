import type { DueAnswer } from '../findings/rate-limits.ts';
import type { ScoredTrial } from './method.ts';

/** The answers due to a trial, each counted or not; one that did not come stays open. */
export function dueAnswers({ session, trial, answers }: ScoredTrial, counts: (choice: string) => boolean): DueAnswer[] {
  return answers.map(({ listener, choice }) => ({
    listener,
    trial: `${session}/${trial}`,
    counts: choice === null ? null : counts(choice),
  }));
}
