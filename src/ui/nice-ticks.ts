/**
 * Round figures from `from` to `to`, at most `atMost` of them: steps of 1, 2 or 5 times a power of ten.
 *
 * @param leastStep 1 for what is counted
 */
export function niceTicks(from: number, to: number, atMost: number, leastStep = 0): number[] {
  if (!(to > from) || atMost < 2) return [from];
  const step = niceStep(Math.max(leastStep, (to - from) / (atMost - 1)));
  const first = Math.ceil(from / step - 1e-9);
  const count = Math.floor(to / step + 1e-9) - first + 1;
  return Array.from({ length: count }, (_, index) => Number(((first + index) * step).toPrecision(12)));
}

function niceStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least));
  const factor = [1, 2, 5, 10].find((candidate) => candidate * power >= least * (1 - 1e-9)) ?? 10;
  return factor * power;
}
