/** A chance as people read it: 0.0261 is "2.6 %", 0.00052 is "0.052 %", what is smaller still is "under 0.001 %". */
export function percentFace(chance: number): string {
  const percent = chance * 100;
  if (percent === 0) return '0\u00a0%';
  if (percent < 0.001) return 'under 0.001\u00a0%';
  return percent < 0.1 ? `${Number(percent.toPrecision(2))}\u00a0%` : `${percent.toFixed(1)}\u00a0%`;
}
