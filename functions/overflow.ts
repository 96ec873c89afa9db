import * as overflow from "../src/model/blocking/overflow";
import { flag, number, perCell, perCellRow } from "../src/sheet/call";

/**
 * Mean of the traffic that overflows a group of channels.
 * @customfunction OVERFLOW.MEAN
 * @param trafficE Poisson traffic offered to the group in erlang, 0 to 1e7.
 * @param channels Channels of the group, 0 to 1e7; may be fractional.
 * @returns Erlang that finds the group busy.
 * @method A B(A, N), Erlang B continuous in N.
 * @source R. I. Wilkinson, Theories for Toll Traffic Engineering in the U.S.A., Bell System Technical Journal 35 (1956).
 * @assumes Poisson arrivals; calls that find the group busy go elsewhere at once.
 * @example =CAP.OVERFLOW.MEAN(10, 10) is 2.1458
 */
export function overflowMean(trafficE: any[][], channels: any[][]): any[][] {
  return perCell(overflow.mean, {
    trafficE: number(trafficE, overflow.offeredTraffic),
    channels: number(channels, overflow.groupSize),
  });
}

/**
 * Variance of the traffic that overflows a group of channels.
 * @customfunction OVERFLOW.VARIANCE
 * @param trafficE Poisson traffic offered to the group in erlang, 0 to 1e7.
 * @param channels Channels of the group, 0 to 1e7; may be fractional.
 * @returns Variance of the number of overflow calls present on an unlimited group.
 * @method Riordan: v = m (1 - m + A / (N + 1 - A + m)) with m = A B; far above the group in the form of Legendre's continued fraction, which does not cancel.
 * @source J. Riordan, appendix to R. I. Wilkinson, Bell System Technical Journal 35 (1956).
 * @assumes Poisson arrivals, exponential holding times.
 * @example =CAP.OVERFLOW.VARIANCE(10, 10) is 4.3624
 */
export function overflowVariance(trafficE: any[][], channels: any[][]): any[][] {
  return perCell(overflow.variance, {
    trafficE: number(trafficE, overflow.offeredTraffic),
    channels: number(channels, overflow.groupSize),
  });
}

/**
 * Peakedness (variance over mean) of the traffic that overflows a group of channels.
 * @customfunction OVERFLOW.PEAKEDNESS
 * @param trafficE Poisson traffic offered to the group in erlang, 0 to 1e7.
 * @param channels Channels of the group, 0 to 1e7; may be fractional.
 * @returns Peakedness: 1 for Poisson traffic, above 1 behind a group.
 * @method Riordan: z = 1 - m + A / (N + 1 - A + m) with m = A B.
 * @source J. Riordan, appendix to R. I. Wilkinson, Bell System Technical Journal 35 (1956).
 * @assumes Poisson arrivals, exponential holding times.
 * @example =CAP.OVERFLOW.PEAKEDNESS(20, 20) is 2.6093
 */
export function overflowPeakedness(trafficE: any[][], channels: any[][]): any[][] {
  return perCell(overflow.peakedness, {
    trafficE: number(trafficE, overflow.offeredTraffic),
    channels: number(channels, overflow.groupSize),
  });
}

/**
 * Equivalent random traffic: the Poisson traffic and group whose overflow has a given mean and variance.
 * @customfunction OVERFLOW.EQUIVALENT
 * @param meanE Mean of the stream in erlang, 1e-6 to 1e6.
 * @param varianceE Variance of the stream, above 0; peakedness at most 1000.
 * @param [labels] TRUE to put the headings first.
 * @returns Equivalent traffic A* in erlang and equivalent group N*, which may be fractional.
 * @method Both moments are met exactly (Riordan's formula and the continuous Erlang B), not by Rapp's approximation. A smooth stream (variance below mean) gets a group below 0 by the continued Erlang formula 1/B = A times the integral of exp(-A y)(1+y)^N.
 * @source R. I. Wilkinson, Bell System Technical Journal 35 (1956); G. Bretschneider, Extension of the Equivalent Random Method to Smooth Traffics, ITC 7 (1973).
 * @assumes The stream is described by two moments alone; independent streams add in mean and in variance.
 * @errors #N/A where no stream of whole calls has so small a variance, or the equivalent lies beyond 1e7 erlang.
 * @example =CAP.OVERFLOW.EQUIVALENT(10, 20) is 25.4846
 */
export function overflowEquivalent(meanE: any[][], varianceE: any[][], labels?: any[][]): any[][] {
  return perCellRow(
    overflow.equivalent,
    ["trafficE", "channels"],
    { meanE: number(meanE, overflow.streamMean), varianceE: number(varianceE, overflow.streamVariance) },
    flag(labels),
  );
}

/**
 * Traffic lost when a stream of given mean and variance is offered to a group of channels.
 * @customfunction OVERFLOW.LOST
 * @param meanE Mean of the stream in erlang, 1e-6 to 1e6.
 * @param varianceE Variance of the stream, above 0; peakedness at most 1000.
 * @param channels Channels of the group, 0 to 1e7; may be fractional.
 * @returns Erlang lost. Divide by the mean for the share of the stream.
 * @method Equivalent random theory: A* B(A*, N* + channels), A* and N* of CAP.OVERFLOW.EQUIVALENT, solved exactly.
 * @source R. I. Wilkinson, Bell System Technical Journal 35 (1956).
 * @assumes The stream is described by two moments alone.
 * @errors As CAP.OVERFLOW.EQUIVALENT.
 * @example =CAP.OVERFLOW.LOST(10, 20, 12) is 1.9700
 */
export function overflowLost(meanE: any[][], varianceE: any[][], channels: any[][]): any[][] {
  return perCell(overflow.lost, {
    meanE: number(meanE, overflow.streamMean),
    varianceE: number(varianceE, overflow.streamVariance),
    channels: number(channels, overflow.groupSize),
  });
}
