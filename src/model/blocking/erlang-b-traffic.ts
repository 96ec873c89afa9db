import { logGammaOnePlus } from "../numerics/log-gamma";
import { rootIn } from "../numerics/root";
import { ESTIMATE_FROM, estimateChannels, type Estimate } from "./erlang-b-estimate";
import { carriedOf, freeChannels, idleOdds } from "./erlang-b-formula";

const MOST_STEPS = 100;
/** After a step this small Newton's next one would be below rounding. */
const LAST_STEP = 1e-9;

const estimate: Estimate = { channels: 0, error: 0 };

/** A traffic from which Newton's method gets home in a few steps. */
function roughTraffic(channels: number, target: number): number {
  // Heavy loss: carried traffic A (1 - B) is nearly N.
  if (target >= 0.5) return channels / (1 - target);
  // 1/B > Gamma(N + 1)/A^N, the last part of its integral.
  const least = Math.exp((Math.log(target) + logGammaOnePlus(channels)) / channels);
  if (channels < ESTIMATE_FROM) return least;
  // One channel more carries about one erlang more, so the estimate's miss in channels is its miss in traffic.
  let traffic = channels;
  for (let step = 0; step < 4 && traffic >= ESTIMATE_FROM; step++) {
    estimateChannels(traffic, target, estimate);
    if (estimate.error > 0.5) break;
    const miss = channels - estimate.channels;
    traffic += miss;
    if (Math.abs(miss) < 1e-3 * Math.sqrt(channels)) return traffic;
  }
  // Rare blocking: Bernstein's bound of the Poisson tail, solved for the mean.
  const depth = -Math.log(target);
  return Math.max(least, channels + (2 / 3) * depth - Math.sqrt((4 / 9) * depth * depth + 2 * channels * depth));
}

/** ln(odds / wanted), from the quotient where that is a number: logarithms of 1e300 would cost its last digits. */
function logQuotient(trafficE: number, channels: number, odds: number, target: number): number {
  const quotient = odds * (target / (1 - target));
  if (quotient > 1e-300 && quotient < Infinity) return Math.log(quotient);
  // Odds beyond the doubles: exp(deviance) sqrt(2 pi N) is close enough to go on from.
  const logOdds =
    odds < Infinity
      ? Math.log(odds)
      : channels * Math.log(channels / trafficE) + trafficE - channels + 0.5 * Math.log(2 * Math.PI * channels);
  return logOdds + Math.log(target) - Math.log1p(-target);
}

/** -d ln U / d ln A of the idle odds U: N/U - (A - N), at least 1 where there are whole channels. */
function steepness(trafficE: number, channels: number, odds: number): number {
  if (channels < 1) return channels / odds - (trafficE - channels);
  if (trafficE > 1e6 * channels) return 1;
  return Math.max(1, channels / odds - (trafficE - channels));
}

/**
 * Traffic that a number of channels blocks to the target, unchecked: Newton's method on the idle odds in logarithms, where the
 * curve is convex and nearly straight at both ends.
 */
export function trafficFor(channels: number, target: number): number {
  if (channels === 0) return 0;
  let traffic = roughTraffic(channels, target);
  for (let step = 0; step < MOST_STEPS && traffic > 0; step++) {
    const odds = idleOdds(traffic, channels);
    const change = logQuotient(traffic, channels, odds, target) / steepness(traffic, channels, odds);
    traffic *= Math.exp(Math.min(change, 50));
    if (Math.abs(change) < LAST_STEP) break;
  }
  return traffic;
}

/**
 * Offered traffic of which `carriedE` is carried, unchecked: carried over free channels is nearly proportional to the traffic.
 *
 * @param carriedE above 0 and below channels
 */
export function offeredFor(carriedE: number, channels: number): number {
  // Near 0 channels only the ratio counts; subnormal numbers have too few digits to go on with.
  if (channels < 1e-200) return offeredFor(carriedE * 2 ** 600, channels * 2 ** 600);
  const free = channels - carriedE;
  const wanted = Math.log(carriedE / free);
  // Carried is at most A; and free is at most N/(A - N), by the head of the continued fraction.
  const low = Math.log(carriedE);
  const high = Math.log(2 * (channels + channels / free) + 2);
  const miss = (logTraffic: number): number => {
    const traffic = Math.exp(logTraffic);
    return Math.log(carriedOf(traffic, channels) / freeChannels(traffic, channels)) - wanted;
  };
  const atLow = miss(low);
  // Nothing measurable is blocked.
  if (atLow >= 0) return carriedE;
  return Math.exp(rootIn(miss, { low, high, atLow, atHigh: miss(high) }));
}
