import { clopperPearson } from '../statistics/clopper-pearson.ts';
import { sameDifferentLimits } from '../statistics/same-different.ts';
import { sensitivityFace } from './same-different-words.ts';

/**
 * What a study of pairs leaves open in which "different" is said as often to same ones as to different ones.
 *
 * @param trials over all sessions, whole, at least 2; half of them are taken to be different, and half of either called so
 * @returns the sentence of an inconclusive finding
 * @example sameDifferentLeftOpen(16) // 4 each in 8 trials of either kind
 * @see sameDifferentLimits
 */
export function sameDifferentLeftOpen(trials: number): string {
  const half = Math.floor(trials / 2);
  const said = Math.ceil(half / 2);
  const limits = (each: number) => clopperPearson(said, half, each);
  const { upper } = sameDifferentLimits({ hits: limits, falseAlarms: limits }, 0.95);
  const open =
    upper === Number.POSITIVE_INFINITY
      ? 'no d′ is excluded from above'
      : `a d′ up to ${sensitivityFace(String(upper))} is not excluded`;
  return `With as many false alarms as hits, ${said} each in ${half} trials of either kind, ${open} (limits at 95% or more, if percepts are compared by differences).`;
}
