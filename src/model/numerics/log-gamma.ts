import { STIRLING, ZETA_TAIL } from "./log-gamma-coefficients";

const HALF_LOG_TWO_PI = 0.9189385332046727418;
const ONE_MINUS_EULER = 0.42278433509846713939;
/** From here on ten terms of Stirling's series reach rounding. */
const STIRLING_FROM = 10;

/** Stirling's asymptotic series: what ln gamma(x) adds to (x - 1/2) ln x - x + ln sqrt(2 pi). DLMF 5.11.1. */
function stirlingSeries(x: number): number {
  const inverse = 1 / x;
  const square = inverse * inverse;
  let sum = 0;
  for (let k = STIRLING.length - 1; k >= 0; k--) sum = sum * square + STIRLING[k]!;
  return sum * inverse;
}

/**
 * Error of Stirling's formula: ln gamma(x + 1) - (x + 1/2) ln x + x - ln sqrt(2 pi), for x above 0.
 *
 * It is about 1/(12 x) and its absolute error stays near 1e-16 for x of 1 or more, which is what a saddle-point expression of a
 * Poisson probability needs: C. Loader, "Fast and accurate computation of binomial probabilities" (2000).
 */
export function stirlingError(x: number): number {
  let shifted = x;
  let sum = 0;
  // error(x) = error(x + 1) + (x + 1/2) ln(1 + 1/x) - 1
  while (shifted < STIRLING_FROM) {
    sum += (shifted + 0.5) * Math.log1p(1 / shifted) - 1;
    shifted += 1;
  }
  return sum + stirlingSeries(shifted);
}

/** Taylor series of ln gamma(2 + z) for |z| up to 1/2 (DLMF 5.7.3): keeps relative accuracy at the zero of ln gamma. */
function logGammaNearTwo(z: number): number {
  let sum = 0;
  for (let k = ZETA_TAIL.length - 1; k >= 0; k--) sum = sum * z + ZETA_TAIL[k]!;
  return z * (ONE_MINUS_EULER + z * sum);
}

/** ln gamma(1 + x) for x above -1, to full relative accuracy as x goes to 0. */
export function logGammaOnePlus(x: number): number {
  return Math.abs(x) <= 0.5 ? logGammaNearTwo(x) - Math.log1p(x) : logGamma(1 + x);
}

/** Natural logarithm of the gamma function for x above 0. Relative error about 1e-15, at its zeros 1 and 2 included. */
export function logGamma(x: number): number {
  if (x >= STIRLING_FROM) return (x - 0.5) * Math.log(x) - x + HALF_LOG_TWO_PI + stirlingSeries(x);
  if (x < 0.5) return logGammaOnePlus(x) - Math.log(x);
  if (x < 1.5) return logGammaOnePlus(x - 1);
  let product = 1;
  let reduced = x;
  while (reduced > 2.5) {
    reduced -= 1;
    product *= reduced;
  }
  return Math.log(product) + logGammaNearTwo(reduced - 2);
}
