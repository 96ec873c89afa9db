/** Erlang B, the loss formula of a full-availability group: Poisson arrivals, any holding times, blocked calls leave. */
import { domain, nonNegative, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { channelsFor } from "./erlang-b-channels";
import { blockingOf, carriedOf, freeChannels } from "./erlang-b-formula";
import { offeredFor, trafficFor } from "./erlang-b-traffic";

/** Channels of a group; real where the formula is continued between whole numbers. */
export const groupSize = domain(0, 1e9, "a number of channels from 0 to 1,000,000,000");
/** Traffic for which whole channels are counted: beyond, one channel more changes blocking by less than it is known to. */
export const countableTraffic = domain(0, 1e9, "traffic from 0 to 1,000,000,000 erlang");
/** A blocking target. Below 1e-300 the formula itself nears the smallest number of the machine. */
export const blockingTarget = domain(1e-300, 1, "a probability from 1e-300 to below 1", { openHigh: true });

/**
 * Probability that a call is blocked.
 *
 * 1/B = A * integral over y >= 0 of exp(-A y) (1 + y)^N, which for whole N is Erlang's formula. Relative error below 1e-14 for all N,
 * tails included, in well under a microsecond: recursion for few channels, Temme's uniform expansion near the traffic, Legendre's
 * continued fraction above it, the Poisson term with its series below it (src/model/numerics/poisson-ratio.ts).
 * Probabilities below about 1e-308 are answered with 0; so is no traffic, of which nothing is blocked.
 *
 * @param trafficE offered traffic, erlang, at least 0
 * @param channels number of channels, 0 to 1e9, may be fractional
 * @returns probability, 0 to 1
 */
export function blocking(trafficE: number, channels: number): number {
  requireIn(nonNegative, "trafficE", trafficE);
  requireIn(groupSize, "channels", channels);
  return blockingOf(trafficE, channels);
}

/**
 * Smallest whole number of channels that keeps blocking at the target or below.
 *
 * Exact: B(N) <= target < B(N - 1) in the numbers that `blocking` gives.
 *
 * @param trafficE offered traffic, erlang, 0 to 1e9
 * @param target blocking, 1e-300 to below 1
 * @returns channels; 0 where there is no traffic
 */
export function channels(trafficE: number, target: number): number {
  requireIn(countableTraffic, "trafficE", trafficE);
  requireIn(blockingTarget, "blocking", target);
  return channelsFor(trafficE, target);
}

/**
 * Traffic that may be offered to a group at the target blocking.
 *
 * @param channels number of channels, 0 to 1e9, may be fractional
 * @param target blocking, 1e-300 to below 1
 * @returns erlang; 0 for no channels
 */
export function traffic(channels: number, target: number): number {
  requireIn(groupSize, "channels", channels);
  requireIn(blockingTarget, "blocking", target);
  return trafficFor(channels, target);
}

/**
 * Carried traffic A (1 - B): the mean number of busy channels.
 *
 * @param trafficE offered traffic, erlang, at least 0
 * @param channels number of channels, 0 to 1e9, may be fractional
 * @returns erlang
 */
export function carried(trafficE: number, channels: number): number {
  requireIn(nonNegative, "trafficE", trafficE);
  requireIn(groupSize, "channels", channels);
  return carriedOf(trafficE, channels);
}

/**
 * Improvement A (B(N) - B(N + 1)): the traffic that one channel more would carry (K. Moe's principle).
 *
 * By the recursion it is A B (1 + free) / (N + 1 + A B), free = N - A (1 - B): no difference of nearly equal numbers.
 *
 * @param trafficE offered traffic, erlang, at least 0
 * @param channels number of channels before, 0 to 1e9, may be fractional
 * @returns erlang
 */
export function improvement(trafficE: number, channels: number): number {
  requireIn(nonNegative, "trafficE", trafficE);
  requireIn(groupSize, "channels", channels);
  const lost = trafficE * blockingOf(trafficE, channels);
  return lost * ((1 + freeChannels(trafficE, channels)) / (channels + 1 + lost));
}

/**
 * Offered traffic behind a measured carried traffic: solves A (1 - B(A)) = carried.
 *
 * The free channels N - carried decide where the group is nearly full.
 *
 * @param carriedE carried traffic, erlang, at least 0 and below channels
 * @param channels number of channels, 0 to 1e9, may be fractional
 * @returns erlang offered
 * @throws NoAnswerError where the group cannot carry that much
 */
export function offered(carriedE: number, channels: number): number {
  requireIn(nonNegative, "carriedE", carriedE);
  requireIn(groupSize, "channels", channels);
  if (carriedE === 0) return 0;
  if (carriedE >= channels) {
    throw new NoAnswerError(
      `${channels} channels cannot carry ${carriedE} erlang: carried traffic stays below the number of channels.`,
    );
  }
  return offeredFor(carriedE, channels);
}
