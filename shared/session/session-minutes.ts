import type { Method } from '../methods/method.ts';
import type { SessionPlan } from './events.ts';

/**
 * How long a session takes as listeners are told: every presentation with its change, the answers, the familiarisation,
 * and the least of every registered break; on request as many presentations as a trial may have.
 *
 * @returns whole minutes, at least 1, rounded up
 */
export function sessionMinutes(plan: SessionPlan, method: Method): number {
  const longestMs = Math.max(...plan.programme.map(({ lengthMs }) => lengthMs));
  const presentationMs = plan.changeMs + longestMs;
  const presentations = plan.onRequest?.most ?? method.presentations.length;
  const trialMs = presentations * presentationMs + plan.answerMs;
  const { breaks } = plan;
  const breakMs =
    breaks === undefined ? 0 : Math.floor((plan.trials - 1) / breaks.trials) * breaks.leastMinutes * 60_000;
  const heardMs = plan.trials * trialMs + method.familiarisation.length * presentationMs;
  return Math.max(1, Math.ceil((heardMs + breakMs) / 60_000));
}
