import { SCALED_ERFC } from "./erfc-coefficients";

const TWO_OVER_ROOT_PI = 2 / Math.sqrt(Math.PI);
/** Below this |x| the Taylor series of erf is short and 1 - erf(x) does not cancel. */
const TAYLOR_BELOW = 0.5;

/**
 * Scaled complementary error function exp(x^2) erfc(x), for x of at least 0: no underflow in the tail.
 *
 * One Chebyshev series over the half line, as in M. M. Shepherd, J. G. Laframboise, "Chebyshev approximation of
 * (1+2x) exp(x^2) erfc x in 0 <= x < infinity", Mathematics of Computation 36 (1981). Relative error about 3e-16.
 */
export function scaledErfc(x: number): number {
  const t = (x - 3) / (x + 3);
  // Clenshaw's backward recurrence.
  let next = 0;
  let afterNext = 0;
  for (let k = SCALED_ERFC.length - 1; k > 0; k--) {
    const current = 2 * t * next - afterNext + SCALED_ERFC[k]!;
    afterNext = next;
    next = current;
  }
  return (t * next - afterNext + SCALED_ERFC[0]!) / (1 + 2 * x);
}

/** Beyond it even exp(-x^2 / 2) is below the smallest double. */
const FARTHEST = 40;

/**
 * exp(-scale x^2) without the rounding of x^2, which alone would cost x^2 rounding units.
 *
 * @param x any number
 * @param scale 1 or 1/2, so that the product with the short leading part of x is exact
 */
export function gaussian(x: number, scale: 1 | 0.5): number {
  // Far out the answer is 0, and 0 times a correction that overflows would be NaN.
  if (Math.abs(x) > FARTHEST) return 0;
  const lead = Math.fround(x);
  return Math.exp(-scale * lead * lead) * Math.exp(-scale * (x - lead) * (x + lead));
}

/** Error function. Relative error about 5e-16, near 0 included. */
export function erf(x: number): number {
  const size = Math.abs(x);
  if (size > 1) return Math.sign(x) * (1 - erfc(size));
  // erf(x) = 2/sqrt(pi) exp(-x^2) sum of 2^n x^(2n+1) / (1 3 5 ... (2n+1)): positive terms (DLMF 7.6.2).
  let term = x;
  let sum = x;
  for (let n = 1; Math.abs(term) > 1e-17 * Math.abs(sum); n++) {
    term *= (2 * x * x) / (2 * n + 1);
    sum += term;
  }
  return TWO_OVER_ROOT_PI * gaussian(x, 1) * sum;
}

/** Complementary error function. Relative error about 5e-16, down to the smallest normal number. */
export function erfc(x: number): number {
  if (x < 0) return x > -TAYLOR_BELOW ? 1 - erf(x) : 2 - erfc(-x);
  return x < TAYLOR_BELOW ? 1 - erf(x) : gaussian(x, 1) * scaledErfc(x);
}
