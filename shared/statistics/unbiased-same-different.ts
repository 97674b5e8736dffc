import { normalUpperTail } from './normal-tail.ts';
import type { Psychometric } from './psychometric.ts';

const largestCriterion = 256;

/**
 * Same-different by differences, without bias: the criterion lies where hits are missed as often as false alarms are made.
 *
 * "Different" is said where |x - y| > τ: to same pairs at 2(1 - Φ(τ/√2)), to different ones at
 * 1 - Φ((τ - d′)/√2) + Φ((-τ - d′)/√2). As a rule of deciding its rate is that of hits; false alarms are what it leaves to 1.
 *
 * @example correctRateAt(unbiasedByDifference, 2) // hits 0.6748, false alarms 0.3252
 *   ; R: uniroot(function(t) 2*pnorm(-t/sqrt(2)) - pnorm((t-2)/sqrt(2)) + pnorm((-t-2)/sqrt(2)), c(0, 9))
 * @see sameDifferentSensitivity for d′ behind any two rates, and the sources
 */
export const unbiasedByDifference: Psychometric = {
  chance: 0.5,
  aboveChance: (dPrime) => 0.5 - falseAlarmsAt(dPrime),
  wrong: falseAlarmsAt,
};

function falseAlarmsAt(dPrime: number): number {
  const falseAlarms = (criterion: number) => 2 * normalUpperTail(criterion / Math.SQRT2);
  const missed = (criterion: number) =>
    normalUpperTail((dPrime - criterion) / Math.SQRT2) - normalUpperTail((dPrime + criterion) / Math.SQRT2);
  let low = 0;
  let high = largestCriterion;
  for (;;) {
    const middle = low + (high - low) / 2;
    if (middle <= low || middle >= high) return falseAlarms(middle);
    if (falseAlarms(middle) > missed(middle)) low = middle;
    else high = middle;
  }
}
