import { audibleBand, type LevelDifference } from '#shared/cables/level-difference.ts';

/** What the level match has to take out, and what it cannot: the tilt against 1 kHz, where levels are matched. */
export function differenceWords({ curve, largestAudible }: LevelDifference): string {
  // A line so lossy that nothing arrives has no level; no cable is one.
  if (!curve.every(({ decibels: level }) => Number.isFinite(level)))
    return 'By their construction hardly anything would arrive at the load: look at what is stated of the two cables.';
  const matched = curve.find(({ frequency }) => frequency >= 999)?.decibels ?? 0;
  const audible = curve.filter(({ frequency }) => frequency >= audibleBand.low && frequency <= audibleBand.high);
  const left = Math.max(...audible.map(({ decibels }) => Math.abs(decibels - matched)));
  return `By their construction the two differ by at most ${decibels(largestAudible.decibels)} between 20 Hz and 20 kHz, at ${hertz(largestAudible.frequency)}; matched in level at 1 kHz, by at most ${decibels(left)}.`;
}

function decibels(value: number): string {
  const size = Math.abs(value);
  return size < 0.001 ? 'less than 0.001\u00a0dB' : `${size.toPrecision(2)}\u00a0dB`;
}

const hertz = (frequency: number): string =>
  frequency >= 1000
    ? `${Number((frequency / 1000).toPrecision(2))}\u00a0kHz`
    : `${Number(frequency.toPrecision(2))}\u00a0Hz`;
