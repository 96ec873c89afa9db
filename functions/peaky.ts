import { groupSize, offeredTraffic } from "../src/model/blocking/overflow";
import * as peaky from "../src/model/blocking/peaky";
import { probability } from "../src/model/domain";
import { number, perCell } from "../src/sheet/call";

/**
 * Blocking of traffic with given peakedness on a group of channels.
 * @customfunction PEAKY.BLOCKING
 * @param meanE Mean of the traffic in erlang, 0 to 1e7.
 * @param peakedness Variance over mean, 0.01 to 1000: 1 Poisson, above 1 peaky, below 1 smooth.
 * @param channels Number of channels, 0 to 1e7; may be fractional.
 * @returns Probability from 0 to 1: share of the traffic that is lost.
 * @method Fredericks and Hayward: Erlang B of m/z erlang on N/z channels, continuous in N/z.
 * @source A. A. Fredericks, Congestion in Blocking Systems - A Simple Approximation Technique, Bell System Technical Journal 59 (1980).
 * @assumes An approximation for a stream described by mean and peakedness; CAP.OVERFLOW.LOST gives the equivalent random answer, some percent apart.
 * @example =CAP.PEAKY.BLOCKING(15, 2, 20) is 0.09954
 */
export function peakyBlocking(meanE: any[][], peakedness: any[][], channels: any[][]): any[][] {
  return perCell(peaky.blocking, {
    meanE: number(meanE, offeredTraffic),
    peakedness: number(peakedness, peaky.peakednessRange),
    channels: number(channels, groupSize),
  });
}

/**
 * Smallest number of channels that keeps the blocking of peaky traffic within a target.
 * @customfunction PEAKY.CHANNELS
 * @param meanE Mean of the traffic in erlang, 0 to 1e7.
 * @param peakedness Variance over mean, 0.01 to 1000: 1 Poisson, above 1 peaky, below 1 smooth.
 * @param blocking Largest blocking, above 0 and below 1.
 * @returns Whole number of channels.
 * @method Smallest N with Erlang B of m/z erlang on N/z channels (Fredericks and Hayward) at most the target; one channel fewer misses it.
 * @source A. A. Fredericks, Bell System Technical Journal 59 (1980).
 * @assumes As CAP.PEAKY.BLOCKING.
 * @example =CAP.PEAKY.CHANNELS(15, 2, 0.01) is 29
 */
export function peakyChannels(meanE: any[][], peakedness: any[][], blocking: any[][]): any[][] {
  return perCell(peaky.channels, {
    meanE: number(meanE, offeredTraffic),
    peakedness: number(peakedness, peaky.peakednessRange),
    blocking: number(blocking, probability),
  });
}
