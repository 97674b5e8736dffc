import type { Method } from '#shared/methods/method.ts';
import { aboveGuessingRate, correctRateOf } from '#shared/statistics/above-guessing.ts';
import { correctRateAt, dPrimeAt } from '#shared/statistics/psychometric.ts';

/** A way of saying how large an effect is: every scale says the same as the others. */
export type EffectScale = {
  key: 'rate' | 'heard' | 'dPrime';
  label: string;
  unit: string;
  /** From the share of answers above guessing, and back. */
  ofShare(share: number): number;
  toShare(value: number): number;
  decimals: number;
};

/** Beyond these nothing can be planned: it is next to nothing, or nobody misses it. */
export const leastShare = 0.01;
export const mostShare = 0.98;

/** The scales of a method: the rate itself, and where something is to be heard the share heard and d′ by its first rule. */
export function effectScales({ planned, sensitivity, plan }: Method): EffectScale[] {
  const { guessing } = planned;
  const rate: EffectScale = {
    key: 'rate',
    label: plan.aim.rate,
    unit: '%',
    ofShare: (share) => 100 * correctRateOf(share, guessing),
    toShare: (value) => aboveGuessingRate(value / 100, guessing),
    decimals: 1,
  };
  const [first] = sensitivity;
  if (first === undefined) return [rate];
  return [
    rate,
    {
      key: 'heard',
      label: 'Heard',
      unit: '%',
      ofShare: (share) => 100 * share,
      toShare: (value) => value / 100,
      decimals: 1,
    },
    {
      key: 'dPrime',
      label: 'd′',
      unit: '',
      ofShare: (share) => dPrimeAt(first.psychometric, correctRateOf(share, guessing)),
      toShare: (value) => aboveGuessingRate(correctRateAt(first.psychometric, value), guessing),
      decimals: 2,
    },
  ];
}

/** The share that was typed on a scale, or null where it is none, or beyond what can be planned. */
export function typedShare(scale: EffectScale, text: string): number | null {
  const value = Number(text);
  if (text.trim() === '' || !Number.isFinite(value) || value < 0) return null;
  // A percentage beyond 100 is no rate, and is refused before it is taken for one.
  if (scale.key !== 'dPrime' && value > 100) return null;
  const share = scale.toShare(value);
  return share < leastShare - 1e-9 || share > mostShare + 1e-9 ? null : share;
}

/** A value as it stands in its field, without decimals that say nothing. */
export const scaleFace = (scale: EffectScale, share: number): string =>
  String(Number(scale.ofShare(share).toFixed(scale.decimals)));

/** "Enter 50.5 to 99." */
export function scaleFault(scale: EffectScale): string {
  return `Enter ${scaleFace(scale, leastShare)} to ${scaleFace(scale, mostShare)}.`;
}
