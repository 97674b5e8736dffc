/** A complex number; a phasor of a time dependence exp(+j omega t). */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export const complex = (re: number, im = 0): Complex => ({ re, im });

export const plus = (a: Complex, b: Complex): Complex => complex(a.re + b.re, a.im + b.im);

export const minus = (a: Complex, b: Complex): Complex => complex(a.re - b.re, a.im - b.im);

export const times = (a: Complex, b: Complex): Complex => complex(a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re);

export const scaled = (a: Complex, factor: number): Complex => complex(a.re * factor, a.im * factor);

export const magnitude = (a: Complex): number => Math.hypot(a.re, a.im);

/**
 * The quotient a / b, scaled by the larger part of b so that no square overflows.
 *
 * @param b not 0; the quotient is not finite otherwise
 * @example over({ re: 1, im: 0 }, { re: 0, im: 1 }) // -j
 * @see Smith, Algorithm 116: Complex division, Communications of the ACM 5 (1962), 435
 */
export function over(a: Complex, b: Complex): Complex {
  if (Math.abs(b.re) >= Math.abs(b.im)) {
    const ratio = b.im / b.re;
    const size = b.re + b.im * ratio;
    return complex((a.re + a.im * ratio) / size, (a.im - a.re * ratio) / size);
  }
  const ratio = b.re / b.im;
  const size = b.re * ratio + b.im;
  return complex((a.re * ratio + a.im) / size, (a.im * ratio - a.re) / size);
}

/** The square root in the right half plane. */
export function squareRoot(a: Complex): Complex {
  const size = magnitude(a);
  if (size === 0) return complex(0);
  const larger = Math.sqrt((size + Math.abs(a.re)) / 2);
  const smaller = Math.abs(a.im) / (2 * larger);
  const sign = a.im < 0 ? -1 : 1;
  return a.re >= 0 ? complex(larger, sign * smaller) : complex(smaller, sign * larger);
}
