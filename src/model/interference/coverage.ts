import { decibel, domain, requireIn, share } from "../domain";
import { fromDecibel } from "../numerics/decibel";

/** At an exponent of 2 the interference of all the plane is without limit. */
export const exponentAboveTwo = domain(2, 10, "a path-loss exponent above 2 and up to 10", { openLow: true });

/**
 * Share of places, or of time, at which the SINR of a network of sites placed at random exceeds a target: Poisson sites,
 * every user at the nearest one, Rayleigh fading on every path.
 *
 * J. G. Andrews, F. Baccelli, R. K. Ganti, "A tractable approach to coverage and rate in cellular networks", IEEE Trans.
 * Commun. 59 (2011), theorem 1, with x = pi lambda r^2:
 * integral of exp(-x (1 + load rho) - (T/snr) (4x/pi)^(n/2)) over x from 0.
 *
 * @param requiredDb T, the SINR to exceed, -1000 to 1000 dB
 * @param pathLossExponent n, above 2, at most 10
 * @param load share of time that another site sends
 * @param snrDb signal to noise at the mean distance to the nearest site; without it interference alone counts
 */
export function coverage(requiredDb: number, pathLossExponent: number, load = 1, snrDb?: number): number {
  requireIn(decibel, "requiredDb", requiredDb);
  requireIn(exponentAboveTwo, "pathLossExponent", pathLossExponent);
  requireIn(share, "load", load);
  const required = fromDecibel(requiredDb);
  const thinning = 1 + (load === 0 ? 0 : load * interferenceFactor(required, pathLossExponent));
  if (snrDb === undefined) return 1 / thinning;
  requireIn(decibel, "snrDb", snrDb);
  const power = pathLossExponent / 2;
  // In logarithms, since the ratio of target to snr may be anything.
  const logNoise = ((requiredDb - snrDb) * Math.LN10) / 10 + power * Math.log(4 / Math.PI);
  return stretchedIntegral(thinning, logNoise, power);
}

/**
 * rho(T, n) = T^d times the integral of 1/(1 + u^(1/d)) over u from T^-d, d = 2/n: interferers that count, per site.
 *
 * By hypergeometric series with positive terms: up to T = 1 that of T d/(1-d) 2F1(1, 1-d; 2-d; -T), above 1 the whole
 * integral, pi d / sin(pi d), less the series of the missing part (DLMF 15.8.1 and 5.5.3).
 */
function interferenceFactor(required: number, exponent: number): number {
  const d = 2 / exponent;
  // 1 - d without cancellation where the exponent is near 2.
  const rest = (exponent - 2) / exponent;
  if (required <= 1) return (d / rest) * (required / (1 + required)) * positiveSeries(1 + rest, required);
  const whole = (Math.pow(required, d) * (Math.PI * d)) / Math.sin(Math.PI * rest);
  return whole - (required / (1 + required)) * positiveSeries(1 + d, 1 / required);
}

/** 2F1(1, 1; c; x/(1+x)) for x from 0 to 1: the argument is at most one half, so about fifty terms do. */
function positiveSeries(c: number, x: number): number {
  const argument = x / (1 + x);
  let term = 1;
  let sum = 1;
  for (let k = 0; term > 1e-17 * sum; k++) {
    term *= (argument * (1 + k)) / (c + k);
    sum += term;
  }
  return sum;
}

const STEP = 0.05;
const FIRST = -3.7;
const POINTS = 190;

/**
 * Integral of exp(-a x - e^logB x^h) over x from 0, h from 1 to 5, to the last digits.
 *
 * Scaled to the shorter of the two ranges, then x = exp(u - exp(-u)) and the trapezoidal rule, whose error falls
 * exponentially (H. Takahasi, M. Mori, Publ. RIMS Kyoto 9 (1974)); |arg| < pi/(2h) bounds the step.
 */
function stretchedIntegral(a: number, logB: number, h: number): number {
  const scale = Math.min(1 / a, Math.exp(-logB / h));
  const linear = a * scale;
  const stretched = Math.exp(logB + h * Math.log(scale));
  let sum = 0;
  for (let k = 0; k < POINTS; k++) {
    const u = FIRST + k * STEP;
    const inner = Math.exp(-u);
    const x = Math.exp(u - inner);
    sum += x * (1 + inner) * Math.exp(-linear * x - stretched * Math.pow(x, h));
  }
  return scale * STEP * sum;
}
