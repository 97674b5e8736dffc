import { requireWhole } from './domain.ts';
import type { SharedTrial } from './shared-presentation-test.ts';

/** Parts of the share above guessing, and Gauss's three points with their weights inside each. */
const parts = 128;
const points = [
  { at: 0.5 - Math.sqrt(0.15), weight: 5 / 18 },
  { at: 0.5, weight: 8 / 18 },
  { at: 0.5 + Math.sqrt(0.15), weight: 5 / 18 },
] as const;

/**
 * How many times better a share of answers above guessing, spread evenly over 0 ... 1, explains the answers to shared
 * presentations than guessing does: the logarithm of the Bayes factor that counts trials and not answers.
 *
 * In each trial the answers that fit the draw are weighed against those that fit every draw it could have been, answers
 * held fixed; what listeners share in a trial is inside its term. With one answer per trial it is the Bayes factor for the
 * prior that is uniform on the share above guessing. It is quoted with that prior and decides nothing. A missing answer
 * counts as one that fits, against whoever would gain by guessing.
 *
 * @param trials counts of answers by label, the label drawn, and answers missing, as the shared-presentation test takes them
 * @param labels how many labels a draw chooses from, whole, 2 ... 10
 * @returns the natural logarithm; below 0 where guessing explains the answers better, 0 without any
 * @throws RangeError when there are fewer labels than two
 * @example for one listener with 12 of 16 in ABX: 1.4189 ; R: log(2^16 * beta(13, 5) * pbeta(.5, 13, 5, FALSE) / .5)
 * @see Vovk & Wang, "E-values: Calibration, combination and applications", Annals of Statistics 49 (2021), 1736-1754, on
 *   products of ratios that expect 1 (from memory); Kass & Raftery, "Bayes factors", JASA 90 (1995), 773-795
 */
export function sharedEvidence(trials: readonly SharedTrial[], labels: number): number {
  requireWhole('labels', labels, 2, 10);
  const terms = trials.map(({ counts, truth, missing }) => {
    const fitting = (counts[truth] ?? 0) + missing;
    // Relative to what fits: exponents of the ratio in the sum over all draws.
    return counts.map((count, label) => (label === truth ? 0 : count - fitting));
  });
  const logs: number[] = [];
  for (let part = 0; part < parts; part += 1)
    for (const { at, weight } of points) {
      const share = (part + at) / parts;
      // r = p (m - 1) / (1 - p), with p = g + (1 - g) share and g = 1/m.
      const logRatio = Math.log1p((labels * share) / (1 - share));
      let sum = Math.log(weight / parts);
      for (const exponents of terms) {
        let mean = 0;
        for (const exponent of exponents) mean += Math.exp(exponent * logRatio);
        sum -= Math.log(mean / labels);
      }
      logs.push(sum);
    }
  const largest = Math.max(...logs);
  return largest + Math.log(logs.reduce((sum, log) => sum + Math.exp(log - largest), 0));
}
