import { domain, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { bracketAround, rootIn } from "../numerics/root";
import { excessOf, lostOf } from "./overflow-moments";

export const offeredTraffic = domain(0, 1e7, "traffic from 0 to 10,000,000 erlang");
export const groupSize = domain(0, 1e7, "a number of channels from 0 to 10,000,000");
export const streamMean = domain(1e-6, 1e6, "a mean from 0.000001 to 1,000,000 erlang");
export const streamVariance = domain(0, 1e9, "a variance above 0, up to 1,000,000,000", { openLow: true });
/** Peakier streams than this come from no overflow met in practice, and their equivalent groups leave the tested range. */
const MOST_PEAKED = 1000;
/** Smoother streams than this, as (m - A*)/A*, are nearly constant, which no Poisson traffic is equivalent to. */
const MOST_SMOOTH = 1e6;

function check(trafficE: number, channels: number): void {
  requireIn(offeredTraffic, "trafficE", trafficE);
  requireIn(groupSize, "channels", channels);
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
  return trafficE === 0 ? 0 : lostOf(trafficE, channels);
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
  return trafficE === 0 ? 1 : 1 + excessOf(trafficE, channels);
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
  return trafficE === 0 ? 0 : lostOf(trafficE, channels) * (1 + excessOf(trafficE, channels));
}

/**
 * Equivalent random traffic: the Poisson traffic A* and group N* whose overflow has this mean and variance, solved exactly
 * (not by Rapp's approximation); N* real.
 *
 * Riordan's formula gives N* for a trial A*: with D = A* - m, what the group carries, and e = z - 1 it is D + (D - e)/(m + e). The
 * mean or the peakedness of that group's overflow, whichever moves more, then decides A* in one bracketed search. Peaky streams have
 * N* above 0, Poisson ones 0, smooth ones below 0 by the continued Erlang formula (G. Bretschneider 1973).
 *
 * @param meanE mean of the stream, erlang
 * @param varianceE variance of the stream
 * @returns A*, N*
 * @throws NoAnswerError where no stream of whole calls has so small a variance, or the search leaves its range
 */
export function equivalent(meanE: number, varianceE: number): [trafficE: number, channels: number] {
  requireIn(streamMean, "meanE", meanE);
  requireIn(streamVariance, "varianceE", varianceE);
  if (varianceE === meanE) return [meanE, 0];
  const excess = (varianceE - meanE) / meanE;
  const z = varianceE / meanE;
  if (meanE + excess <= 0 || z > MOST_PEAKED) {
    throw new NoAnswerError(
      z > 1
        ? `A peakedness of ${z} is above the ${MOST_PEAKED} that the method covers.`
        : `No stream of calls with a mean of ${meanE} erlang has a variance as small as ${varianceE}; at least ${meanE * (1 - meanE)} is needed.`,
    );
  }
  // The ratio of D to m for peaky streams, of -D to A* for smooth ones: it runs from 0 up in either case.
  const carriedFor = (ratio: number): number => (excess > 0 ? meanE * ratio : -meanE * (ratio / (1 + ratio)));
  const trafficFor = (ratio: number): number => (excess > 0 ? meanE * (1 + ratio) : meanE / (1 + ratio));
  const groupFor = (carriedE: number): number => carriedE + (carriedE - excess) / (meanE + excess);
  // Rapp's approximation, and A* = m z, which smooth streams come near to.
  const guess = excess > 0 ? excess + (3 * z * excess) / meanE : -excess / z;
  // Along the trial groups the peakedness moves this much against the mean, so that one or the other shows more digits of A*.
  const leverage = 1 + (meanE + excess) ** 2 / trafficFor(guess);
  const byMean = meanE * leverage < excess;
  /** Miss of the trial group, from -1 to 1, so that no trial outweighs the others; it rises with the peakedness. */
  const miss = (ratio: number): number => {
    const trafficE = trafficFor(ratio);
    const channels = groupFor(carriedFor(ratio));
    if (byMean) {
      const lostE = lostOf(trafficE, channels);
      return (meanE - lostE) / (meanE + lostE);
    }
    const found = excessOf(trafficE, channels);
    return (found - excess) / (2 + found + excess);
  };
  const most = excess > 0 ? offeredTraffic.high / meanE : MOST_SMOOTH;
  const bracket = bracketAround(miss, guess, 0, most);
  if (!bracket) {
    throw new NoAnswerError(
      `No equivalent traffic within the range of the method for a mean of ${meanE} and a variance of ${varianceE}.`,
    );
  }
  const ratio = rootIn(miss, bracket);
  return [trafficFor(ratio), groupFor(carriedFor(ratio))];
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
