/**
 * Error of a decibel value relative to the value, of values within 1 dB of 0 relative to 1 dB: there the ratio itself,
 * near 1, holds no more digits.
 */
export function decibelError(actual: number, expected: number): number {
  if (actual === expected) return 0;
  return Math.abs(actual - expected) / Math.max(1, Math.abs(expected));
}
