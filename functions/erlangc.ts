import * as erlangC from "../src/model/blocking/erlang-c";
import { channelCount, waitingTraffic } from "../src/model/blocking/waiting-domains";
import { nonNegative, positive, probability as openProbability } from "../src/model/domain";
import { number, perCell } from "../src/sheet/call";

/**
 * Chance that a call must wait, where calls that find all channels busy queue (Erlang C).
 * @customfunction ERLANGC.DELAYED
 * @param trafficE Offered traffic in erlang, 0 to 1e7, below the number of channels.
 * @param channels Number of channels, above 0 to 1e7; may be fractional.
 * @returns Probability from 0 to 1 that the wait is above 0.
 * @method C = N B / (N - A (1 - B)) with Erlang B, B = B(A, N); fractional N through the continuous Erlang B. The denominator, the mean number of free channels, is computed without cancellation, so that loads near 1 keep their digits.
 * @source A. K. Erlang 1917; ITU-D Teletraffic Engineering Handbook, chapter on delay systems.
 * @assumes Poisson arrivals, exponential holding times, first come first served, calls wait as long as it takes.
 * @errors #N/A where the traffic is not below the channels: the queue never settles.
 * @example =CAP.ERLANGC.DELAYED(4, 5) is 0.5541
 */
export function erlangcDelayed(trafficE: any[][], channels: any[][]): any[][] {
  return perCell(erlangC.delayed, {
    trafficE: number(trafficE, waitingTraffic),
    channels: number(channels, channelCount),
  });
}

/**
 * Mean wait of all calls, those that do not wait included (Erlang C).
 * @customfunction ERLANGC.WAIT
 * @param trafficE Offered traffic in erlang, 0 to 1e7, below the number of channels.
 * @param channels Number of channels, above 0 to 1e7; may be fractional.
 * @param holdingTimeS Mean holding time in seconds, above 0.
 * @returns Mean wait in seconds.
 * @method C h / (N - A), C the chance of waiting of CAP.ERLANGC.DELAYED. Divide by C for the mean wait of those that wait.
 * @source A. K. Erlang 1917; ITU-D Teletraffic Engineering Handbook, chapter on delay systems.
 * @assumes Poisson arrivals, exponential holding times, calls wait as long as it takes.
 * @errors #N/A where the traffic is not below the channels: the queue never settles.
 * @example =CAP.ERLANGC.WAIT(4, 5, 180) is 99.74
 */
export function erlangcWait(trafficE: any[][], channels: any[][], holdingTimeS: any[][]): any[][] {
  return perCell(erlangC.wait, {
    trafficE: number(trafficE, waitingTraffic),
    channels: number(channels, channelCount),
    holdingTimeS: number(holdingTimeS, positive),
  });
}

/**
 * Chance that a call waits longer than a given time (Erlang C).
 * @customfunction ERLANGC.LATE
 * @param trafficE Offered traffic in erlang, 0 to 1e7, below the number of channels.
 * @param channels Number of channels, above 0 to 1e7; may be fractional.
 * @param holdingTimeS Mean holding time in seconds, above 0.
 * @param waitS Waiting time in seconds, at least 0.
 * @returns Probability from 0 to 1, of all calls.
 * @method C exp(-(N - A) t / h), C the chance of waiting of CAP.ERLANGC.DELAYED.
 * @source A. K. Erlang 1917; ITU-D Teletraffic Engineering Handbook, chapter on delay systems.
 * @assumes Poisson arrivals, exponential holding times, first come first served.
 * @errors #N/A where the traffic is not below the channels: the queue never settles.
 * @example =CAP.ERLANGC.LATE(8, 10, 120, 20) is 0.2932
 */
export function erlangcLate(trafficE: any[][], channels: any[][], holdingTimeS: any[][], waitS: any[][]): any[][] {
  return perCell(erlangC.late, {
    trafficE: number(trafficE, waitingTraffic),
    channels: number(channels, channelCount),
    holdingTimeS: number(holdingTimeS, positive),
    waitS: number(waitS, nonNegative),
  });
}

/**
 * Smallest number of channels at which few enough calls wait too long (Erlang C).
 * @customfunction ERLANGC.CHANNELS
 * @param trafficE Offered traffic in erlang, 0 to 1e7.
 * @param holdingTimeS Mean holding time in seconds, above 0.
 * @param waitS Longest wait in seconds, at least 0.
 * @param probability Largest chance of a longer wait, above 0 and below 1.
 * @returns Whole number of channels.
 * @method Smallest N above A with C exp(-(N - A) t / h) at most the target; one channel fewer misses it. The search gallops and halves, each step one evaluation of Erlang C.
 * @source A. K. Erlang 1917; ITU-D Teletraffic Engineering Handbook, chapter on delay systems.
 * @assumes Poisson arrivals, exponential holding times, first come first served.
 * @example =CAP.ERLANGC.CHANNELS(9, 60, 10, 0.05) is 14
 */
export function erlangcChannels(
  trafficE: any[][],
  holdingTimeS: any[][],
  waitS: any[][],
  probability: any[][],
): any[][] {
  return perCell(erlangC.channels, {
    trafficE: number(trafficE, waitingTraffic),
    holdingTimeS: number(holdingTimeS, positive),
    waitS: number(waitS, nonNegative),
    probability: number(probability, openProbability),
  });
}
