import { normalUpperTail } from './normal-tail.ts';
import type { Psychometric } from './psychometric.ts';

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

/** Newton's steps reach the last digit in fewer than ten; the limit only ends a step back and forth in that digit. */
const mostSteps = 30;
/** √2 times the normal quantile of .75: half of all pairs are called different. */
const criterionAtZero = 0.9538725524;

/** False alarms less missed hits fall with the criterion. It lies above that of d′ = 0 and above d′/2: from there Newton. */
function falseAlarmsAt(dPrime: number): number {
  const falseAlarms = (criterion: number) => 2 * normalUpperTail(criterion / Math.SQRT2);
  let criterion = Math.max(criterionAtZero, dPrime / 2);
  for (let taken = 0; taken < mostSteps; taken += 1) {
    const near = (dPrime - criterion) / Math.SQRT2;
    const far = (dPrime + criterion) / Math.SQRT2;
    const excess = falseAlarms(criterion) - (normalUpperTail(near) - normalUpperTail(far));
    const slope = (2 * density(criterion / Math.SQRT2) + density(near) + density(far)) / Math.SQRT2;
    const next = criterion + excess / slope;
    if (Math.abs(next - criterion) <= 1e-15 * next) break;
    criterion = next;
  }
  return falseAlarms(criterion);
}

const density = (z: number) => Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI);
