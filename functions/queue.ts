import { channelCount, waitingTraffic } from "../src/model/blocking/waiting-domains";
import * as queue from "../src/model/blocking/queue";
import { number, perCell } from "../src/sheet/call";

/**
 * Chance that a call is lost because all channels and all waiting places are taken.
 * @customfunction QUEUE.LOST
 * @param trafficE Offered traffic in erlang, 0 to 1e7; may exceed the channels.
 * @param channels Number of channels, above 0 to 1e7; may be fractional.
 * @param places Waiting places, a whole number from 0 to 1e9.
 * @returns Probability from 0 to 1.
 * @method M/M/N/N+K: with Erlang B and r = A/N, B r^K / (1 + B (r + ... + r^K)); the sum in closed form, scaled so that neither overload nor many places leave the number range.
 * @source ITU-D Teletraffic Engineering Handbook, chapter on delay systems; birth-death balance.
 * @assumes Poisson arrivals, exponential holding times, first come first served; a call that is lost does not return.
 * @example =CAP.QUEUE.LOST(4, 5, 5) is 0.04249
 */
export function queueLost(trafficE: any[][], channels: any[][], places: any[][]): any[][] {
  return perCell(queue.lost, {
    trafficE: number(trafficE, waitingTraffic),
    channels: number(channels, channelCount),
    places: number(places, queue.waitingPlaces),
  });
}

/**
 * Chance that a call which is accepted must wait, where the waiting places are limited.
 * @customfunction QUEUE.DELAYED
 * @param trafficE Offered traffic in erlang, 0 to 1e7; may exceed the channels.
 * @param channels Number of channels, above 0 to 1e7; may be fractional.
 * @param places Waiting places, a whole number from 0 to 1e9.
 * @returns Probability from 0 to 1, of the accepted calls.
 * @method M/M/N/N+K: B (1 + r + ... + r^(K-1)) over the same plus 1 - B, with Erlang B and r = A/N; 0 without waiting places.
 * @source ITU-D Teletraffic Engineering Handbook, chapter on delay systems; birth-death balance.
 * @assumes Poisson arrivals, exponential holding times, first come first served.
 * @example =CAP.QUEUE.DELAYED(11, 10, 20) is 0.9526
 */
export function queueDelayed(trafficE: any[][], channels: any[][], places: any[][]): any[][] {
  return perCell(queue.delayed, {
    trafficE: number(trafficE, waitingTraffic),
    channels: number(channels, channelCount),
    places: number(places, queue.waitingPlaces),
  });
}
