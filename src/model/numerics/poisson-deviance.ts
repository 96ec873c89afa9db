import { productError, sumError } from "./exact";
import { LOG_LEAD, LOG_REST, LOG_TWO_LEAD, LOG_TWO_REST } from "./log-table";

/** A number as the sum of a double and a small correction. */
export interface TwoParts {
  readonly high: number;
  readonly low: number;
}

/** Beyond this exp(-deviance) is below every double, so that parts no longer matter. */
const LARGEST = 800;
const BEYOND: TwoParts = { high: Infinity, low: 0 };
/** 1/3, 1/5, ...: the series of artanh, beyond its first term. */
const ODD_RECIPROCALS: readonly number[] = [1 / 3, 1 / 5, 1 / 7, 1 / 9, 1 / 11, 1 / 13, 1 / 15, 1 / 17];

const bits = new DataView(new ArrayBuffer(8));

/** (artanh(v) - v) / v^3 for |v| up to 0.1. */
function artanhRest(v: number): number {
  const square = v * v;
  let sum = 0;
  // Small v needs few terms, and large groups, whose v is small, are called most.
  for (let k = square < 1e-4 ? 3 : ODD_RECIPROCALS.length - 1; k >= 0; k--) sum = sum * square + ODD_RECIPROCALS[k]!;
  return sum;
}

/**
 * Poisson deviance n ln(n / mean) + mean - n, which is the exponent of a Poisson probability: p(n) is about
 * exp(-deviance) / sqrt(2 pi n). An exponent of 700 must be right to 1e-15, so it comes in two parts and without cancellation.
 *
 * With v = (n - mean)/(n + mean) it is (n - mean) v + 2 n (v^3/3 + v^5/5 + ...): C. Loader, "Fast and accurate computation of
 * binomial probabilities" (2000). Far from the mean a short number near n/mean is taken out first, whose logarithm is tabled to
 * 85 bits. Infinity stands for all values beyond 800.
 *
 * @param n above 0
 * @param mean above 0
 */
export function poissonDeviance(n: number, mean: number): TwoParts {
  const difference = n - mean;
  const sum = n + mean;
  const v = difference / sum;
  if (Math.abs(v) < 0.1) {
    const lead = difference * v;
    if (lead > LARGEST) return BEYOND;
    const differenceRest = sumError(n, -mean, difference);
    const back = v * sum;
    const vRest = (difference - back - productError(v, sum, back) + differenceRest - v * sumError(n, mean, sum)) / sum;
    const tail = 2 * n * v * v * v * artanhRest(v);
    const high = lead + tail;
    return {
      high,
      low: productError(difference, v, lead) + difference * vRest + differenceRest * v + sumError(lead, tail, high),
    };
  }
  const ratio = n / mean;
  if (difference * v > 2 * LARGEST || ratio > 1e300) return BEYOND;
  // The ratio rounded to five bits: 2^power (1 + step/16).
  bits.setFloat64(0, ratio);
  const lead = (bits.getInt32(0) + 0x8000) >> 16;
  bits.setInt32(0, lead << 16);
  bits.setInt32(4, 0);
  const near = bits.getFloat64(0);
  const power = (lead >> 4) - 1023;
  const step = lead & 15;

  const logNear = power * LOG_TWO_LEAD + LOG_LEAD[step]!;
  const a = n * logNear;
  const b = mean * (1 - near);
  const offset = n - near * mean;
  const w = offset / (n + near * mean);
  const rest = offset * w + 2 * n * w * w * w * artanhRest(w);
  const ab = a + b;
  const sumOfParts = ab + rest;
  const corrections =
    n * (power * LOG_TWO_REST + LOG_REST[step]!) +
    productError(n, logNear, a) +
    productError(mean, 1 - near, b) +
    sumError(a, b, ab) +
    sumError(ab, rest, sumOfParts);
  const high = sumOfParts + corrections;
  return { high, low: sumError(sumOfParts, corrections, high) };
}
