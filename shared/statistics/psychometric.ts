import type { Interval } from './clopper-pearson.ts';
import { requireBetween } from './domain.ts';
import { normalAreaFromCentre, normalUpperTail } from './normal-tail.ts';

// How often a listener of sensitivity d′ is right, method by method: one dimension, unit-variance normal percepts.

/**
 * A rule of deciding, as the rate of right answers that follows from it. Both sides are given, so that rates keep their
 * digits next to guessing and next to 1.
 */
export interface Psychometric {
  /** Rate of right answers at d′ = 0. */
  readonly chance: number;
  /** Rate of right answers at d′, less the chance; d′ at least 0. */
  readonly aboveChance: (dPrime: number) => number;
  /** One less the rate of right answers at d′. */
  readonly wrong: (dPrime: number) => number;
}

/** A rate short of 1 by a single rounding step lies below this d′ by every rule here. */
const largestDPrime = 64;

/** A rule that needs two independent comparisons to come out alike: both right, or both wrong. */
function bothAlike(firstSpread: number, secondSpread: number): Psychometric {
  return {
    chance: 0.5,
    aboveChance: (dPrime) =>
      2 * normalAreaFromCentre(dPrime / firstSpread) * normalAreaFromCentre(dPrime / secondSpread),
    wrong: (dPrime) => {
      const first = normalUpperTail(dPrime / firstSpread);
      const second = normalUpperTail(dPrime / secondSpread);
      return first * (1 - second) + (1 - first) * second;
    },
  };
}

/**
 * Matching to a reference by distances, in ABX and in duo-trio: the sample nearer to the reference is chosen.
 *
 * With a = d′/√2 and b = d′/√6 the rate is Φ(a)Φ(b) + Φ(-a)Φ(-b) = 1/2 + 2 (Φ(a) - 1/2)(Φ(b) - 1/2).
 *
 * @see Macmillan, Kaplan & Creelman, Psychological Review 84 (1977), 452-471; Ennis, "The power of sensory discrimination
 *   methods", J. Sensory Studies 8 (1993), 353-370, for duo-trio
 */
export const matchingByDistance = bothAlike(Math.SQRT2, Math.sqrt(6));

/**
 * ABX by independent observation: A and B are put in order, X is classified by their midpoint. As above with b = d′/2.
 *
 * @see Hautus & Meng, Perception & Psychophysics 64 (2002), 89-106
 */
export const matchingByMidpoint = bothAlike(Math.SQRT2, 2);

/**
 * Two samples and an attribute of which one has more: the larger percept is chosen. The rate is Φ(d′/√2).
 *
 * @see Thurstone, "A law of comparative judgment", Psychological Review 34 (1927), 273-286; Green & Swets, Signal Detection
 *   Theory and Psychophysics (1966), ch. 2
 */
export const moreOfAttribute: Psychometric = {
  chance: 0.5,
  aboveChance: (dPrime) => normalAreaFromCentre(dPrime / Math.SQRT2),
  wrong: (dPrime) => normalUpperTail(dPrime / Math.SQRT2),
};

/**
 * Triangle by distances: the two percepts nearest to each other are taken for the like pair, the third is called odd.
 *
 * With u the scaled difference of the like pair and v that of the odd one from their middle, v about a = d′ √(2/3), the
 * answer is right where |v| > √3 |u|: within 30° of the v axis. In polar coordinates that is an integral over the angle.
 * It is 2 ∫ [Φ(-z√3 + a) + Φ(-z√3 - a)] φ(z) dz from 0 on, in a form that keeps its digits.
 *
 * @see Ura, "Pair, triangle and duo-trio test", Reports of Statistical Application Research (JUSE) 7 (1960), 107-119;
 *   Ennis (1993), as above
 */
export const oddByDistance: Psychometric = {
  chance: 1 / 3,
  aboveChance: (dPrime) => wedge(dPrime, 0, Math.PI / 6) - 1 / 3,
  wrong: (dPrime) => wedge(dPrime, Math.PI / 6, Math.PI / 2),
};

/** Chance that (u, v) lies between two angles from the v axis, on all four sides; v is about d′ √(2/3), u about 0. */
function wedge(dPrime: number, from: number, to: number): number {
  const a = dPrime * Math.sqrt(2 / 3);
  const density = (angle: number) => {
    const along = a * Math.cos(angle);
    const across = a * Math.sin(angle);
    return (along / Math.sqrt(2 * Math.PI)) * Math.exp(-0.5 * across * across) * 2 * normalAreaFromCentre(along);
  };
  return ((2 * (to - from)) / Math.PI) * Math.exp(-0.5 * a * a) + 2 * integral(density, from, to);
}

/** Nodes and weights of Gauss and Legendre's rule on -1 ... 1, the nodes above 0. */
const nodes = legendreNodes(24);
const panels = 4;

/** Gauss-Legendre integration over four equal panels. @see Abramowitz & Stegun (1964), 25.4.29 */
function integral(f: (x: number) => number, from: number, to: number): number {
  const half = (to - from) / (2 * panels);
  let sum = 0;
  for (let panel = 0; panel < panels; panel++) {
    const middle = from + (2 * panel + 1) * half;
    for (const { node, weight } of nodes) sum += weight * (f(middle - node * half) + f(middle + node * half));
  }
  return sum * half;
}

/** Roots of the Legendre polynomial of an even degree, by Newton's method on its recurrence. */
function legendreNodes(degree: number): { node: number; weight: number }[] {
  return Array.from({ length: degree / 2 }, (_, index) => {
    let node = Math.cos((Math.PI * (index + 0.75)) / (degree + 0.5));
    for (let step = 0; ; step++) {
      const { value, slope } = legendre(degree, node);
      if (step === 8) return { node, weight: 2 / ((1 - node * node) * slope * slope) };
      node -= value / slope;
    }
  });
}

function legendre(degree: number, x: number): { value: number; slope: number } {
  let before = 1;
  let value = x;
  for (let k = 2; k <= degree; k++) [before, value] = [value, ((2 * k - 1) * x * value - (k - 1) * before) / k];
  return { value, slope: (degree * (before - x * value)) / (1 - x * x) };
}

/**
 * Rate of right answers that a listener of sensitivity d′ reaches by a rule of deciding.
 *
 * @param rule   supposed way of deciding
 * @param dPrime sensitivity, at least 0
 * @returns from the rule's chance to 1
 * @throws RangeError when dPrime is negative or not finite
 * @example correctRateAt(oddByDistance, 2) // 0.6048 ; R: 2 * integrate(function(z) (pnorm(-z*sqrt(3) + 2*sqrt(2/3)) +
 *   pnorm(-z*sqrt(3) - 2*sqrt(2/3))) * dnorm(z), 0, Inf)$value
 */
export function correctRateAt(rule: Psychometric, dPrime: number): number {
  requireBetween('dPrime', dPrime, 0, Number.MAX_VALUE, 'closed');
  return Math.min(1, rule.chance + rule.aboveChance(dPrime));
}

/**
 * Sensitivity d′ behind a rate of right answers: the inverse of correctRateAt.
 *
 * @param rule        supposed way of deciding
 * @param correctRate rate of right answers, 0 ... 1
 * @returns d′; 0 at and below the rule's chance, Infinity at 1
 * @throws RangeError when correctRate is outside 0 ... 1
 * @example dPrimeAt(oddByDistance, 0.75) // 2.7974 ; R: uniroot of the above
 */
export function dPrimeAt(rule: Psychometric, correctRate: number): number {
  requireBetween('correctRate', correctRate, 0, 1, 'closed');
  const { chance } = rule;
  if (correctRate <= chance) return 0;
  if (correctRate === 1) return Number.POSITIVE_INFINITY;
  const isShort =
    correctRate < (1 + chance) / 2
      ? (dPrime: number) => rule.aboveChance(dPrime) < correctRate - chance
      : (dPrime: number) => rule.wrong(dPrime) > 1 - correctRate;
  let low = 0;
  let high = largestDPrime;
  for (;;) {
    const middle = low + (high - low) / 2;
    if (middle <= low || middle >= high) return middle;
    if (isShort(middle)) low = middle;
    else high = middle;
  }
}

/**
 * Limits of the rate of right answers as limits of d′.
 *
 * @param rule     supposed way of deciding
 * @param interval limits of the rate, each 0 ... 1
 * @returns limits of d′, from 0 to Infinity
 * @throws RangeError when a limit is outside 0 ... 1
 * @example dPrimeLimits(oddByDistance, { lower: 1 / 3, upper: 1 }) // 0, Infinity
 * @see Brockhoff & Christensen, Food Quality and Preference 21 (2010), 330-338
 */
export function dPrimeLimits(rule: Psychometric, interval: Interval): Interval {
  return { lower: dPrimeAt(rule, interval.lower), upper: dPrimeAt(rule, interval.upper) };
}
