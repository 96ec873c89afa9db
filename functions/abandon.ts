import * as abandon from "../src/model/blocking/abandon";
import { channelCount, waitingTraffic } from "../src/model/blocking/waiting-domains";
import { number, perCell } from "../src/sheet/call";

/**
 * Share of calls that leave the queue before they are served, where callers have limited patience.
 * @customfunction ABANDON.LOST
 * @param trafficE Offered traffic in erlang, 0 to 1e7; may exceed the channels.
 * @param channels Number of channels, above 0 to 1e7; may be fractional.
 * @param holdingTimeS Mean holding time in seconds, above 0 to 1e9.
 * @param patienceS Mean patience in seconds, within a factor of a million of the holding time.
 * @returns Share from 0 to 1 of all calls.
 * @method M/M/N+M: waiting call number j leaves at rate 1/patience, so states above N hold the terms y^j / ((x+1) ... (x+j)) with x = N patience/h and y = A patience/h; the share is (h/patience) E[waiting] / A. The sums come from the incomplete gamma function by region (series, uniform expansion, continued fraction), in a bounded time at any size.
 * @source C. Palm, Research on telephone traffic carried by full availability groups, Tele 1957.
 * @assumes Poisson arrivals, exponential holding times and exponential patience, first come first served, no return.
 * @example =CAP.ABANDON.LOST(12, 10, 100, 60) is 0.2278
 */
export function abandonLost(trafficE: any[][], channels: any[][], holdingTimeS: any[][], patienceS: any[][]): any[][] {
  return perCell(abandon.lost, {
    trafficE: number(trafficE, waitingTraffic),
    channels: number(channels, channelCount),
    holdingTimeS: number(holdingTimeS, abandon.timeS),
    patienceS: number(patienceS, abandon.timeS),
  });
}
