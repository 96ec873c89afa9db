import { fromDecibel } from "./decibel";

/** Decibels to one neper of power. */
const DECIBEL_PER_NEPER = 10 / Math.LN10;

/**
 * Sum of powers in decibel, the largest taken out first: nothing overflows, a small power beside a large one keeps its
 * digits, and a single power comes back unchanged.
 *
 * @param levels powers in decibel, in any order; -Infinity stands for no power
 * @returns the sum in decibel; -Infinity for no levels at all
 */
export function decibelSum(levels: readonly number[]): number {
  let largest = -Infinity;
  let at = -1;
  levels.forEach((level, i) => {
    if (level > largest) {
      largest = level;
      at = i;
    }
  });
  if (at < 0) return -Infinity;
  let others = 0;
  levels.forEach((level, i) => {
    if (i !== at && level > -Infinity) others += fromDecibel(level - largest);
  });
  return largest + DECIBEL_PER_NEPER * Math.log1p(others);
}

/** 10 log10(1 + share), exact to the last digits where the share is small or, below 0, near -1. */
export function decibelOfOnePlus(share: number): number {
  return DECIBEL_PER_NEPER * Math.log1p(share);
}

/** 10^(db/10) - 1 without loss where db is near 0. */
export function ratioMinusOne(db: number): number {
  return Math.abs(db) < 1 ? Math.expm1(db / DECIBEL_PER_NEPER) : fromDecibel(db) - 1;
}
