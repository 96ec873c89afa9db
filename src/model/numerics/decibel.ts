/** Powers of ten as the nearest doubles, which Math.pow misses for many exponents. */
const POWERS_OF_TEN = Float64Array.from({ length: 633 }, (_, i) => Number(`1e${i - 324}`));

/**
 * Power ratio of a decibel value, within two rounding units.
 *
 * Whole tens are split off first: 10^(x/10) in one step would lose |x|/10 rounding units, which an error rate of
 * exp(-ratio) multiplies by the ratio.
 */
export function fromDecibel(db: number): number {
  const tens = Math.round(db / 10);
  return (POWERS_OF_TEN[tens + 324] ?? (tens > 0 ? Infinity : 0)) * Math.pow(10, (db - 10 * tens) / 10);
}

/** Decibel value of a power ratio above 0. */
export function toDecibel(ratio: number): number {
  return 10 * Math.log10(ratio);
}
