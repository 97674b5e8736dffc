/**
 * Numbers from 0 up to 1 for a simulation that everybody can repeat: the same seed gives the same ones on every machine.
 * For simulations alone; draws and codes never come from it.
 *
 * @param seed whole, 1 ... 2^32 - 1
 * @returns a source of numbers, 32 bits each, with a period of 2^32 - 1
 * @throws RangeError for a seed outside that range
 * @example repeatableUniform(1)() // 0.0000629...: the state 270369 after one step, over 2^32
 * @see Marsaglia, "Xorshift RNGs", Journal of Statistical Software 8(14) (2003), the triple 13, 17, 5
 */
export function repeatableUniform(seed: number): () => number {
  if (!Number.isInteger(seed) || seed < 1 || seed > 0xffff_ffff) throw new RangeError('seed must be 1 ... 2^32 - 1');
  let state = seed >>> 0;
  return () => {
    state ^= state << 13;
    state >>>= 0;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state / 0x1_0000_0000;
  };
}
