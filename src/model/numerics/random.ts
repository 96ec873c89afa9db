/** A repeatable source of random numbers. */
export interface RandomSource {
  /** 32 random bits as a whole number. */
  bits(): number;
  /** Uniform above 0 and below 1. */
  uniform(): number;
  /** Exponential with mean 1. */
  exponential(): number;
}

function rotateLeft(word: number, by: number): number {
  return (word << by) | (word >>> (32 - by));
}

/**
 * xoshiro128** 1.1 from the four words of its state: D. Blackman, S. Vigna, "Scrambled linear pseudorandom number generators", ACM
 * Transactions on Mathematical Software 47 (2021). Period 2^128 - 1.
 *
 * @param state four 32-bit words, not all zero
 */
export function fromState(state: readonly [number, number, number, number]): RandomSource {
  let [a, b, c, d] = state;
  const bits = (): number => {
    const result = Math.imul(rotateLeft(Math.imul(b, 5), 7), 9) >>> 0;
    const shifted = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = rotateLeft(d, 11);
    return result;
  };
  const uniform = (): number => {
    const high = bits() >>> 5;
    const low = bits() >>> 6;
    // The last bit is set, so that 0, whose logarithm is infinite, never comes.
    return (high * 2 ** 26 + (low | 1)) * 2 ** -53;
  };
  return { bits, uniform, exponential: () => -Math.log(uniform()) };
}

/**
 * The generator from one number. Its words come from a counter (G. Steele, D. Lea, C. Flood, "Fast splittable pseudorandom number
 * generators", 2014) through the finishing steps of MurmurHash3, so that neighbouring seeds have nothing in common.
 *
 * @param seed whole number from 0 to 2^53 - 1
 */
export function fromSeed(seed: number): RandomSource {
  let word = (seed >>> 0) ^ Math.imul(Math.floor(seed / 2 ** 32), 0x85ebca6b);
  const next = (): number => {
    word = (word + 0x9e3779b9) | 0;
    let mixed = Math.imul(word ^ (word >>> 16), 0x85ebca6b);
    mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
    return mixed ^ (mixed >>> 16);
  };
  return fromState([next(), next(), next(), next()]);
}
