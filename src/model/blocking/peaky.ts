import { domain, probability, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { smallestWhole } from "../numerics/root";
import { blockingOf } from "./erlang-b-formula";
import { groupSize, offeredTraffic } from "./overflow";

export const peakednessRange = domain(0.01, 1000, "a peakedness from 0.01 to 1000");

/**
 * Blocking of a stream with given peakedness (A. A. Fredericks and W. S. Hayward): Erlang B of mean/z on N/z, continuous.
 *
 * @param meanE mean of the stream, erlang
 * @param peakedness variance over mean: above 1 peaky, below 1 smooth
 * @param channels number of channels
 * @returns probability
 */
export function blocking(meanE: number, peakedness: number, channels: number): number {
  requireIn(offeredTraffic, "meanE", meanE);
  requireIn(peakednessRange, "peakedness", peakedness);
  requireIn(groupSize, "channels", channels);
  return blockingOf(meanE / peakedness, channels / peakedness);
}

/**
 * Smallest whole number of channels that keeps the blocking of a peaky stream within the target.
 *
 * @param meanE mean of the stream, erlang
 * @param peakedness variance over mean
 * @param target largest blocking
 * @returns channels
 */
export function channels(meanE: number, peakedness: number, target: number): number {
  requireIn(offeredTraffic, "meanE", meanE);
  requireIn(peakednessRange, "peakedness", peakedness);
  requireIn(probability, "blocking", target);
  if (meanE === 0) return 0;
  const fits = (n: number): boolean => blockingOf(meanE / peakedness, n / peakedness) <= target;
  const found = smallestWhole(fits, 0, 2 * groupSize.high, meanE);
  if (found === undefined) {
    throw new NoAnswerError(`No number of channels up to ${2 * groupSize.high} keeps the blocking at ${target}.`);
  }
  return found;
}
