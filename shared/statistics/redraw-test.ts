import { requireWhole } from './domain.ts';

/** One trial: what every draw would have added to the sum, and which draw came. */
export interface RedrawnTrial {
  /** Whole numbers, one for each thing that could have been drawn, each as likely. */
  readonly scores: readonly number[];
  /** Which of them was drawn, as an index into scores. */
  readonly drawn: number;
}

export interface RedrawTest {
  readonly observed: number;
  /** Over all draws. */
  readonly mean: number;
  readonly deviation: number;
  /** Chance of a draw whose sum lies as far from the mean, on either side. */
  readonly p: number;
}

/** Beyond so many places scores are taken more coarsely: a coarser score is another score, fixed before the draw too. */
const mostPlaces = 8_000;

/** Floating point adds chances in another order than whole numbers do: what is that close counts as equal. */
const tie = 1e-9;

/**
 * How often a fresh draw of every trial would give a sum of scores as far from its mean as the real draw did.
 *
 * Whatever else happened is held fixed: the scores come from it, and under the null they do not hang on the draw. One draw
 * for a trial, however many people were there. The distribution of the sum is convolved trial by trial, without simulation.
 *
 * @param trials each with at least two scores, whole; may be empty
 * @returns the sum, its mean and standard deviation over all draws, and the two-sided p; 1 where no draw changes anything
 * @throws RangeError when a score is not whole or a draw is not one of the scores
 * @example redrawTest([{ scores: [1, -1], drawn: 0 }, { scores: [1, -1], drawn: 0 }]).p // 2 and -2 of four: 1/2
 * @see Fisher, The Design of Experiments (1935), ch. II; Edgington and Onghena, Randomization Tests, 4th ed. (2007), ch. 3
 */
export function redrawTest(trials: readonly RedrawnTrial[]): RedrawTest {
  for (const { scores, drawn } of trials) {
    requireWhole('scores', scores.length, 2, 1000);
    for (const score of scores) requireWhole('score', score, -1e9, 1e9);
    requireWhole('drawn', drawn, 0, scores.length - 1);
  }
  const counted = coarsened(trials.filter(({ scores }) => scores.some((score) => score !== scores[0])));
  const observed = counted.reduce((sum, { scores, drawn }) => sum + (scores[drawn] ?? 0), 0);
  const mean = counted.reduce((sum, { scores }) => sum + meanOf(scores), 0);
  const variance = counted.reduce((sum, { scores }) => {
    const middle = meanOf(scores);
    return sum + scores.reduce((squares, score) => squares + (score - middle) ** 2, 0) / scores.length;
  }, 0);
  const { lowest, chances } = convolve(counted);
  const distance = Math.abs(observed - mean) - tie;
  let p = 0;
  for (const [index, chance] of chances.entries()) if (Math.abs(lowest + index - mean) >= distance) p += chance;
  return { observed, mean, deviation: Math.sqrt(variance), p: Math.min(1, p) };
}

const meanOf = (scores: readonly number[]) => scores.reduce((sum, score) => sum + score, 0) / scores.length;
const reachOf = ({ scores }: RedrawnTrial) => Math.max(...scores) - Math.min(...scores);

function coarsened(trials: readonly RedrawnTrial[]): readonly RedrawnTrial[] {
  const reach = trials.reduce((sum, trial) => sum + reachOf(trial), 0);
  if (reach <= mostPlaces) return trials;
  const step = reach / mostPlaces;
  return trials.map(({ scores, drawn }) => ({ scores: scores.map((score) => Math.round(score / step)), drawn }));
}

/** The chances of every sum from the lowest possible one on, trial by trial. */
function convolve(trials: readonly RedrawnTrial[]): { lowest: number; chances: Float64Array } {
  let chances = Float64Array.of(1);
  let lowest = 0;
  for (const { scores } of trials) {
    const least = Math.min(...scores);
    const times = new Map<number, number>();
    for (const score of scores) times.set(score - least, (times.get(score - least) ?? 0) + 1);
    const next = new Float64Array(chances.length + Math.max(...times.keys()));
    for (const [moved, count] of times) {
      const share = count / scores.length;
      for (let sum = 0; sum < chances.length; sum += 1)
        next[sum + moved] = (next[sum + moved] ?? 0) + (chances[sum] ?? 0) * share;
    }
    chances = next;
    lowest += least;
  }
  return { lowest, chances };
}
