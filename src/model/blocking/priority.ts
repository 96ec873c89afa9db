import { positive, requireIn } from "../domain";
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
  const total = trafficE.reduce((sum, traffic) => sum + traffic, 0);
  requireBelowServers(total, channels);
  const base = delayed(total, channels) * holdingTimeS * channels;
  let above = 0;
  return trafficE.map((traffic) => {
    const left = channels - above;
    above += traffic;
    return base / (left * (channels - above));
  });
}
