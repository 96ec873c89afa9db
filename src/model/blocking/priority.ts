import { positive, requireIn } from "../domain";
import { sumError } from "../numerics/exact";
import { delayed } from "./erlang-c";
import { requireBelowServers, waitingTraffic } from "./waiting-domains";

/**
 * Mean wait of each class under non-preemptive priority with equal exponential holding times (A. Cobham 1954).
 *
 * W_k = C h / (N (1 - s_(k-1)) (1 - s_k)), s_k the load of class k and all above it, C Erlang C of the whole traffic.
 *
 * @param trafficE offered traffic per class, erlang, highest class first
 * @param channels number of channels
 * @param holdingTimeS mean holding time, s
 * @returns mean wait per class, s, calls that do not wait included
 * @throws NoAnswerError where the whole traffic is not below the channels
 */
export function wait(trafficE: readonly number[], channels: number, holdingTimeS: number): number[] {
  for (const traffic of trafficE) requireIn(waitingTraffic, "trafficE", traffic);
  requireIn(positive, "holdingTimeS", holdingTimeS);
  // What rounding takes from the running sum is kept, since near full load it is a large part of N minus the sum.
  const spare = [channels];
  let above = 0;
  let rest = 0;
  for (const traffic of trafficE) {
    const sum = above + traffic;
    rest += sumError(above, traffic, sum);
    above = sum;
    spare.push(channels - above - rest);
  }
  requireBelowServers(above, channels);
  const base = delayed(above, channels) * holdingTimeS * channels;
  return trafficE.map((_, i) => base / (spare[i]! * spare[i + 1]!));
}
