import { domain, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { legendreTail, isFarBelowMean } from "../numerics/poisson-ratio";
import { bracketAround, rootIn } from "../numerics/root";
import { blockingOf, freeChannels } from "./erlang-b-formula";
import { overflowBelowZero, SMALLEST_TRAFFIC } from "./erlang-b-smooth";

export const offeredTraffic = domain(0, 1e7, "traffic from 0 to 10,000,000 erlang");
export const groupSize = domain(0, 1e7, "a number of channels from 0 to 10,000,000");
export const streamMean = domain(1e-6, 1e6, "a mean from 0.000001 to 1,000,000 erlang");
export const streamVariance = domain(0, 1e9, "a variance above 0, up to 1,000,000,000", { openLow: true });
/** Peakier streams than this come from no overflow met in practice, and their equivalent groups leave the tested range. */
const MOST_PEAKED = 1000;

function check(trafficE: number, channels: number): void {
  requireIn(offeredTraffic, "trafficE", trafficE);
  requireIn(groupSize, "channels", channels);
}

/** Variance over mean of the overflow, unchecked: Riordan's formula in forms without cancellation. */
function peakednessOf(trafficE: number, channels: number): number {
  if (channels === 0 || trafficE === 0) return 1;
  const free = freeChannels(trafficE, channels);
  if (isFarBelowMean(channels, trafficE)) {
    // Far above the group 1 - m + A/(1 + free) loses all but 1; with Legendre's fraction c = N/free it is this.
    const tail = legendreTail(channels, trafficE);
    return 1 + (free * (1 + tail - free)) / (1 + free);
  }
  return 1 - trafficE * blockingOf(trafficE, channels) + trafficE / (1 + free);
}

/**
 * Mean of the traffic that overflows a group: A B.
 *
 * @param trafficE traffic offered to the group, erlang, Poisson
 * @param channels channels of the group
 * @returns erlang
 */
export function mean(trafficE: number, channels: number): number {
  check(trafficE, channels);
  return trafficE * blockingOf(trafficE, channels);
}

/**
 * Variance over mean of the traffic that overflows a group (J. Riordan, in R. I. Wilkinson 1956): 1 - m + A/(N + 1 - A + m).
 *
 * @param trafficE traffic offered to the group, erlang, Poisson
 * @param channels channels of the group
 * @returns peakedness, at least 1
 */
export function peakedness(trafficE: number, channels: number): number {
  check(trafficE, channels);
  return peakednessOf(trafficE, channels);
}

/**
 * Variance of the traffic that overflows a group: mean times peakedness.
 *
 * @param trafficE traffic offered to the group, erlang, Poisson
 * @param channels channels of the group
 * @returns variance of the number of calls on an unlimited overflow group
 */
export function variance(trafficE: number, channels: number): number {
  check(trafficE, channels);
  return trafficE * blockingOf(trafficE, channels) * peakednessOf(trafficE, channels);
}

/** A B for any real number of channels, below 0 too. */
function lostOf(trafficE: number, channels: number): number {
  return channels >= 0 ? trafficE * blockingOf(trafficE, channels) : overflowBelowZero(trafficE, -channels);
}

/**
 * Equivalent random traffic: the Poisson traffic A* and group N* whose overflow has this mean and variance, solved exactly
 * (not by Rapp's approximation); N* real.
 *
 * Riordan's formula gives N* for a trial A*; the mean decides A* in one bracketed search. Peaky streams have N* above 0,
 * Poisson 0, smooth ones below 0 by the continued Erlang formula (G. Bretschneider 1973).
 *
 * @param meanE mean of the stream, erlang
 * @param varianceE variance of the stream
 * @returns A*, N*
 * @throws NoAnswerError where no stream of whole calls has so small a variance, or the search leaves its range
 */
export function equivalent(meanE: number, varianceE: number): [trafficE: number, channels: number] {
  requireIn(streamMean, "meanE", meanE);
  requireIn(streamVariance, "varianceE", varianceE);
  const z = varianceE / meanE;
  if (z === 1) return [meanE, 0];
  if (meanE + z <= 1 || z > MOST_PEAKED) {
    throw new NoAnswerError(
      z > 1
        ? `A peakedness of ${z} is above the ${MOST_PEAKED} that the method covers.`
        : `No stream of calls with a mean of ${meanE} erlang has a variance as small as ${varianceE}; at least ${meanE * (1 - meanE)} is needed.`,
    );
  }
  const excess = 1 / (meanE + z - 1);
  const groupFor = (trafficE: number): number => trafficE - meanE + (trafficE * excess - 1);
  // Above 0 channels the mean is compared through the free channels, which are few where the mean is large: the same
  // difference, at the rounding error of the smaller number.
  const difference = (trafficE: number): number => {
    const channels = groupFor(trafficE);
    if (channels < 0) return lostOf(trafficE, channels) - meanE;
    return freeChannels(trafficE, channels) - (trafficE * excess - 1);
  };
  const rapp = varianceE + 3 * z * (z - 1);
  const guess = z > 1 ? rapp : meanE * z;
  // A smooth stream is a group below 0, so its traffic lies below the mean; a peaky one lies above it.
  const bracket =
    z > 1
      ? bracketAround(difference, guess, meanE, offeredTraffic.high)
      : bracketAround(difference, Math.max(guess, SMALLEST_TRAFFIC), SMALLEST_TRAFFIC, meanE);
  if (!bracket) {
    throw new NoAnswerError(
      `No equivalent traffic within 0.0001 to 10,000,000 erlang for a mean of ${meanE} and a variance of ${varianceE}.`,
    );
  }
  const trafficE = rootIn(difference, bracket);
  return [trafficE, groupFor(trafficE)];
}

/**
 * Traffic lost when a stream of given mean and variance is offered to a group (R. I. Wilkinson 1956): A* B(A*, N* + channels).
 *
 * @param meanE mean of the stream, erlang
 * @param varianceE variance of the stream
 * @param channels channels of the group
 * @returns erlang
 */
export function lost(meanE: number, varianceE: number, channels: number): number {
  requireIn(groupSize, "channels", channels);
  const [trafficE, before] = equivalent(meanE, varianceE);
  return lostOf(trafficE, before + channels);
}
