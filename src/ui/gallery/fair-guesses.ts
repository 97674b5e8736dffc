import type { CountChance } from '../distribution-bars.ts';

/** Chance of each number of right answers in so many fair guesses, by the ratio of neighbouring terms around the middle. */
export function fairGuesses(trials: number): CountChance[] {
  const middle = Math.floor(trials / 2);
  const weights = new Array<number>(trials + 1).fill(0);
  weights[middle] = 1;
  for (let count = middle; count < trials; count += 1) {
    weights[count + 1] = ((weights[count] ?? 0) * (trials - count)) / (count + 1);
  }
  for (let count = middle; count > 0; count -= 1) {
    weights[count - 1] = ((weights[count] ?? 0) * count) / (trials - count + 1);
  }
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return weights.map((weight, count) => ({ count, chance: weight / total }));
}
