import * as erlangB from "../blocking/erlang-b";
import { domain, probability, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { quantile } from "../numerics/normal";

/** Relative error of a forecast; 0 is none. */
export const errorShareRange = domain(0, 100, "a relative error from 0 to 100");

/**
 * Channels that keep blocking at the target with a confidence, for a traffic that is known only up to a lognormal error.
 *
 * Blocking grows with the traffic, so the channels that suffice for the confidence quantile of the traffic, A (1 + e)^z, suffice
 * with exactly that confidence, and one fewer does not.
 *
 * @param trafficE median of the traffic, erlang
 * @param errorShare e, the deviation of the logarithm being ln(1 + e)
 * @param blocking blocking target
 * @param confidence probability that the channels suffice
 * @returns whole number of channels
 * @throws NoAnswerError where the quantile of the traffic is beyond what channels are counted for
 */
export function channels(trafficE: number, errorShare: number, blocking: number, confidence: number): number {
  requireIn(erlangB.countableTraffic, "trafficE", trafficE);
  requireIn(errorShareRange, "errorShare", errorShare);
  requireIn(probability, "confidence", confidence);
  const traffic = trafficE * Math.exp(quantile(confidence) * Math.log1p(errorShare));
  if (traffic > erlangB.countableTraffic.high) {
    throw new NoAnswerError(
      `At that confidence the traffic is ${traffic} erlang, more than channels can be counted for.`,
    );
  }
  return erlangB.channels(traffic, blocking);
}
