import { audibleBand, type LevelDifference } from './level-difference.ts';

/** What the level match has to take out, and what it cannot: the tilt against 1 kHz, where levels are matched. */
export function differenceWords({ curve, largestAudible }: LevelDifference): string {
  // A line so lossy that nothing arrives has no level; no cable is one.
  if (!curve.every(({ decibels: level }) => Number.isFinite(level)))
    return 'By their construction hardly anything would arrive at the load: look at what is stated of the two cables.';
  const left = leftWhenMatched(curve);
  return `By their construction the two differ by ${atMost(largestAudible.decibels)} between 20 Hz and 20 kHz, at ${hertz(largestAudible.frequency)}; matched in level at 1 kHz, by ${atMost(left)}.`;
}

/** "0.12 dB", "less than 0.001 dB"; the sign is left out. */
export function decibels(value: number): string {
  const size = Math.abs(value);
  return size < 0.001 ? 'less than 0.001\u00a0dB' : `${size.toPrecision(2)}\u00a0dB`;
}

/** "1 kHz", "20 Hz", in two digits. */
export const hertz = (frequency: number): string =>
  frequency >= 1000
    ? `${Number((frequency / 1000).toPrecision(2))}\u00a0kHz`
    : `${Number(frequency.toPrecision(2))}\u00a0Hz`;

/** "at most 0.12 dB", "less than 0.001 dB" */
export const atMost = (value: number): string =>
  Math.abs(value) < 0.001 ? decibels(value) : `at most ${decibels(value)}`;

/** The largest difference left in the audible band when levels are matched at 1 kHz, in dB; at least 0. */
export function leftWhenMatched(curve: LevelDifference['curve']): number {
  const matched = curve.find(({ frequency }) => frequency >= 999)?.decibels ?? 0;
  const audible = curve.filter(({ frequency }) => frequency >= audibleBand.low && frequency <= audibleBand.high);
  return Math.max(...audible.map(({ decibels: level }) => Math.abs(level - matched)));
}
