import { nonNegative, positive, probability, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { smallestWhole } from "../numerics/root";
import { blockingOf, freeChannels } from "./erlang-b-formula";
import { channelCount, requireBelowServers, waitingTraffic } from "./waiting-domains";

/** P(wait > 0), unchecked: N B over the mean number of free channels, both without cancellation. */
function delayedOf(trafficE: number, channels: number): number {
  if (trafficE === 0) return 0;
  return (channels * blockingOf(trafficE, channels)) / freeChannels(trafficE, channels);
}

function requireQueue(trafficE: number, channels: number): void {
  requireIn(waitingTraffic, "trafficE", trafficE);
  requireIn(channelCount, "channels", channels);
  requireBelowServers(trafficE, channels);
}

/**
 * Erlang C: the chance that an arrival must wait, where blocked calls queue without limit.
 *
 * C = N B / (N - A (1 - B)) with Erlang B, continued to real N as Erlang B is.
 *
 * @param trafficE offered traffic, erlang, at least 0 and below channels
 * @param channels number of channels, above 0
 * @returns probability
 * @throws NoAnswerError where the traffic is not below the channels
 */
export function delayed(trafficE: number, channels: number): number {
  requireQueue(trafficE, channels);
  return delayedOf(trafficE, channels);
}

/**
 * Mean wait of all calls, those that do not wait included: C h / (N - A).
 *
 * @param trafficE offered traffic, erlang
 * @param channels number of channels
 * @param holdingTimeS mean holding time, s
 * @returns s
 */
export function wait(trafficE: number, channels: number, holdingTimeS: number): number {
  requireQueue(trafficE, channels);
  requireIn(positive, "holdingTimeS", holdingTimeS);
  return (delayedOf(trafficE, channels) * holdingTimeS) / (channels - trafficE);
}

function lateOf(trafficE: number, channels: number, holdingTimeS: number, waitS: number): number {
  return delayedOf(trafficE, channels) * Math.exp(-((channels - trafficE) * waitS) / holdingTimeS);
}

/**
 * Chance that a call waits longer than a given time, first come first served: C exp(-(N - A) t / h).
 *
 * @param trafficE offered traffic, erlang
 * @param channels number of channels
 * @param holdingTimeS mean holding time, s, exponential
 * @param waitS waiting time, s
 * @returns probability
 */
export function late(trafficE: number, channels: number, holdingTimeS: number, waitS: number): number {
  requireQueue(trafficE, channels);
  requireIn(positive, "holdingTimeS", holdingTimeS);
  requireIn(nonNegative, "waitS", waitS);
  return lateOf(trafficE, channels, holdingTimeS, waitS);
}

/**
 * Smallest whole number of channels at which the chance of a longer wait stays within the target.
 *
 * @param trafficE offered traffic, erlang
 * @param holdingTimeS mean holding time, s
 * @param waitS waiting time, s
 * @param probabilityTarget largest chance of a longer wait
 * @returns channels, 0 where there is no traffic
 */
export function channels(trafficE: number, holdingTimeS: number, waitS: number, probabilityTarget: number): number {
  requireIn(waitingTraffic, "trafficE", trafficE);
  requireIn(positive, "holdingTimeS", holdingTimeS);
  requireIn(nonNegative, "waitS", waitS);
  requireIn(probability, "probability", probabilityTarget);
  if (trafficE === 0) return 0;
  const lowest = Math.floor(trafficE) + 1;
  const found = smallestWhole(
    (n) => lateOf(trafficE, n, holdingTimeS, waitS) <= probabilityTarget,
    lowest,
    2 * channelCount.high,
  );
  if (found === undefined) {
    throw new NoAnswerError(
      `No number of channels up to ${2 * channelCount.high} keeps the wait at ${trafficE} erlang.`,
    );
  }
  return found;
}
