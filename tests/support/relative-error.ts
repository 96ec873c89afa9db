/**
 * Relative error of `actual` against `expected`, 0 where both are the same number (0 and infinities included).
 */
export function relativeError(actual: number, expected: number): number {
  if (Object.is(actual, expected) || actual === expected) return 0;
  return Math.abs(actual - expected) / Math.abs(expected);
}
