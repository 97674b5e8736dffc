import { studyDraft } from '#shared/contracts/studies.ts';
import { breaks } from './plan-of.ts';

export type Sittings = { sessions: number; trials: number };

const { sessions: sessionsField, trials: trialsField } = studyDraft.shape;
const leastTrials = trialsField.minValue ?? 1;
const mostTrials = trialsField.maxValue ?? 1;
const mostSessions = sessionsField.maxValue ?? 1;

/** As many trials as a study can hold. */
export const mostTrialsInAll = mostSessions * mostTrials;

/**
 * So many trials as sessions of equal length, or null where a study cannot hold them: one block a session, and no fewer
 * sessions than are planned, as long as there are enough of them; longer sessions with breaks beyond that.
 */
export function splitTrials(trials: number, planned: Pick<Sittings, 'sessions'>): Sittings | null {
  if (trials > mostTrialsInAll) return null;
  const blocks = Math.ceil(trials / breaks.everyTrials);
  const wanted = Math.min(mostSessions, Math.max(planned.sessions, blocks));
  const sessions = Math.max(1, Math.min(wanted, Math.floor(Math.max(trials, leastTrials) / leastTrials)));
  return { sessions, trials: Math.max(leastTrials, Math.ceil(trials / sessions)) };
}
