import { scaledErfc } from "./erfc";
import { logGammaOnePlus, stirlingError } from "./log-gamma";
import { poissonDeviance, type TwoParts } from "./poisson-deviance";
import { SCALED_GAMMA, TEMME, TEMME_FROM } from "./temme-coefficients";

/**
 * Sums of a Poisson distribution in units of one of its terms, for real n: the one quantity behind Erlang's formulas.
 *
 * With t(x) = mean^x exp(-mean) / Gamma(x + 1),
 *   below(n) = Gamma(n, mean) / (Gamma(n) t(n)), for whole n the sum of t(0) ... t(n - 1) over t(n);
 *   above(n) = mean/(n+1) + mean^2/((n+1)(n+2)) + ..., for whole n the sum of t(n + 1), t(n + 2) ... over t(n);
 *   below + 1 + above = 1/t(n).
 * Each is computed where it is a sum of positive parts, so that neither tail loses digits.
 */

const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);
const ROOT_HALF_PI = Math.sqrt(Math.PI / 2);
const NEGLIGIBLE = 1e-17;
/** A group this many standard deviations below its traffic needs at most some twenty terms of the continued fraction. */
const FAR = 5;
/** Below it the series around n = 0 is taken, above it the continued fraction, for n below 1. */
const SMALL_MEAN = 1.5;
/** Where exp(-deviance) is below half a rounding unit, the sum above n does not count beside 1/t(n). */
const DEVIANCE_OF_ROUNDING = 37;
/** From here on Temme's expansion leaves its range of |eta| up to 0.9 below the mean, and the plain series is short. */
const SERIES_BELOW_RATIO = 0.385;
/** The continued fraction converges in far fewer; a bound all the same. */
const MOST_TERMS = 5000;

/** Gamma(n + 1) over Stirling's formula. */
function scaledGamma(n: number): number {
  if (n < TEMME_FROM) return Math.exp(stirlingError(n));
  const inverse = 1 / n;
  let sum = 0;
  for (let k = n > 1e4 ? 4 : SCALED_GAMMA.length - 1; k >= 0; k--) sum = sum * inverse + SCALED_GAMMA[k]!;
  return sum;
}

function inverseTermFrom(n: number, deviance: TwoParts): number {
  if (deviance.high > 709) return Infinity;
  const exponential = Math.exp(deviance.high);
  return ROOT_TWO_PI * Math.sqrt(n) * scaledGamma(n) * (exponential + exponential * deviance.low);
}

/** 1/t(n): reciprocal of the Poisson probability of n, continued to real n. Infinity where beyond the doubles. */
export function inverseTerm(n: number, mean: number): number {
  if (mean === 0) return n === 0 ? 1 : Infinity;
  // Below 1 the saddle point is no help, and the logarithms are small.
  if (n < 1) return Math.exp(mean - n * Math.log(mean) + logGammaOnePlus(n));
  return inverseTermFrom(n, poissonDeviance(n, mean));
}

/**
 * Temme's uniform expansion (DLMF 8.12): sqrt(pi n / 2) erfcx(y) + sign S(eta), times Gamma*(n), for n of 32 or more and eta within
 * its reach. It is below(n) for a mean above n, and 1 + above(n) for a mean below n: in both the smaller side.
 */
function temme(n: number, mean: number, deviance: number): number {
  const sign = mean < n ? -1 : 1;
  const eta = sign * Math.sqrt((2 * deviance) / n);
  const inverse = 1 / n;
  let sum = 0;
  // Orders that cannot reach the last bit are left out.
  for (let k = n > 1e6 ? 2 : n > 1e3 ? 4 : TEMME.length - 1; k >= 0; k--) {
    const row = TEMME[k]!;
    let value = 0;
    for (let i = row.length - 1; i >= 0; i--) value = value * eta + row[i]!;
    sum = sum * inverse + value;
  }
  return scaledGamma(n) * (ROOT_HALF_PI * Math.sqrt(n) * scaledErfc(Math.sqrt(deviance)) + sign * sum);
}

/** above(n) from its series; few terms while the mean is not far above n, or well below it. */
function aboveSeries(n: number, mean: number): number {
  let term = mean / (n + 1);
  let sum = term;
  for (let k = 2; term > NEGLIGIBLE * sum; k++) {
    term *= mean / (n + k);
    sum += term;
  }
  return sum;
}

/**
 * The part c - (mean - n) - 2 of Legendre's continued fraction (DLMF 8.9.2), whose head is 1/B = mean / (mean - n + n/c):
 * 2(n - 1)/(mean - n + 4 + 3(n - 2)/(mean - n + 6 + ...)). All parts are positive up to the order n. Steed's forward evaluation.
 */
export function legendreTail(n: number, mean: number): number {
  let b = mean - n + 4;
  let inverse = 1 / b;
  let step = 2 * (n - 1) * inverse;
  let sum = step;
  for (let k = 3; k < MOST_TERMS && Math.abs(step) > NEGLIGIBLE * Math.abs(b + sum); k++) {
    const a = k * (n - k + 1);
    b += 2;
    const before = inverse;
    inverse = 1 / (b + a * before);
    step *= -a * before * inverse;
    sum += step;
  }
  return sum;
}

/**
 * below(n) for n from -1/2 to 1 and a small mean, with its digits as n goes to 0: n exp(mean) mean^-n Gamma(n, mean) by its series in
 * the mean.
 */
export function belowNearZero(n: number, mean: number): number {
  let term = 1;
  let sum = 0;
  for (let k = 1; Math.abs(term) > NEGLIGIBLE; k++) {
    term *= -mean / k;
    sum += term / (n + k);
  }
  return Math.exp(mean) * (Math.expm1(logGammaOnePlus(n) - n * Math.log(mean)) - n * sum);
}

/** Whether the continued fraction in the mean is the short way to below(n). */
export function isFarBelowMean(n: number, mean: number): boolean {
  if (n < 1) return mean >= SMALL_MEAN;
  const distance = mean - n;
  return distance > SMALL_MEAN && (n < TEMME_FROM || distance * distance > FAR * FAR * n);
}

/** below(n), for n and mean of at least 0. Infinity where beyond the doubles. */
export function below(n: number, mean: number): number {
  if (n === 0) return 0;
  if (mean === 0) return Infinity;
  if (isFarBelowMean(n, mean)) {
    const c = mean - n + 2 + legendreTail(n, mean);
    const free = n / c;
    return (n * ((c - 1) / c)) / (mean - n + free);
  }
  if (n < 1) return belowNearZero(n, mean);
  if (n < TEMME_FROM) return inverseTerm(n, mean) - aboveSeries(n, mean) - 1;
  const deviance = poissonDeviance(n, mean);
  if (mean >= n) return temme(n, mean, deviance.high);
  const whole = inverseTermFrom(n, deviance);
  if (deviance.high > DEVIANCE_OF_ROUNDING) return whole;
  return mean < SERIES_BELOW_RATIO * n ? whole - aboveSeries(n, mean) - 1 : whole - temme(n, mean, deviance.high);
}

/** Sums above n in units of the term at n: total is above(n); weighted counts each term j places above n as j terms. */
export interface SumsAbove {
  readonly total: number;
  readonly weighted: number;
}

/**
 * above(n) and its first moment, for n and mean of at least 0; Infinity where beyond the doubles.
 *
 * By balance weighted = mean - (n - mean) total, which loses digits only far below n. There a continued fraction of Kummer's
 * M(1, n + 1, mean) = 1 + total (DLMF section 13.5) gives both: 1 + total = n / (n - mean + mean/g), weighted = mean (1 + total)/g.
 *
 * @param n the term
 * @param mean of the distribution
 * @param distance n - mean, where the caller knows it better than the difference of the two rounded numbers
 */
export function sumsAbove(n: number, mean: number, distance: number = n - mean): SumsAbove {
  if (mean === 0) return { total: 0, weighted: 0 };
  if (n < TEMME_FROM ? mean < n + TEMME_FROM : mean < SERIES_BELOW_RATIO * n) return sumsBySeries(n, mean);
  const isNear = distance * distance < FAR * FAR * n;
  if (distance > 0 && !isNear) {
    const g = gaussFraction(distance, mean);
    const total = (mean * (1 - 1 / g)) / (distance + mean / g);
    return { total, weighted: (mean * (1 + total)) / g };
  }
  let total: number;
  if (n < TEMME_FROM) {
    total = inverseTerm(n, mean) - below(n, mean) - 1;
  } else {
    const { high, low } = poissonDeviance(n, mean);
    // d deviance = (distance/mean) d distance: the part of the distance that n and mean do not show.
    const deviance = { high, low: low + (distance / mean) * (distance - (n - mean)) };
    const side = isNear ? temme(n, mean, Math.max(0, high + deviance.low)) : below(n, mean);
    total = mean < n ? side - 1 : inverseTermFrom(n, deviance) - side - 1;
  }
  return { total, weighted: total === Infinity ? Infinity : mean - distance * total };
}

function sumsBySeries(n: number, mean: number): SumsAbove {
  let term = mean / (n + 1);
  let total = term;
  let weighted = term;
  for (let k = 2; k * term > NEGLIGIBLE * weighted; k++) {
    term *= mean / (n + k);
    total += term;
    weighted += k * term;
  }
  return { total, weighted };
}

/** g = d + 1 + 2 mean/(d + 2 + 3 mean/(d + 3 + ...)) with d = n - mean, all parts positive. Steed's forward evaluation. */
function gaussFraction(distance: number, mean: number): number {
  let b = distance + 2;
  let inverse = 1 / b;
  let step = 2 * mean * inverse;
  let sum = step;
  for (let k = 3; k < MOST_TERMS && Math.abs(step) > NEGLIGIBLE * b; k++) {
    const a = k * mean;
    b += 1;
    const before = inverse;
    inverse = 1 / (b + a * before);
    step *= -a * before * inverse;
    sum += step;
  }
  return distance + 1 + sum;
}
