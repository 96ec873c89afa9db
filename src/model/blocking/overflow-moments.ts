/**
 * Mean and peakedness of what overflows a group, also with a number of channels below 0, which smooth traffic needs (G. Bretschneider,
 * ITC 7, 1973): there 1/B = A * integral of exp(-A y) (1 + y)^N goes on without a break.
 */
import { belowNearZero, isFarBelowMean, legendreTail } from "../numerics/poisson-ratio";
import { blockingOf, freeChannels, idleOdds } from "./erlang-b-formula";

/** Below 0 channels the continued fraction takes at most some two hundred terms from this traffic, or from this many below 0, on. */
const FRACTION_FROM_TRAFFIC = 0.5;
const FRACTION_FROM_ORDER = 10;
/** An error in the last of k terms comes out divided by C(k + 10, 10), so these are enough. */
const SMOOTH_TERMS = 200;

function isFar(trafficE: number, channels: number): boolean {
  if (channels >= 0) return isFarBelowMean(channels, trafficE);
  return trafficE >= FRACTION_FROM_TRAFFIC || channels <= -FRACTION_FROM_ORDER;
}

/**
 * exp(A) E_p(A), the reciprocal of the overflow of -p channels (DLMF 8.19), for little traffic and p from -1/2 up: from the series
 * around 0 upwards by p E_(p+1) = exp(-A) - A E_p, which damps errors where A is small.
 */
function scaledIntegral(trafficE: number, p: number): number {
  if (p <= 0.5) return (1 + belowNearZero(-p, trafficE)) / trafficE;
  // A whole p starts at 0, where the first step needs the limit of odds over p.
  const start = p - Math.round(p) || Number.MIN_VALUE * 2 ** 400;
  let value = -belowNearZero(-start, trafficE) / start;
  for (let order = start + 1; order < p - 0.5; order++) value = (1 - trafficE * value) / order;
  return value;
}

/**
 * s = 2 + tail of Legendre's fraction for ten or more channels below 0 and traffic below that, where the tail alone would cancel:
 * s_k = k (A + s_(k+1)) / (A - N + k - 1 + s_(k+1)), positive parts only, s the one with k = 2.
 */
function smoothFraction(trafficE: number, channels: number): number {
  const order = trafficE - channels;
  // Where the terms hardly change, s (order + s) is about k A.
  let s = (2 * SMOOTH_TERMS * trafficE) / (order + Math.sqrt(order * order + 4 * SMOOTH_TERMS * trafficE));
  for (let k = SMOOTH_TERMS - 1; k >= 2; k--) s = (k * (trafficE + s)) / (order + k - 1 + s);
  return s;
}

/**
 * Mean of the overflow, A B.
 *
 * @param trafficE offered traffic, erlang, above 0
 * @param channels number of channels, any real number
 */
export function lostOf(trafficE: number, channels: number): number {
  if (channels >= 0) return trafficE * blockingOf(trafficE, channels);
  if (!isFar(trafficE, channels)) return 1 / scaledIntegral(trafficE, -channels);
  // A - N + N/c with Legendre's fraction c: A, -N and (c - 1)/c are positive.
  const c = trafficE - channels + 2 + legendreTail(channels, trafficE);
  return trafficE - channels * ((c - 1) / c);
}

/**
 * Peakedness of the overflow less 1, z - 1 = A/(N + 1 - A + m) - m (Riordan), to its own digits where z is near 1.
 *
 * @param trafficE offered traffic, erlang, above 0
 * @param channels number of channels, any real number
 */
export function excessOf(trafficE: number, channels: number): number {
  if (channels === 0) return 0;
  if (isFar(trafficE, channels)) {
    if (channels <= -FRACTION_FROM_ORDER && trafficE < -channels) {
      const s = smoothFraction(trafficE, channels);
      const c = trafficE - channels + s;
      const freeAndOne = (trafficE + s) / c;
      return ((channels / c) * (s - freeAndOne)) / freeAndOne;
    }
    // With c = A - N + 2 + tail and f = N/c free channels it is f (1 + tail - f)/(1 + f).
    const tail = legendreTail(channels, trafficE);
    const free = channels / (trafficE - channels + 2 + tail);
    return (free * (1 + tail - free)) / (1 + free);
  }
  if (channels < -0.5) {
    // N + 1 - A + m = A (g' - g)/g with g = 1/m and g' the same for one channel more.
    const g = scaledIntegral(trafficE, -channels);
    return g / (scaledIntegral(trafficE, -channels - 1) - g) - 1 / g;
  }
  if (channels < 1) {
    // In the odds U = (1 - B)/B, which goes to 0 with N as the excess does.
    const odds = channels < 0 ? belowNearZero(channels, trafficE) : idleOdds(trafficE, channels);
    const distance = trafficE - channels;
    const carriedMore = odds * (1 + odds + distance) - channels;
    return (trafficE * carriedMore) / ((1 + odds) * (1 + odds + channels - distance * odds));
  }
  return trafficE / (1 + freeChannels(trafficE, channels)) - trafficE * blockingOf(trafficE, channels);
}
