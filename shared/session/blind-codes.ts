const mirrored: { readonly [digit: string]: string } = { '0': '0', '1': '1', '6': '9', '8': '8', '9': '6' };

const reversed = (code: string) => [...code].reverse().join('');

/** The code as it reads upside down, or null when it does not read at all. */
function upsideDown(code: string): string | null {
  const digits = [...code].reverse().map((digit) => mirrored[digit]);
  return digits.every((digit) => digit !== undefined) ? digits.join('') : null;
}

/**
 * Whether a three-digit code may stand on a sleeve beside those already drawn (sensory practice; common practice, no source).
 *
 * Left out: codes with a leading zero or with one digit three times, runs such as 123 or 321, codes that read as another
 * number upside down, and any code that is the reverse, the upside-down reading or a neighbour of one already drawn.
 */
export function isUsableCode(code: string, drawn: readonly string[]): boolean {
  if (!/^[1-9]\d\d$/.test(code)) return false;
  const [a, b, c] = [...code].map(Number) as [number, number, number];
  if (a === b && b === c) return false;
  if ((b - a === 1 && c - b === 1) || (a - b === 1 && b - c === 1)) return false;
  const turned = upsideDown(code);
  if (turned !== null && turned !== code) return false;
  return drawn.every((other) => {
    const apart = Math.abs(Number(code) - Number(other)) > 1;
    return apart && code !== reversed(other);
  });
}
