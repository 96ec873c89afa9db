/** Splits a double into two halves of 26 bits (Dekker 1971, Veltkamp). */
const SPLITTER = 2 ** 27 + 1;

/**
 * What rounding took from a sum: a + b = sum + sumError(a, b, sum) exactly.
 *
 * D. E. Knuth, The Art of Computer Programming, volume 2, section 4.2.2, theorem B.
 */
export function sumError(a: number, b: number, sum: number): number {
  const fromB = sum - a;
  return a - (sum - fromB) + (b - fromB);
}

/**
 * What rounding took from a product: a b = product + productError(a, b, product) exactly.
 *
 * T. J. Dekker, "A floating-point technique for extending the available precision", Numerische Mathematik 18 (1971). Factors
 * must stay below 1e300 and the product above 1e-290, so that no part of it leaves the range of doubles.
 */
export function productError(a: number, b: number, product: number): number {
  const bigA = a * SPLITTER;
  const bigB = b * SPLITTER;
  const leadA = bigA - (bigA - a);
  const leadB = bigB - (bigB - b);
  const restA = a - leadA;
  const restB = b - leadB;
  return leadA * leadB - product + leadA * restB + restA * leadB + restA * restB;
}
