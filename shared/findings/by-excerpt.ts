import type { AnswerRate, ScoredTrial } from '../methods/method.ts';
import { hasOwnDraws } from './own-draws.ts';
import { type DueAnswer, ownDrawLimits, panelLimits } from './rate-limits.ts';

/** A rate over a part of the trials: how many of the answers due count, and between which limits the rate lies. */
export type CountedRate = {
  readonly label: string;
  readonly counted: number;
  readonly due: number;
  readonly missing: number;
  /** At 95 %; null where nothing was due, or where listeners heard the same and nothing varies between trials. */
  readonly interval: { readonly lower: number; readonly upper: number } | null;
};

export type ExcerptResult = {
  /** Its place in the programme, from 0. */
  readonly excerpt: number;
  readonly trials: number;
  readonly rates: readonly CountedRate[];
};

/**
 * A rate over some trials with limits that suit how the draws were shared: Clopper-Pearson where every answer has a draw
 * of its own, Student's t over trials in a group.
 *
 * @see ownDrawLimits and panelLimits for the sources
 */
export function countedRate(label: string, due: readonly DueAnswer[], isOwnDraws: boolean): CountedRate {
  const counted = due.filter(({ counts }) => counts === true).length;
  const missing = due.filter(({ counts }) => counts === null).length;
  const limits =
    due.length === 0 ? null : isOwnDraws ? ownDrawLimits({ counted, missing, due: due.length }) : panelLimits(due);
  return { label, counted, due: due.length, missing, interval: limits?.interval(0.95) ?? null };
}

/**
 * What each excerpt came to, in the method's own rates. Exploratory: excerpts are many and were not registered as
 * hypotheses, so that there are counts and limits and never a p.
 *
 * @param trials   the counted trials of every session
 * @param excerpts how many the programme has; one that was never played stands with nothing
 */
export function resultsByExcerpt(
  trials: readonly (ScoredTrial & { readonly excerpt: number })[],
  rates: readonly AnswerRate[],
  excerpts: number,
): ExcerptResult[] {
  const isOwnDraws = hasOwnDraws(trials);
  return Array.from({ length: excerpts }, (_, excerpt) => {
    const played = trials.filter((trial) => trial.excerpt === excerpt);
    return {
      excerpt,
      trials: played.length,
      rates: rates.map(({ label, due }) => countedRate(label, played.flatMap(due), isOwnDraws)),
    };
  });
}
